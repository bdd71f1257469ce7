namespace Looseloop.Procedures.Tracking;

/// <summary>What a few settings say of f0 and Q, with the rest of the curve held.</summary>
/// <param name="F0Hz">f0 by the settings' own hertz, without clock or pull.</param>
/// <param name="Q">Q; that of the full reading where the settings could not tell it.</param>
/// <param name="Scale">Amplitude against the full reading's, Q's own part taken out.</param>
/// <param name="QIsHeld">True where Q was held.</param>
/// <param name="F0NoiseHz">Standard uncertainty of f0 by the samples' scatter, hertz.</param>
/// <param name="QNoiseRelative">Relative standard uncertainty of Q by it.</param>
/// <param name="F0HeldHz">Standard uncertainty of f0 by the held terms, common to all readings on the same curve.</param>
/// <param name="QHeldRelative">The same of Q, relative.</param>
/// <param name="ResidualRatio">Root mean square of the residuals over the peak; 0 without a degree of freedom.</param>
/// <param name="ChiSquare">Sum of squared residuals over their variances.</param>
/// <param name="DegreesOfFreedom">Settings less parameters.</param>
public readonly record struct TrackedFit(
    double F0Hz, double Q, double Scale, bool QIsHeld, double F0NoiseHz, double QNoiseRelative, double F0HeldHz,
    double QHeldRelative, double ResidualRatio, double ChiSquare, int DegreesOfFreedom);
