namespace Looseloop.Procedures.Read;

/// <summary>A first idea of the resonance, on which sweeps are planned.</summary>
/// <param name="F0Hz">Resonant frequency, hertz.</param>
/// <param name="Q">Quality factor.</param>
/// <param name="Duty">Duty at which the level suits the converter, 0..1/2.</param>
public sealed record Target(double F0Hz, double Q, double Duty)
{
    /// <summary>Half-power bandwidth, hertz.</summary>
    public double BandwidthHz => F0Hz / Q;

    /// <summary>Amplitude ring time, seconds: Q / (pi f0).</summary>
    public double RingTimeS => Q / (Math.PI * F0Hz);
}
