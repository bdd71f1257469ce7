using System.Reflection;

namespace Looseloop.Coil;

/// <summary>Coil files that come with the program, to begin from.</summary>
public static class CoilExamples
{
    /// <summary>Their names.</summary>
    public static IReadOnlyList<string> Names { get; } = ["foyer", "classroom", "stage"];

    /// <summary>The text of one, or null where there is none of that name.</summary>
    public static string? Text(string name)
    {
        using Stream? stream = Names.Contains(name)
            ? Assembly.GetExecutingAssembly().GetManifestResourceStream(name + ".toml")
            : null;
        if (stream is null)
        {
            return null;
        }

        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
