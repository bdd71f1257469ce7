namespace Looseloop.Link;

/// <summary>Why a port could not be opened.</summary>
public enum LinkOpenFailure
{
    /// <summary>Nothing has this name.</summary>
    NotFound,

    /// <summary>The port is there, but this user may not open it.</summary>
    NoPermission,

    /// <summary>Another program, or this one, has it open.</summary>
    Busy,

    /// <summary>A file, a folder or another device has this name.</summary>
    NotASerialPort,

    /// <summary>The system refused for a reason of its own; the message carries it.</summary>
    Refused,
}
