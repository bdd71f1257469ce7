namespace Looseloop.Coil;

/// <summary>The word that was probably meant (edit distance; V. Levenshtein, 1966).</summary>
internal static class Spelling
{
    public static string? Nearest(string word, IEnumerable<string> known)
    {
        (string Word, int Distance) best = known.Select(k => (k, Distance(word, k))).OrderBy(p => p.Item2).FirstOrDefault(("", int.MaxValue));
        return best.Distance <= Math.Max(2, word.Length / 3) ? best.Word : null;
    }

    private static int Distance(string a, string b)
    {
        int[] row = [.. Enumerable.Range(0, b.Length + 1)];
        for (int i = 1; i <= a.Length; i++)
        {
            int diagonal = row[0];
            row[0] = i;
            for (int j = 1; j <= b.Length; j++)
            {
                int above = row[j];
                row[j] = Math.Min(Math.Min(row[j] + 1, row[j - 1] + 1), diagonal + (a[i - 1] == b[j - 1] ? 0 : 1));
                diagonal = above;
            }
        }

        return row[b.Length];
    }
}
