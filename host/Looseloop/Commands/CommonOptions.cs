using System.CommandLine;

namespace Looseloop.Commands;

/// <summary>The options that every command takes.</summary>
internal static class CommonOptions
{
    public static readonly Option<bool> Json = new("--json")
    {
        Description = "Print one JSON object (a line each for a log) instead of text.",
        Recursive = true,
    };

    public static readonly Option<bool> Quiet = new("--quiet")
    {
        Description = "No progress and no hints on the error stream.",
        Recursive = true,
    };

    public static IEnumerable<Option> All => [Json, Quiet];
}
