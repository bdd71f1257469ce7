namespace Looseloop.Drift;

/// <summary>Whether a coil has come to rest.</summary>
public enum SettledState
{
    /// <summary>The run is too short, or too noisy, to tell where it will end.</summary>
    NotDeterminable,

    /// <summary>It still moves by more than a reading's uncertainty.</summary>
    NotSettled,

    /// <summary>What is still to come is less than a reading's uncertainty.</summary>
    Settled,
}
