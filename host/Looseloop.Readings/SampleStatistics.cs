namespace Looseloop.Readings;

/// <summary>Statistics of raw samples from their sums.</summary>
public static class SampleStatistics
{
    /// <summary>Variance of rounding to whole counts, counts squared: a converter that shows no scatter still has this.</summary>
    public const double QuantisationVariance = 1.0 / 12.0;

    /// <summary>The variance of one sample, counts squared, never below <see cref="QuantisationVariance"/>; NaN where unknown.</summary>
    public static double Variance(int samples, long sum, long? sumSquares)
    {
        if (samples < 2 || sumSquares is not long squares)
        {
            return double.NaN;
        }

        // n*squares - sum^2 is exact in 128 bits; in doubles it would cancel.
        Int128 scatter = ((Int128)samples * squares) - ((Int128)sum * sum);
        double variance = (double)scatter / ((double)samples * (samples - 1));
        return Math.Max(variance, QuantisationVariance);
    }
}
