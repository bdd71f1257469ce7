namespace Looseloop.Record;

/// <summary>What can be wrong with a record.</summary>
public enum RecordProblem
{
    /// <summary>There is no such file.</summary>
    NotFound,

    /// <summary>Another program writes to it.</summary>
    Busy,

    /// <summary>It, or its folder, may not be written, or not even read.</summary>
    NoPermission,

    /// <summary>A newer version of this program has made or changed it.</summary>
    NewerVersion,

    /// <summary>It is of an older form, and was only to be read; opened for writing it is brought up to date.</summary>
    OlderVersion,

    /// <summary>It is a file of another kind.</summary>
    NotARecord,

    /// <summary>It is damaged.</summary>
    Corrupt,

    /// <summary>The disk is full.</summary>
    DiskFull,

    /// <summary>The disk reported an error.</summary>
    DiskError,
}
