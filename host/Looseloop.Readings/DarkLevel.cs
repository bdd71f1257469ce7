namespace Looseloop.Readings;

/// <summary>The pickup with the drive off, raw counts.</summary>
/// <param name="Channel">0 detector, 1 direct, 2 thermistor.</param>
/// <param name="Samples">How many samples.</param>
/// <param name="Sum">Their sum.</param>
/// <param name="SumSquares">The sum of their squares.</param>
/// <param name="Min">The smallest.</param>
/// <param name="Max">The largest.</param>
/// <param name="FromUs">Board time of the begin, microseconds.</param>
/// <param name="ToUs">Board time of the end, microseconds.</param>
public readonly record struct DarkLevel(
    int Channel, int Samples, long Sum, long SumSquares, int Min, int Max, long FromUs, long ToUs)
{
    /// <summary>The mean, counts.</summary>
    public double Mean => (double)Sum / Samples;

    /// <summary>The variance of one sample, counts squared, at least that of the quantisation; NaN for a single sample.</summary>
    public double SampleVariance => SampleStatistics.Variance(Samples, Sum, SumSquares);
}
