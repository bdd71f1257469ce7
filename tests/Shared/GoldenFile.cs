using System.Text;
using System.Text.RegularExpressions;

namespace Looseloop.Tests;

/// <summary>Reads the files of shared-protocol/golden.</summary>
internal static partial class GoldenFile
{
    public static IEnumerable<string> Rows(string name)
    {
        string path = Path.Combine(Repository.Root, "shared-protocol", "golden", name);
        return File.ReadAllLines(path).Where(row => row.Length > 0 && row[0] != '#');
    }

    /// <summary>The word before the first space, and what stands behind it.</summary>
    public static (string Verdict, string Line) Split(string row)
    {
        int space = row.IndexOf(' ', StringComparison.Ordinal);
        return (row[..space], row[(space + 1)..]);
    }

    public static byte[] Bytes(string line)
    {
        string plain = Escape().Replace(line, match => ((char)Convert.ToByte(match.Groups[1].Value, 16)).ToString());
        return Encoding.Latin1.GetBytes(plain);
    }

    [GeneratedRegex(@"\\x([0-9A-F]{2})")]
    private static partial Regex Escape();
}
