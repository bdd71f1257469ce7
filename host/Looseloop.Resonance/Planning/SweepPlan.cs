namespace Looseloop.Resonance;

/// <summary>A sweep that was designed.</summary>
/// <param name="Points">All visits, there and back the same way, so that a steady drift cancels.</param>
/// <param name="F0Bandwidths">Expected standard uncertainty of f0 from noise, bandwidths.</param>
/// <param name="QRelative">Expected relative standard uncertainty of Q from noise.</param>
/// <param name="TimeS">Expected time on air, seconds.</param>
public sealed record SweepPlan(IReadOnlyList<PlannedPoint> Points, double F0Bandwidths, double QRelative, double TimeS)
{
    /// <summary>True if settings near f0/3 or f0/5 are among them.</summary>
    public bool UsesVernier => Points.Any(point => point.Harmonic > 1);
}
