using Looseloop.Coil;
using Looseloop.Terminal;

namespace Looseloop.Coils;

/// <summary>Where coil files stand: the user's own folder, any path, and the examples that come with the program.</summary>
internal sealed class CoilShelf(Shell shell)
{
    private const string Extension = ".toml";

    /// <summary>looseloop/coils in XDG_DATA_HOME, or in ~/.local/share; on Windows in the local application data.</summary>
    public string Folder
    {
        get
        {
            string? data = OperatingSystem.IsWindows() ? null : shell.Environment("XDG_DATA_HOME");
            if (string.IsNullOrEmpty(data) || !Path.IsPathRooted(data))
            {
                data = OperatingSystem.IsWindows()
                    ? System.Environment.GetFolderPath(System.Environment.SpecialFolder.LocalApplicationData)
                    : Path.Combine(shell.Environment("HOME") ?? System.Environment.GetFolderPath(System.Environment.SpecialFolder.UserProfile), ".local", "share");
            }

            return Path.Combine(data, "looseloop", "coils");
        }
    }

    /// <summary>The user's own coils by name, sorted.</summary>
    public IReadOnlyList<string> Names() => Directory.Exists(Folder)
        ? [.. Directory.EnumerateFiles(Folder, "*" + Extension).Select(f => Path.GetFileNameWithoutExtension(f)).Order(StringComparer.OrdinalIgnoreCase)]
        : [];

    /// <summary>The file a new coil of that name goes to.</summary>
    public string FileFor(string name) => Path.Combine(Folder, name + Extension);

    /// <summary>The text of a coil and where it was found: a path, the user's folder, or an example.</summary>
    /// <exception cref="UserError">There is none.</exception>
    public (string Text, string Place) Find(string nameOrPath)
    {
        bool isPath = nameOrPath.Contains(Path.DirectorySeparatorChar, StringComparison.Ordinal)
            || nameOrPath.EndsWith(Extension, StringComparison.OrdinalIgnoreCase);
        string file = isPath ? nameOrPath : FileFor(nameOrPath);
        if (Directory.Exists(file))
        {
            throw new UserError($"{file} is a folder, not a coil file.");
        }

        if (File.Exists(file))
        {
            return (File.ReadAllText(file), file);
        }

        if (!isPath && CoilExamples.Text(nameOrPath) is string example)
        {
            return (example, "example");
        }

        throw new UserError(isPath
            ? $"There is no coil file {nameOrPath}."
            : $"There is no coil '{nameOrPath}' in {Folder}, and no example of that name. `looseloop coil list` shows them; `looseloop coil new {nameOrPath}` begins one.");
    }

    /// <summary>Reads a coil; every error of the file in one message, with its line.</summary>
    public CoilGeometry Load(string nameOrPath)
    {
        (string text, string place) = Find(nameOrPath);
        CoilFileResult result = CoilFile.Parse(text);
        return result.Coil ?? throw new UserError(
            $"{place} does not describe a coil that can be built:{string.Concat(result.Errors.Select(e => $"\n  {e}"))}");
    }
}
