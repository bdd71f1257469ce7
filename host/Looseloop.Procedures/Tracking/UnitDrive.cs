using Looseloop.Resonance;

namespace Looseloop.Procedures.Tracking;

/// <summary>
/// Points as they would be at duty 1/2. Where the timer's duty bits change between two settings, so does the duty that
/// comes out: a step of some tenths of a per cent in amplitude that would pass for a shift of f0.
/// </summary>
internal static class UnitDrive
{
    /// <summary>The points that the drive's fundamental made, brought to drive weight 1.</summary>
    public static FitPoint[] Fundamental(IEnumerable<FitPoint> points) =>
    [
        .. points.Where(point => point.Group == 0).Select(point => point with
        {
            Amplitude = point.Amplitude / point.DriveWeight,
            Variance = point.Variance / (point.DriveWeight * point.DriveWeight),
            DriveWeight = 1,
        }),
    ];
}
