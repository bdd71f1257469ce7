using Looseloop.Readings;

namespace Looseloop.Procedures.Ladder;

/// <summary>What a ladder measured: the same frequency at many duties, and the dark.</summary>
/// <param name="Points">The rungs, in the order they were taken; none saturated.</param>
/// <param name="DarkCounts">Mean raw counts with the drive off, before and after.</param>
/// <param name="Harmonics">What is known of the answers to the harmonics.</param>
public sealed record LadderRungs(IReadOnlyList<RawPoint> Points, double DarkCounts, HarmonicPowers Harmonics)
{
    /// <summary>Samples share their slower disturbances; a mean of many is not better than this, counts.</summary>
    private const double LeastSigma = 0.05;

    /// <summary>Standard uncertainty of each rung's mean, counts.</summary>
    public IReadOnlyList<double> Sigmas { get; } = [.. Points.Select(Sigma)];

    private static double Sigma(RawPoint point)
    {
        double own = point.SampleVariance;
        double variance = double.IsNaN(own) ? SampleStatistics.QuantisationVariance : own;

        // Rounding averages out only where the scatter is at least half a count (Widrow and Kollar, Quantization Noise, 2008).
        double rounding = variance < 0.3 ? SampleStatistics.QuantisationVariance : 0;
        return Math.Sqrt((variance / point.Samples) + rounding + (LeastSigma * LeastSigma));
    }
}

/// <summary>
/// Power of the answer to each harmonic over that to the fundamental, for equal drive at either, with standard
/// uncertainties: measured at the harmonics' own frequencies.
/// </summary>
/// <param name="Second">Of the second.</param>
/// <param name="SecondStandard">Its standard uncertainty.</param>
/// <param name="Third">Of the third.</param>
/// <param name="ThirdStandard">Its standard uncertainty.</param>
/// <param name="Fourth">Of the fourth.</param>
/// <param name="FourthStandard">Its standard uncertainty.</param>
/// <param name="Higher">Of all above it, taken as alike.</param>
/// <param name="HigherStandard">Its standard uncertainty.</param>
public readonly record struct HarmonicPowers(
    double Second, double SecondStandard, double Third, double ThirdStandard, double Fourth, double FourthStandard,
    double Higher, double HigherStandard)
{
    /// <summary>Nothing is known: feed-through to 7 %.</summary>
    public static HarmonicPowers Unknown { get; } = new(0, 0.005, 0, 0.005, 0, 0.005, 0, 0.005);
}
