namespace Looseloop.HardwareNotes.Tests;

/// <summary>The pages under test, found by walking up from the test assembly.</summary>
internal static class NotesFolder
{
    public static string Path { get; } = Find();

    public static IEnumerable<string> Pages() => Directory.GetFiles(Path, "*.md").Order(StringComparer.Ordinal);

    public static string File(string name) => System.IO.Path.Combine(Path, name);

    private static string Find()
    {
        for (DirectoryInfo? at = new(AppContext.BaseDirectory); at is not null; at = at.Parent)
        {
            string candidate = System.IO.Path.Combine(at.FullName, "hardware-notes");
            if (Directory.Exists(candidate) && Directory.Exists(System.IO.Path.Combine(at.FullName, "shared-protocol")))
            {
                return candidate;
            }
        }

        throw new DirectoryNotFoundException("hardware-notes was not found above the test assembly.");
    }
}
