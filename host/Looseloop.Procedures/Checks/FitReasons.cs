using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Checks;

/// <summary>Why a fit gave no figures.</summary>
public static class FitReasons
{
    /// <summary>The reason behind a fit that is not <see cref="FitOutcome.Fitted"/>.</summary>
    public static Reason WhyNot(FitOutcome outcome, bool saturated) => outcome switch
    {
        _ when saturated => new Reason(ReasonCode.Saturated, "The converter is at its upper end even at the lowest duty."),
        FitOutcome.TooFewPoints => new Reason(ReasonCode.TooFewPoints, "There are fewer points than f0, Q and the feed-through need."),
        FitOutcome.NoPeak => new Reason(ReasonCode.NoPeak, "The points are as well explained by a constant level."),
        FitOutcome.PeakOutside => new Reason(ReasonCode.PeakAtEdge, "The best curve has its peak outside the points."),
        _ => new Reason(ReasonCode.FitFailed, "No curve of a resonance explains the points."),
    };
}
