namespace Looseloop.Drift;

/// <summary>Allan deviations of a series over averaging times in octaves.</summary>
/// <param name="Points">Rising averaging times; empty where fewer than 5 readings follow each other evenly.</param>
/// <param name="SpacingS">The spacing of readings, seconds.</param>
/// <param name="Used">How many readings: the longest stretch that is evenly spaced.</param>
/// <param name="DriftRemoved">True where a warm-up was taken off first.</param>
public sealed record Stability(IReadOnlyList<StabilityPoint> Points, double SpacingS, int Used, bool DriftRemoved)
{
    /// <summary>A spacing off by more than this part of the median ends a stretch: the deviations need even spacing.</summary>
    public const double SpacingTolerance = 0.25;

    /// <summary>Works out the deviations, of what is left after <paramref name="model"/> where one is given.</summary>
    public static Stability Of(DriftSeries series, WarmUpModel? model)
    {
        bool remove = model is { Terms.Count: > 0 };
        if (series.Count < 5)
        {
            return new Stability([], double.NaN, series.Count, remove);
        }

        double spacing = Spacing(series.TimeS);
        (int from, int count) = LongestStretch(series.TimeS, spacing);
        if (count < 5)
        {
            return new Stability([], spacing, count, remove);
        }

        spacing = (series.TimeS[from + count - 1] - series.TimeS[from]) / (count - 1);
        double mean = 0;
        for (int i = from; i < from + count; i++)
        {
            mean += series.Value[i] / count;
        }

        double[] fractional = new double[count];
        for (int i = 0; i < count; i++)
        {
            double expected = remove ? model!.At(series.TimeS[from + i]) : mean;
            fractional[i] = (series.Value[from + i] - expected) / mean;
        }

        double[] phase = AllanDeviation.Phase(fractional, spacing);
        List<StabilityPoint> points = [];
        for (int m = 1; 2 * m < phase.Length; m *= 2)
        {
            int pairs = Math.Max(1, ((phase.Length - 1) / m) - 1);
            points.Add(new StabilityPoint(
                m * spacing, m, AllanDeviation.Overlapping(phase, m, spacing), AllanDeviation.Modified(phase, m, spacing),
                AllanDeviation.Total(phase, m, spacing), 1 / Math.Sqrt(pairs)));
        }

        return new Stability(points, spacing, count, remove);
    }

    private static double Spacing(ReadOnlySpan<double> timeS)
    {
        double[] spacing = new double[timeS.Length - 1];
        for (int i = 0; i < spacing.Length; i++)
        {
            spacing[i] = timeS[i + 1] - timeS[i];
        }

        Array.Sort(spacing);
        return spacing[spacing.Length / 2];
    }

    private static (int From, int Count) LongestStretch(ReadOnlySpan<double> timeS, double spacing)
    {
        int bestFrom = 0;
        int bestCount = 1;
        int from = 0;
        for (int i = 1; i < timeS.Length; i++)
        {
            if (Math.Abs(timeS[i] - timeS[i - 1] - spacing) > SpacingTolerance * spacing)
            {
                from = i;
            }

            if (i - from + 1 > bestCount)
            {
                bestFrom = from;
                bestCount = i - from + 1;
            }
        }

        return (bestFrom, bestCount);
    }
}
