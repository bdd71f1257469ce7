namespace Looseloop.Resonance;

/// <summary>How the evaluation of a decay ended.</summary>
public enum RingOutcome
{
    /// <summary>The ring time was found.</summary>
    Found,

    /// <summary>Too few samples, not finite, or without variance.</summary>
    BadSamples,

    /// <summary>The decay is over before detector or sampling can follow it, or noise hides it.</summary>
    TooShort,
}
