using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>
/// What a plan is made from, rounded: a repeated reading then chooses the same settings, and what one resonance cannot
/// explain stays the same from reading to reading instead of scattering with the choice.
/// </summary>
public static class RoundedEstimate
{
    private const double QStep = 1.08;
    private const double BandwidthPart = 1 / 12.0;
    private const double PowerStep = 0.05;

    /// <summary>Q to steps of 8 %, f0 to a twelfth of the bandwidth.</summary>
    public static Target Of(Target target)
    {
        double q = Geometric(target.Q, QStep);
        double stepHz = target.F0Hz / q * BandwidthPart;
        return target with { Q = q, F0Hz = Math.Round(target.F0Hz / stepHz) * stepHz };
    }

    /// <summary>The rounded target's curve, its feed-through to 5 % of the peak's power.</summary>
    public static CurveEstimate Of(Target rounded, ResonanceFit fit)
    {
        CurveEstimate estimate = CurveEstimate.From(fit);
        return new CurveEstimate(rounded.F0Hz, rounded.Q, Linear(estimate.Interference), Linear(estimate.ConstantPower));
    }

    /// <summary>A positive figure to a power of a step.</summary>
    public static double Geometric(double value, double step) => Math.Pow(step, Math.Round(Math.Log(value) / Math.Log(step)));

    private static double Linear(double value) => Math.Round(value / PowerStep) * PowerStep;
}
