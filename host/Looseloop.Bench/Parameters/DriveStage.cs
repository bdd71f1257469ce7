namespace Looseloop.Bench;

/// <summary>The stage between the timer's pin and the loop: a square wave with finite edges.</summary>
public sealed record DriveStage
{
    /// <summary>Swing from low to high, volts.</summary>
    public double SwingVolts { get; init; } = 5;

    /// <summary>How many harmonics the bench carries, 1 to 40. One makes the drive a sine.</summary>
    public int Harmonics { get; init; } = 15;

    /// <summary>Length of the rising edge, nanoseconds.</summary>
    public double RiseNs { get; init; } = 20;

    /// <summary>Length of the falling edge, nanoseconds.</summary>
    public double FallNs { get; init; } = 20;

    /// <summary>By how much the high time is longer than the timer makes it, nanoseconds: the edges' delays differ.</summary>
    public double HighExtraNs { get; init; }
}
