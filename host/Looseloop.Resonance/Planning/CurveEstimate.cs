namespace Looseloop.Resonance;

/// <summary>What is thought of a curve before it is measured; powers over the resonance's own peak power.</summary>
/// <param name="F0Hz">Resonant frequency, hertz.</param>
/// <param name="Q">Quality factor.</param>
/// <param name="Interference">n1 over P.</param>
/// <param name="ConstantPower">Feed-through power at drive weight 1, over P.</param>
public readonly record struct CurveEstimate(double F0Hz, double Q, double Interference = 0, double ConstantPower = 0)
{
    /// <summary>From a fit.</summary>
    public static CurveEstimate From(in ResonanceFit fit) =>
        new(fit.F0Hz, fit.Q, fit.Interference / fit.PeakPower, Math.Max(fit.ConstantPower / fit.PeakPower, 0));
}
