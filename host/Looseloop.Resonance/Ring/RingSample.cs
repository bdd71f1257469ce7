namespace Looseloop.Resonance;

/// <summary>One sample of a decay, or the mean of several at one delay.</summary>
/// <param name="TimeS">Seconds after the drive stopped, or after any other moment that is the same for all.</param>
/// <param name="Level">The detector's level, its zero taken off, in amplitude.</param>
/// <param name="Variance">Variance of the level, above 0.</param>
public readonly record struct RingSample(double TimeS, double Level, double Variance);
