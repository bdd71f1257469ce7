namespace Looseloop.Resonance;

/// <summary>What was moved between the readings of a standoff. One thing at a time: their pulls follow different laws.</summary>
public enum StandoffMove
{
    /// <summary>The pickup. Its capacitance pulls f0 in proportion to what it picks up: A/Q to the first power.</summary>
    Pickup,

    /// <summary>The loop. It pulls f0 and 1/Q by k^2, and A/Q goes as k: (A/Q)^2.</summary>
    Loop,
}
