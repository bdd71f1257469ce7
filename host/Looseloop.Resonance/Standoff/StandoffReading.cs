namespace Looseloop.Resonance;

/// <summary>One reading of a standoff.</summary>
/// <param name="PeakAmplitude">Peak amplitude, same gain and drive throughout.</param>
/// <param name="F0Hz">Resonant frequency, hertz.</param>
/// <param name="F0StandardHz">Its standard repeatability, hertz, above 0.</param>
/// <param name="Q">Quality factor.</param>
/// <param name="QRelativeStandard">Its relative standard repeatability, above 0.</param>
public readonly record struct StandoffReading(
    double PeakAmplitude, double F0Hz, double F0StandardHz, double Q, double QRelativeStandard);
