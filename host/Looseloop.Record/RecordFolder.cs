namespace Looseloop.Record;

/// <summary>Where the record stands when no file is named.</summary>
public static class RecordFolder
{
    /// <summary>The file's name.</summary>
    public const string FileName = "record.db";

    /// <summary>
    /// The default file: looseloop/record.db in XDG_DATA_HOME, or in ~/.local/share; on Windows in the local application data.
    /// </summary>
    public static string DefaultFile()
    {
        string? data = OperatingSystem.IsWindows() ? null : Environment.GetEnvironmentVariable("XDG_DATA_HOME");
        if (string.IsNullOrEmpty(data) || !Path.IsPathRooted(data))
        {
            data = OperatingSystem.IsWindows()
                ? Environment.GetFolderPath(Environment.SpecialFolder.LocalApplicationData)
                : Path.Combine(Environment.GetFolderPath(Environment.SpecialFolder.UserProfile), ".local", "share");
        }

        return Path.Combine(data, "looseloop", FileName);
    }
}
