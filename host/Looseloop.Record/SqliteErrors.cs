using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>From SQLite's result codes (sqlite.org/rescode.html) to what a user can do about them.</summary>
internal static class SqliteErrors
{
    private const string Kept = "What was saved before is untouched.";

    public static RecordException Translate(SqliteException error, string path) => error.SqliteErrorCode switch
    {
        5 or 6 => new(RecordProblem.Busy, $"Another program is using the record {path}. {Kept} End it, or use another file with --record.", error),
        8 or 3 or 23 => new(RecordProblem.NoPermission, $"The record {path} may not be written. {Kept} Check the permissions of the file and its folder, or use another file with --record.", error),
        13 => new(RecordProblem.DiskFull, $"The disk is full: nothing more can be saved in {path}. {Kept} Make room, and go on.", error),
        11 => new(RecordProblem.Corrupt, $"The record {path} is damaged ({error.Message}). It was left as it is. Copy it to a safe place, and go on with another file with --record.", error),
        26 => new(RecordProblem.NotARecord, $"{path} is not a record, or its beginning is damaged. It was left as it is. Use another file with --record.", error),
        14 => new(RecordProblem.NoPermission, $"The record {path} cannot be opened. {Kept} Check that its folder exists and may be written.", error),
        10 => new(RecordProblem.DiskError, $"The disk reported an error at {path} ({error.Message}). {Kept} Check the disk, or use another file with --record.", error),
        _ => new(RecordProblem.DiskError, $"The record {path} cannot be used: {error.Message}. {Kept}", error),
    };

    /// <summary>Runs an action and turns SQLite's errors into the record's.</summary>
    public static T Guard<T>(string path, Func<T> action)
    {
        try
        {
            return action();
        }
        catch (SqliteException error)
        {
            throw Translate(error, path);
        }
    }

    /// <summary>Runs an action and turns SQLite's errors into the record's.</summary>
    public static void Guard(string path, Action action) => Guard(path, () =>
    {
        action();
        return 0;
    });
}
