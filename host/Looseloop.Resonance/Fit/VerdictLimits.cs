namespace Looseloop.Resonance;

/// <summary>Where a fit stops being good enough. The defaults are common practice, no source.</summary>
public sealed record VerdictLimits
{
    /// <summary>Feed-through over peak amplitude.</summary>
    public double FeedThroughRatio { get; init; } = 0.3;

    /// <summary>Bandwidths that the points must reach beyond f0 on either side.</summary>
    public double EdgeBandwidths { get; init; } = 0.5;

    /// <summary>Relative standard uncertainty of Q.</summary>
    public double QRelative { get; init; } = 0.1;

    /// <summary>Different frequencies within one bandwidth of f0, either side.</summary>
    public int PointsInside { get; init; } = 2;

    /// <summary>Probability of the scatter below which it is no longer the stated noise.</summary>
    public double ChiSquareProbability { get; init; } = 1e-4;

    /// <summary>Residual over peak amplitude that is too small to matter even where it is significant.</summary>
    public double NegligibleResidual { get; init; } = 0.002;

    /// <summary>Residual over peak amplitude that is too large whatever the noise may be, where none was stated.</summary>
    public double LargeResidual { get; init; } = 0.03;

    /// <summary>How many standard deviations the residuals of neighbours may follow one another.</summary>
    public double ResidualOrder { get; init; } = 4;
}
