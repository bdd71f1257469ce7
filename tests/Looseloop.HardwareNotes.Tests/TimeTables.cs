using static Looseloop.HardwareNotes.Tests.MarkdownTable;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>How long coils ring, and how quick a detector must be.</summary>
internal static class TimeTables
{
    public static string RingTimes()
    {
        double[] qualities = [50, 100, 200, 400];
        var table = new MarkdownTable(["f0, kHz", .. qualities.Select(q => $"Q = {q}")]);
        foreach (double khz in (double[])[30, 65, 150, 300, 600])
        {
            table.Row(
            [
                Fixed(khz, 0),
                .. qualities.Select(q =>
                {
                    double ringUs = 1e6 * q / (Math.PI * khz * 1e3);
                    return $"{Fixed(ringUs, 0)} / {Fixed(ringUs / 5, 0)}";
                }),
            ]);
        }

        return table.ToString();
    }
}
