using System.Text.RegularExpressions;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>The pages themselves.</summary>
public sealed partial class PagesTests
{
    /// <summary>
    /// Each computed part must be what the program computes today. After a change run this project once with
    /// LOOSELOOP_WRITE_NOTES=1: that writes them, and the change shows in the diff.
    /// </summary>
    [Fact]
    public void Every_computed_table_is_what_the_program_computes()
    {
        bool write = Environment.GetEnvironmentVariable("LOOSELOOP_WRITE_NOTES") == "1";
        var seen = new HashSet<string>(StringComparer.Ordinal);
        foreach (string path in NotesFolder.Pages())
        {
            string page = File.ReadAllText(path);
            if (write)
            {
                File.WriteAllText(path, page = ComputedBlocks.Replace(page, ComputedTables.Compute));
            }

            foreach ((string name, string text) in ComputedBlocks.Read(page))
            {
                Assert.True(ComputedTables.Compute(name) == text, $"{Path.GetFileName(path)}, {name}: not what is computed");
                seen.Add(name);
            }
        }

        Assert.Equal(ComputedTables.Names.Order(StringComparer.Ordinal), seen.Order(StringComparer.Ordinal));
    }

    [Fact]
    public void The_index_names_every_page_and_every_link_leads_somewhere()
    {
        string index = File.ReadAllText(NotesFolder.File("README.md"));
        foreach (string path in NotesFolder.Pages())
        {
            string name = Path.GetFileName(path);
            Assert.True(name == "README.md" || index.Contains($"({name})", StringComparison.Ordinal), $"{name} is not in the index");
            foreach (Match link in Link().Matches(File.ReadAllText(path)))
            {
                string target = NotesFolder.File(link.Groups["target"].Value);
                Assert.True(File.Exists(target) || Directory.Exists(target), $"{name}: {link.Value} leads nowhere");
            }
        }
    }

    [Fact]
    public void Every_page_says_what_was_not_tried()
    {
        foreach (string path in NotesFolder.Pages())
        {
            Assert.True(
                File.ReadAllText(path).Contains("tried on a real board", StringComparison.Ordinal),
                $"{Path.GetFileName(path)} does not say whether it was tried on a real board");
        }
    }

    [Fact]
    public void The_cautions_are_in_the_index()
    {
        string index = File.ReadAllText(NotesFolder.File("README.md"));
        foreach (string word in (string[])["not energised", "locked out", "discharged", "pacemaker", "competent person", "no proof"])
        {
            Assert.Contains(word, index, StringComparison.Ordinal);
        }
    }

    [GeneratedRegex(@"\]\((?<target>[^)#:]+)(#[^)]*)?\)")]
    private static partial Regex Link();
}
