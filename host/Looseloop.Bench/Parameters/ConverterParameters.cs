namespace Looseloop.Bench;

/// <summary>The board's analogue-to-digital converter, 12 bit.</summary>
public sealed record ConverterParameters
{
    /// <summary>What 4095 counts would be, volts.</summary>
    public double FullScaleVolts { get; init; } = 3.3;

    /// <summary>Below this it reads 0 without scatter, volts.</summary>
    public double DeadZoneVolts { get; init; } = 0.14;

    /// <summary>Noise of one conversion, counts rms.</summary>
    public double NoiseCounts { get; init; } = 3;

    /// <summary>Further noise, in proportion to the level above the pedestal (1 = 100 %).</summary>
    public double NoiseOfLevel { get; init; }

    /// <summary>Non-linearity: a bow of this many counts in the middle of the range.</summary>
    public double BowCounts { get; init; }

    /// <summary>Non-linearity: a ripple of this amplitude, counts.</summary>
    public double RippleCounts { get; init; }

    /// <summary>The period of that ripple, counts.</summary>
    public double RipplePeriodCounts { get; init; } = 512;
}
