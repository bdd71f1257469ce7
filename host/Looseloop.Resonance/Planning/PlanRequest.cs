using Looseloop.Readings;

namespace Looseloop.Resonance;

/// <summary>What a plan is made for.</summary>
public sealed record PlanRequest
{
    /// <summary>What is thought of the curve.</summary>
    public required CurveEstimate Estimate { get; init; }

    /// <summary>Standard uncertainty of the estimate's f0, hertz; the plan is to do well over it.</summary>
    public double F0StandardHz { get; init; }

    /// <summary>Relative standard uncertainty of the estimate's Q.</summary>
    public double QRelativeStandard { get; init; }

    /// <summary>Noise of one sample, over the peak amplitude at drive weight 1.</summary>
    public required NoiseLaw Noise { get; init; }

    /// <summary>
    /// Settings near f0, each with the duty it is to be driven with. The drive weight comes from the true duty.
    /// </summary>
    public required IReadOnlyList<Setting> Fundamental { get; init; }

    /// <summary>Settings near f0/3; empty where no vernier is wanted (a detector that does not respond to power).</summary>
    public IReadOnlyList<Setting> Third { get; init; } = [];

    /// <summary>Settings near f0/5; or empty.</summary>
    public IReadOnlyList<Setting> Fifth { get; init; } = [];

    /// <summary>The detector's time constant, seconds.</summary>
    public double DetectorTimeS { get; init; }

    /// <summary>Time that one sample takes, seconds.</summary>
    public required double SampleS { get; init; }

    /// <summary>Time that a point takes beside dwell and samples, seconds.</summary>
    public double PointS { get; init; }

    /// <summary>Time on air for the whole sweep, seconds.</summary>
    public required double TimeS { get; init; }

    /// <summary>Weight of the variance of f0 in bandwidths.</summary>
    public double F0Weight { get; init; } = 1;

    /// <summary>Weight of the relative variance of Q.</summary>
    public double QWeight { get; init; } = 1;

    /// <summary>A harmonic is taken in only if it lowers the weighted standard uncertainty by this part.</summary>
    public double VernierMargin { get; init; } = 0.2;

    /// <summary>Settings farther from f0 are not used, bandwidths, unless there are too few.</summary>
    public double ReachBandwidths { get; init; } = 8;

    /// <summary>No point gets fewer samples at one visit.</summary>
    public int LeastSamples { get; init; } = 4;
}
