namespace Looseloop.Resonance;

/// <summary>The response of one resonance, exact for a series RLC circuit. x = Q (f/f0 - f0/f).</summary>
public static class ResonanceModel
{
    /// <summary>The normalised detuning x; +-1 at the half-power points, whose difference is exactly f0/Q.</summary>
    public static double Detuning(double frequencyHz, double f0Hz, double q) => q * ((frequencyHz / f0Hz) - (f0Hz / frequencyHz));

    /// <summary>Power of a resonance of peak power P with interference n1 over a constant power C: (P + n1 x)/(1 + x^2) + C.</summary>
    public static double Power(double x, double peakPower, double interference, double constant) =>
        ((peakPower + (interference * x)) / (1 + (x * x))) + constant;

    /// <summary>
    /// Ring time of the amplitude, seconds: Q / (pi f0), the time in which a free oscillation falls to 1/e.
    /// </summary>
    public static double RingTimeS(double f0Hz, double q) => q / (Math.PI * f0Hz);

    /// <summary>The frequencies at which the amplitude without feed-through is a fraction of the peak's, exactly.</summary>
    /// <param name="f0Hz">Resonant frequency, hertz.</param>
    /// <param name="q">Quality factor.</param>
    /// <param name="fraction">Between 0 and 1.</param>
    public static (double LowHz, double HighHz) FractionEdges(double f0Hz, double q, double fraction)
    {
        double half = Math.Sqrt((1 / (fraction * fraction)) - 1) / (2 * q);
        double root = Math.Sqrt(1 + (half * half));
        return (f0Hz * (root - half), f0Hz * (root + half));
    }
}
