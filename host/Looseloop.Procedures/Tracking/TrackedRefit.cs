using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Tracking;

/// <summary>The points of a tracked reading on a curve, without the box and the state of the tracker that took them.</summary>
internal static class TrackedRefit
{
    /// <summary>f0 and Q by the points, or null where they do not lie on the curve.</summary>
    public static TrackedFit? On(TrackBasis basis, IReadOnlyList<RawPoint> raw)
    {
        FitPoint[] points = UnitDrive.Fundamental(CurveSweep.FitPoints(raw, basis.Maker));
        if (points.Length == 0 || CurveInversion.Invert(basis.Curve, points) is not { } fit)
        {
            return null;
        }

        bool within = fit.F0Hz >= points.Min(point => point.FrequencyHz) && fit.F0Hz <= points.Max(point => point.FrequencyHz);
        return within && basis.Judge(fit, points) == TrackEnd.None ? fit : null;
    }
}
