namespace Looseloop.Coil;

/// <summary>One line of a sweep over a dimension.</summary>
/// <param name="Value">In the dimension's unit.</param>
/// <param name="F1Hz">First resonance, hertz; NaN where the coil cannot be built.</param>
/// <param name="Problem">Why it cannot, or null.</param>
public sealed record SweepRow(double Value, double F1Hz, string? Problem);

/// <summary>f1 against any one dimension, and the value that gives a wanted f1.</summary>
public static class Targeting
{
    /// <summary>Tables f1 over a range of a dimension.</summary>
    /// <param name="dimension">Which.</param>
    /// <param name="from">First value, in its unit.</param>
    /// <param name="to">Last value.</param>
    /// <param name="step">Between two; at most 1000 rows.</param>
    /// <param name="resolution">Of the field model.</param>
    public static IReadOnlyList<SweepRow> Sweep(Dimension dimension, double from, double to, double step, Resolution resolution)
    {
        Demand.Within(from, -1e6, 1e6, "the first value", dimension.Unit);
        Demand.Within(to, from, 1e6, "the last value", dimension.Unit);
        Demand.Within(step, 1e-9, 1e6, "the step", dimension.Unit);
        int count = (int)Demand.Within(Math.Floor(((to - from) / step) + 1e-9) + 1, 1, 1000, "number of rows", "");
        var rows = new SweepRow[count];
        for (int i = 0; i < count; i++)
        {
            double value = from + (i * step);
            CoilGeometry coil = dimension.With(value);
            IReadOnlyList<GeometryProblem> problems = GeometryCheck.Problems(coil);
            rows[i] = problems.Count > 0
                ? new SweepRow(value, double.NaN, problems[0].Text)
                : new SweepRow(value, Expectations.F1Hz(coil, resolution), null);
        }

        return rows;
    }

    /// <summary>The value nearest to the present one that gives a wanted f1; null where none within the bounds does.</summary>
    /// <param name="dimension">Which.</param>
    /// <param name="wantedHz">Wanted f1.</param>
    /// <param name="low">Lower bound, in its unit.</param>
    /// <param name="high">Upper bound.</param>
    /// <param name="resolution">Of the field model.</param>
    public static double? Find(Dimension dimension, double wantedHz, double low, double high, Resolution resolution)
    {
        Demand.Frequency(wantedHz, "the wanted f1");
        Demand.Within(low, -1e6, 1e6, "the lower bound", dimension.Unit);
        Demand.Within(high, low, 1e6, "the upper bound", dimension.Unit);
        double Miss(double value)
        {
            CoilGeometry coil = dimension.With(value);
            return GeometryCheck.Problems(coil).Count > 0 ? double.NaN : Expectations.F1Hz(coil, resolution) - wantedHz;
        }

        // f1 need not be monotonic over a wide range: look outwards from the present value, piece by piece.
        const int Pieces = 12;
        double start = Math.Clamp(dimension.Value, low, high);
        double middle = Miss(start);
        double? best = null;
        foreach (double end in (ReadOnlySpan<double>)[low, high])
        {
            double a = start;
            double fa = middle;
            for (int i = 1; i <= Pieces && a != end; i++)
            {
                double b = start + ((end - start) * i / Pieces);
                double fb = Miss(b);
                if (double.IsNaN(fb) && !double.IsNaN(fa))
                {
                    (b, fb) = LastBuildable(Miss, a, b, fa);
                    i = Pieces;
                }

                if (fa * fb <= 0 && Root.Bracketed(Miss, a, b, 1e-7) is double root)
                {
                    best = best is double other && Math.Abs(other - start) <= Math.Abs(root - start) ? other : root;
                    break;
                }

                (a, fa) = (b, fb);
            }
        }

        return best;
    }

    // The edge of what can be built, by halving.
    private static (double Value, double Miss) LastBuildable(Func<double, double> miss, double good, double bad, double missGood)
    {
        for (int i = 0; i < 12; i++)
        {
            double middle = (good + bad) / 2;
            double m = miss(middle);
            (good, missGood, bad) = double.IsNaN(m) ? (good, missGood, middle) : (middle, m, bad);
        }

        return (good, missGood);
    }
}
