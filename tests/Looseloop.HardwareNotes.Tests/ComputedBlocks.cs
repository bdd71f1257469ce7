using System.Text.RegularExpressions;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>
/// The parts of a page that a program writes: from a line <c>&lt;!-- computed: NAME --&gt;</c> to a line
/// <c>&lt;!-- end --&gt;</c>.
/// </summary>
internal static partial class ComputedBlocks
{
    public static IEnumerable<(string Name, string Text)> Read(string page)
    {
        foreach (Match match in Block().Matches(page))
        {
            yield return (match.Groups["name"].Value, match.Groups["text"].Value);
        }
    }

    public static string Replace(string page, Func<string, string> compute) =>
        Block().Replace(
            page,
            match => $"<!-- computed: {match.Groups["name"].Value} -->\n{compute(match.Groups["name"].Value)}<!-- end -->");

    [GeneratedRegex(@"<!-- computed: (?<name>[a-z-]+) -->\n(?<text>.*?)<!-- end -->", RegexOptions.Singleline)]
    private static partial Regex Block();
}
