namespace Looseloop.Tests;

/// <summary>Where the sources stand.</summary>
internal static class Repository
{
    public static string Root { get; } = Find();

    private static string Find()
    {
        for (string? folder = AppContext.BaseDirectory; folder is not null; folder = Path.GetDirectoryName(folder))
        {
            if (File.Exists(Path.Combine(folder, "shared-protocol", "Protocol.cs")))
            {
                return folder;
            }
        }

        throw new DirectoryNotFoundException("no shared-protocol/Protocol.cs above " + AppContext.BaseDirectory);
    }
}
