namespace Looseloop.Bench;

/// <summary>What reaches the pickup from the loop directly, without the coil.</summary>
public sealed record FeedThrough
{
    /// <summary>Its amplitude at f0, as a fraction of the coil's own peak there.</summary>
    public double Fraction { get; init; } = 0.02;

    /// <summary>Its phase at f0 against the coil's response at its peak, degrees.</summary>
    public double PhaseDeg { get; init; } = 60;

    /// <summary>How it changes over frequency.</summary>
    public FeedThroughTransfer Transfer { get; init; } = FeedThroughTransfer.Flat;

    /// <summary>The corner of <see cref="FeedThroughTransfer.Pole"/>, hertz.</summary>
    public double PoleHz { get; init; } = 400_000;
}

/// <summary>How the feed-through changes over frequency. All agree at f0.</summary>
public enum FeedThroughTransfer
{
    /// <summary>Amplitude and phase are the same at every frequency.</summary>
    Flat,

    /// <summary>Proportional to frequency: capacitive from a loop of constant voltage.</summary>
    Rising,

    /// <summary>One pole: 1/(1 + j f/f_pole).</summary>
    Pole,
}
