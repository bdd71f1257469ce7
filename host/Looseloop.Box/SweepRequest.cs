using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>What a box is to measure.</summary>
/// <param name="Settings">Where, in order.</param>
/// <param name="DwellUs">How long to settle at each, microseconds, 0..2 000 000.</param>
/// <param name="Samples">How many samples at each, 1..16384.</param>
public sealed record SweepRequest(IReadOnlyList<Setting> Settings, int DwellUs, int Samples)
{
    /// <summary>Microseconds from sample to sample; 0 for as fast as the box can.</summary>
    public int SpacingUs { get; init; }

    /// <summary>Through the settings and back again, so that each is measured twice and a steady drift cancels.</summary>
    public bool ThereAndBack { get; init; }

    /// <summary>Points to a line, 2..12, without their sums of squares; 0 for a line each with everything.</summary>
    public int Pack { get; init; }

    /// <summary>Which input: 0 detector, 1 direct.</summary>
    public int Channel { get; init; }
}
