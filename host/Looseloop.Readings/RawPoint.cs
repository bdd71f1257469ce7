namespace Looseloop.Readings;

/// <summary>What the box measured at one setting, in raw counts of its converter.</summary>
/// <param name="Setting">Where the drive stood.</param>
/// <param name="Samples">How many samples, 1 or more.</param>
/// <param name="Sum">Their sum.</param>
/// <param name="SumSquares">The sum of their squares, or null where a packed survey left it out.</param>
/// <param name="Min">The smallest.</param>
/// <param name="Max">The largest.</param>
/// <param name="BoardTimeUs">Board time at the middle of the samples, microseconds since the board started.</param>
public readonly record struct RawPoint(
    Setting Setting, int Samples, long Sum, long? SumSquares, int Min, int Max, long BoardTimeUs)
{
    /// <summary>The mean, counts.</summary>
    public double Mean => (double)Sum / Samples;

    /// <summary>
    /// The variance of one sample, counts squared, never below that of the quantisation (1/12). NaN where it is unknown:
    /// fewer than two samples, or none of the squares sent.
    /// </summary>
    public double SampleVariance => SampleStatistics.Variance(Samples, Sum, SumSquares);

    /// <summary>The variance of the mean, counts squared, by the point's own scatter; NaN where that is unknown.</summary>
    public double MeanVariance => SampleVariance / Samples;
}
