using System.Globalization;

namespace Looseloop.Report.Plots;

/// <summary>Round values along an axis: steps of 1, 2 or 5 times a power of ten, with as many decimals as the step needs.</summary>
public sealed record AxisTicks(IReadOnlyList<double> Values, IReadOnlyList<string> Labels)
{
    /// <summary>Ticks within a range, at most <paramref name="most"/> of them where that is two or more.</summary>
    public static AxisTicks Of(double low, double high, int most)
    {
        double rough = (high - low) / Math.Max(1, most);
        double power = Math.Pow(10, Math.Floor(Math.Log10(rough)));
        double step = rough <= power ? power : rough <= 2 * power ? 2 * power : rough <= 5 * power ? 5 * power : 10 * power;
        int decimals = (int)Math.Clamp(-Math.Floor(Math.Log10(step * 1.000001)), 0, 15);
        List<double> values = [];
        List<string> labels = [];
        for (double n = Math.Ceiling((low / step) - 1e-9); n * step <= high + (1e-9 * step) && values.Count < 1000; n++)
        {
            // Zero times anything is zero, not "-0".
            double value = n == 0 ? 0 : n * step;
            values.Add(value);
            labels.Add(value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture));
        }

        return new AxisTicks(values, labels);
    }
}
