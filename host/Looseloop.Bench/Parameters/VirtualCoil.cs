namespace Looseloop.Bench;

/// <summary>The coil with its top load, over its ground, with nothing of the instrument near it.</summary>
public sealed record VirtualCoil
{
    /// <summary>
    /// Inductance effective at the top terminal, millihenry. With the lowest mode's f0 it fixes the effective capacitance
    /// C = 1/((2 pi f0)^2 L) on which antennas, people and cables pull.
    /// </summary>
    public double InductanceMh { get; init; } = 45;

    /// <summary>The modes, the one called f0 first. At least one.</summary>
    public IReadOnlyList<CoilMode> Modes { get; init; } =
    [
        new(150_000, 200),
        new(418_000, 160) { LoopShare = 0.9, PickupShare = 0.5 },
        new(655_000, 130) { LoopShare = 0.8, PickupShare = 0.3 },
    ];
}

/// <summary>One mode of the coil: a resonator of its own.</summary>
/// <param name="F0Hz">Undamped resonant frequency |s|/(2 pi) of its pole s, hertz.</param>
/// <param name="Q">Quality factor |s|/(-2 Re s) of its pole.</param>
public sealed record CoilMode(double F0Hz, double Q)
{
    /// <summary>Its coupling to the loop, as a share of <see cref="DriveLoop.Coupling"/>; may be negative.</summary>
    public double LoopShare { get; init; } = 1;

    /// <summary>What its charge gives at the pickup, as a share of what the first mode's gives; may be negative.</summary>
    public double PickupShare { get; init; } = 1;

    /// <summary>How far a capacitance at the top pulls it, as a share of how far it pulls the first mode.</summary>
    public double TopShare { get; init; } = 1;
}
