namespace Looseloop.Drift.Comparison;

/// <summary>What a comparison is asked.</summary>
public sealed record CompareOptions
{
    /// <summary>Loop, pickup, cable and people stayed where they were between the readings.</summary>
    public bool Untouched { get; init; } = true;

    /// <summary>
    /// The smallest change of f0 that matters, in bandwidths. A tenth of one costs 2 % of amplitude (exact: |H| at a tenth of
    /// a bandwidth is 1/sqrt(1.04)).
    /// </summary>
    public double MarginBandwidths { get; init; } = 0.1;

    /// <summary>The smallest relative change of Q that matters (common practice, no source).</summary>
    public double MarginQ { get; init; } = 0.05;

    /// <summary>
    /// Q fallen by more than this part, beyond its uncertainty, makes the winding suspect (common practice, no source).
    /// </summary>
    public double SuspectQ { get; init; } = 0.15;
}
