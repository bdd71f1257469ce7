using Looseloop.Protocol;
using static Looseloop.HardwareNotes.Tests.MarkdownTable;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>What the boards' grid of settings can resolve.</summary>
internal static class GridTables
{
    /// <summary>The settings that a fit wants within five bandwidths either side.</summary>
    private const int Wanted = 13;

    private static readonly double[] _khz = [30, 40, 65, 100, 150, 200, 300, 400, 600];

    public static string Grid()
    {
        var table = new MarkdownTable(
            "f0, kHz",
            "step, Hz",
            "step, %",
            "Q: 13 settings within +-5 BW",
            "Q: 5 settings within +-5 BW",
            "Q: 13 with f0/3 and f0/5 as well");
        foreach (double khz in _khz)
        {
            double f0 = khz * 1e3;
            double step = StepHz(f0);
            table.Row(
                Fixed(khz, 0),
                Fixed(step, 0),
                Fixed(100 * step / f0, 3),
                $"{UsableQ(f0, Wanted, [1])}",
                $"{UsableQ(f0, 5, [1])}",
                $"{UsableQ(f0, Wanted, [1, 3, 5])}");
        }

        return table.ToString();
    }

    public static string Check()
    {
        var table = new MarkdownTable(
            "request, Hz", "duty bits, divider", "frequency, Hz", "count for 1/2", "count for 1/3", "its complement", "count for 1/5", "its complement");
        foreach (int request in (int[])[40000, 150000, 300000])
        {
            int bits = FrequencyGrid.DutyBits(request, FrequencyGrid.Esp32DutyBits);
            int divider = FrequencyGrid.Divider(request, bits);
            int steps = 1 << bits;
            int third = FrequencyGrid.DutyCount(1 / 3.0, bits);
            int fifth = FrequencyGrid.DutyCount(1 / 5.0, bits);
            table.Row(
                $"{request}",
                $"{bits}, {divider}",
                Fixed(FrequencyGrid.FrequencyHz(bits, divider), 2),
                $"{steps / 2} / {steps}",
                $"{third}",
                $"{steps - third}",
                $"{fifth}",
                $"{steps - fifth}");
        }

        return table.ToString();
    }

    /// <summary>
    /// The largest whole Q from 20 up at which at least <paramref name="count"/> settings, taken at the drive's named
    /// harmonics, fall within five bandwidths either side of f0 wherever f0 lies between two settings.
    /// </summary>
    internal static int UsableQ(double f0, int count, int[] harmonics)
    {
        double step = StepHz(f0);
        bool IsEnough(int q) =>
            Enumerable.Range(0, 20).Select(i => f0 + step * i / 20).All(
                at => harmonics.Sum(n => Settings(at * (1 - 5.0 / q) / n, at * (1 + 5.0 / q) / n)) >= count);

        // A larger Q has a narrower band inside the wider one: never more settings, so halving finds the last that is enough.
        int enough = 20;
        int tooMuch = 20000;
        while (tooMuch - enough > 1)
        {
            int middle = (enough + tooMuch) / 2;
            (enough, tooMuch) = IsEnough(middle) ? (middle, tooMuch) : (enough, middle);
        }

        return enough;
    }

    internal static double StepHz(double f0)
    {
        FrequencyGrid.Nearest(f0, FrequencyGrid.Esp32DutyBits, out int bits, out int divider);
        double from = FrequencyGrid.FrequencyHz(bits, divider);
        FrequencyGrid.StepUp(ref bits, ref divider, FrequencyGrid.Esp32DutyBits);
        return FrequencyGrid.FrequencyHz(bits, divider) - from;
    }

    private static int Settings(double lowHz, double highHz)
    {
        FrequencyGrid.Nearest(lowHz, FrequencyGrid.Esp32DutyBits, out int bits, out int divider);
        int count = 0;
        double at = FrequencyGrid.FrequencyHz(bits, divider);
        while (at <= highHz)
        {
            count += at >= Math.Max(lowHz, WireLimits.LowestHz) ? 1 : 0;
            FrequencyGrid.StepUp(ref bits, ref divider, FrequencyGrid.Esp32DutyBits);
            at = FrequencyGrid.FrequencyHz(bits, divider);
        }

        return count;
    }
}
