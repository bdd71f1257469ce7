using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Checks;

/// <summary>Whether the curve is that of one resonance with a constant feed-through, seen by enough points.</summary>
public static class CurveCheck
{
    /// <summary>A measured reading is held to more than a bare table: its budget relies on these.</summary>
    private static readonly VerdictLimits _limits = new()
    {
        FeedThroughRatio = 0.35,
        EdgeBandwidths = 1,
        QRelative = 0.05,

        // The points were placed by design; what they determine shows in the uncertainty of Q.
        PointsInside = 1,
        NegligibleResidual = 0.0015,
    };

    public static IEnumerable<Reason> Reasons(Measurement measurement) =>
        FitVerdict.Judge([.. measurement.FitPoints], measurement.Fit, [.. measurement.Residuals], _limits).Reasons;
}
