using System.Reflection;
using Looseloop.Bench.Files;

namespace Looseloop.Bench;

/// <summary>Where worlds come from: those that ship with the program, by short name, and anybody's own files.</summary>
public static class WorldShelf
{
    /// <summary>The world that is used when none is named.</summary>
    public const string Default = "wren";

    private const string Ending = ".toml";

    /// <summary>The short names of the worlds that ship with the program, in order.</summary>
    public static IReadOnlyList<string> Names { get; } =
    [
        .. Assembly.GetExecutingAssembly().GetManifestResourceNames()
            .Where(name => name.EndsWith(Ending, StringComparison.Ordinal))
            .Select(name => name[..^Ending.Length])
            .Order(StringComparer.Ordinal),
    ];

    /// <summary>Reads a world by its short name or from a file.</summary>
    /// <param name="nameOrPath">A short name, or the path of a TOML file; empty: the default world.</param>
    /// <exception cref="WorldFileException">There is no such world, or its file cannot be used. The message says which and why.</exception>
    public static World Load(string nameOrPath)
    {
        string wanted = nameOrPath.Length == 0 ? Default : nameOrPath;
        if (Names.Contains(wanted))
        {
            return WorldFile.Read(wanted + Ending, wanted, TextOf(wanted));
        }

        if (!File.Exists(wanted))
        {
            string what = wanted.EndsWith(Ending, StringComparison.OrdinalIgnoreCase) ? $"There is no file '{wanted}'" : $"There is no world '{wanted}'";
            throw new WorldFileException($"{what}. Worlds that ship with the program: {string.Join(", ", Names)}.");
        }

        try
        {
            return WorldFile.Read(wanted, Path.GetFileNameWithoutExtension(wanted), File.ReadAllText(wanted));
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw new WorldFileException($"The world '{wanted}' cannot be read: {e.Message}", e);
        }
    }

    /// <summary>The text of a world's file, comments and all, as a start for one's own.</summary>
    /// <param name="name">A short name from <see cref="Names"/>.</param>
    public static string TextOf(string name)
    {
        using Stream stream = Assembly.GetExecutingAssembly().GetManifestResourceStream(name + Ending)
            ?? throw new WorldFileException($"There is no world '{name}'. Worlds that ship with the program: {string.Join(", ", Names)}.");
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
