using System.Text.RegularExpressions;

namespace Looseloop.CommandLine.Tests;

/// <summary>The page and the command go through the same steps in the same order.</summary>
public sealed partial class CommissioningPageTests
{
    [Fact]
    public void The_page_has_a_section_for_each_step_of_the_command_in_order()
    {
        string page = File.ReadAllText(Find());
        string[] sections = [.. Heading().Matches(page).Select(match => match.Groups["number"].Value + " " + match.Groups["step"].Value)];
        AppRun run = AppRun.Of("commission", "--box", "bench:wren", "--only", "nothing");
        string named = run.Error[(run.Error.IndexOf("The steps are ", StringComparison.Ordinal) + 14)..].Split('.')[0];
        Assert.Equal(named.Split(", ").Select((step, i) => $"{i + 1} {step}"), sections);
        Assert.Equal(9, sections.Length);
    }

    private static string Find()
    {
        for (DirectoryInfo? at = new(AppContext.BaseDirectory); at is not null; at = at.Parent)
        {
            string candidate = Path.Combine(at.FullName, "hardware-notes", "commissioning.md");
            if (File.Exists(candidate))
            {
                return candidate;
            }
        }

        throw new FileNotFoundException("hardware-notes/commissioning.md was not found above the test assembly.");
    }

    [GeneratedRegex(@"^## (?<number>\d+)\. .*\(`(?<step>[a-z-]+)`\)$", RegexOptions.Multiline)]
    private static partial Regex Heading();
}
