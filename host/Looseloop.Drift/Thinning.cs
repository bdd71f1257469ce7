namespace Looseloop.Drift;

/// <summary>
/// A long series thinned to weighted means over blocks that grow with time: fine at the start, where a warm-up is fast. It
/// serves for starting values and for the choice of a model; the final fit takes every reading.
/// </summary>
internal static class Thinning
{
    /// <summary>The series itself where it is short, else about <paramref name="blocks"/> means of it.</summary>
    public static DriftSeries Of(DriftSeries series, int blocks)
    {
        if (series.Count <= 2 * blocks)
        {
            return series;
        }

        ReadOnlySpan<double> time = series.TimeS;
        ReadOnlySpan<double> value = series.Value;
        ReadOnlySpan<double> standard = series.Standard;
        double centre = value[0];
        int largest = 2 * series.Count / blocks;

        // Blocks grow by this part of the readings before them until they are of the largest size.
        double growth = 8.0 / blocks;
        List<DriftPoint> means = new(2 * blocks);
        int i = 0;
        while (i < series.Count)
        {
            int end = Math.Min(series.Count, i + Math.Clamp((int)(i * growth), 1, largest));
            double w = 0;
            double t = 0;
            double v = 0;
            for (; i < end; i++)
            {
                double weight = 1 / (standard[i] * standard[i]);
                w += weight;
                t += weight * (time[i] - time[0]);
                v += weight * (value[i] - centre);
            }

            means.Add(new DriftPoint(time[0] + (t / w), centre + (v / w), 1 / Math.Sqrt(w)));
        }

        return DriftSeries.Of(means);
    }
}
