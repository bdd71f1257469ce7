namespace Looseloop.Bench;

/// <summary>The pickup: an antenna that couples to the coil's top, and a buffer.</summary>
public sealed record PickupAntenna
{
    /// <summary>Capacitance between the coil's top and the antenna, picofarad. What is picked up and the pull are both proportional to it.</summary>
    public double CouplingPf { get; init; } = 0.01;

    /// <summary>Capacitance from antenna and buffer to ground, picofarad: the other arm of the divider.</summary>
    public double InputPf { get; init; } = 12;

    /// <summary>Gain of the buffer, from antenna to detector.</summary>
    public double Gain { get; init; } = 25;

    /// <summary>Capacitance added to the coil for each picofarad of coupling.</summary>
    public double PullPfPerPf { get; init; } = 1;

    /// <summary>What the pickup responds to.</summary>
    public PickupSense Senses { get; init; } = PickupSense.Voltage;
}

/// <summary>What a pickup responds to.</summary>
public enum PickupSense
{
    /// <summary>The coil's voltage (its charge): an antenna.</summary>
    Voltage,

    /// <summary>The coil's current (the rate of its charge): a pickup loop in constant resistance. Tilts the curve by f.</summary>
    Current,
}
