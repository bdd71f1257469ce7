using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Checks;

/// <summary>Whether the curve is that of one resonance with a constant feed-through, seen by enough points.</summary>
public static class CurveCheck
{
    private const double LargestFeedThrough = 0.35;

    /// <summary>A misfit this small, of the peak, moves f0 and Q by less than the budget allows.</summary>
    private const double HarmlessResidual = 0.0015;

    private const double LeastProbability = 1e-4;
    private const double LargestQUncertainty = 0.05;

    public static IEnumerable<Reason> Reasons(Measurement measurement)
    {
        ResonanceFit fit = measurement.Fit;
        double low = measurement.FitPoints.Min(point => point.FrequencyHz);
        double high = measurement.FitPoints.Max(point => point.FrequencyHz);
        if (fit.F0Hz - low < fit.BandwidthHz || high - fit.F0Hz < fit.BandwidthHz)
        {
            yield return new Reason(ReasonCode.PeakAtEdge, $"The peak lies within a bandwidth of the edge of the points ({low / 1000:0.0} to {high / 1000:0.0} kHz).");
        }

        if (fit.FeedThrough.Ratio > LargestFeedThrough)
        {
            yield return new Reason(ReasonCode.FeedThroughLarge, $"Feed-through is {fit.FeedThrough.Ratio:P0} of the peak.");
        }

        if (fit.ChiSquareProbability < LeastProbability && fit.ResidualRatio > HarmlessResidual)
        {
            yield return new Reason(
                ReasonCode.ResidualTooLarge,
                $"The points stray from the curve by {fit.ResidualRatio:P2} of the peak, {Math.Sqrt(fit.SumOfSquares / fit.DegreesOfFreedom):0.0} times their noise.");
        }

        if (fit.QRelativeStandard > LargestQUncertainty)
        {
            yield return new Reason(ReasonCode.GridTooCoarse, $"Noise alone leaves Q uncertain by {fit.QRelativeStandard:P1}: too few settings inside the curve.");
        }
    }
}
