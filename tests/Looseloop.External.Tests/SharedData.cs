namespace Looseloop.External.Tests;

/// <summary>Published data that stand beside the repository, in a folder named "shared"; not everybody has them.</summary>
internal static class SharedData
{
    /// <summary>The folder of published data, or null where it is absent.</summary>
    public static string? Folder { get; } = Find();

    public static string File(params string[] parts) =>
        Path.Combine([Folder ?? throw new InvalidOperationException("no shared data"), .. parts]);

    private static string? Find()
    {
        for (DirectoryInfo? at = new(AppContext.BaseDirectory); at is not null; at = at.Parent)
        {
            string candidate = Path.Combine(at.FullName, "shared", "data");
            if (Directory.Exists(candidate))
            {
                return candidate;
            }
        }

        return null;
    }
}

/// <summary>A fact that needs the shared data, and says so where they are absent.</summary>
[AttributeUsage(AttributeTargets.Method)]
internal sealed class SharedFactAttribute : FactAttribute
{
    public SharedFactAttribute()
    {
        if (SharedData.Folder is null)
        {
            Skip = "the folder ../shared/data with the published data sets is absent";
        }
    }
}

/// <summary>A theory that needs the shared data, and says so where they are absent.</summary>
[AttributeUsage(AttributeTargets.Method)]
internal sealed class SharedTheoryAttribute : TheoryAttribute
{
    public SharedTheoryAttribute()
    {
        if (SharedData.Folder is null)
        {
            Skip = "the folder ../shared/data with the published data sets is absent";
        }
    }
}
