namespace Looseloop.Resonance;

/// <summary>
/// f0 from two amplitudes on the flanks and a known Q, independent of the peak amplitude. Exact for a series RLC circuit at any offset:
/// with a = half the logarithm of the frequencies' ratio and z = 2 ln(f0 / their geometric mean), 1/y^2 is proportional to
/// 1 + Q^2 (2 cosh 2(ln f - ln f0) - 2), and the ratio of the two gives K S sinh z + rho K C cosh z = rho (K - 1), K = 2 Q^2,
/// S = sinh 2a, C = cosh 2a. A constant unmodelled background biases f0 but hardly a change of f0.
/// </summary>
public static class TwoPointTracker
{
    /// <summary>Finds f0.</summary>
    /// <param name="lowHz">Frequency of the lower point, hertz.</param>
    /// <param name="lowAmplitude">Amplitude there over its drive weight, above 0.</param>
    /// <param name="highHz">Frequency of the upper point, above the lower.</param>
    /// <param name="highAmplitude">Amplitude there over its drive weight, above 0.</param>
    /// <param name="q">The coil's Q.</param>
    /// <param name="f0Hz">f0, hertz.</param>
    /// <returns>False where no f0 explains the two, or the points lie on one flank: read fully again.</returns>
    public static bool TryF0(double lowHz, double lowAmplitude, double highHz, double highAmplitude, double q, out double f0Hz)
    {
        f0Hz = double.NaN;
        if (!(lowHz > 0 && highHz > lowHz && lowAmplitude > 0 && highAmplitude > 0 && q > 0))
        {
            return false;
        }

        double low = 1 / (lowAmplitude * lowAmplitude);
        double high = 1 / (highAmplitude * highAmplitude);
        double rho = (high - low) / (high + low);
        double a2 = Math.Log(highHz / lowHz);
        double k = 2 * q * q;
        double sinh = k * Math.Sinh(a2);
        double cosh = rho * k * Math.Cosh(a2);
        double right = rho * (k - 1);
        double discriminant = (sinh * sinh) - ((cosh - right) * (cosh + right));
        if (!(discriminant >= 0))
        {
            return false;
        }

        // The root that goes to zero with rho, in the form that does not cancel for its sign.
        double root = Math.Sqrt(discriminant);
        double z = Math.Log(rho > 0 ? (right + root) / (sinh + cosh) : (sinh - cosh) / (root - right));
        f0Hz = Math.Sqrt(lowHz * highHz) * Math.Exp(z / 2);
        return double.IsFinite(f0Hz);
    }

    /// <summary>Standard uncertainty of f0 from those of the two amplitudes, hertz, by differences; Q taken as known.</summary>
    public static double F0StandardHz(
        double lowHz, double lowAmplitude, double lowStandard, double highHz, double highAmplitude, double highStandard, double q)
    {
        const double part = 0.1;
        double Half(double low, double high) =>
            TryF0(lowHz, lowAmplitude + low, highHz, highAmplitude + high, q, out double plus)
            && TryF0(lowHz, lowAmplitude - low, highHz, highAmplitude - high, q, out double minus)
                ? (plus - minus) / (2 * part)
                : double.NaN;
        return double.Hypot(Half(part * lowStandard, 0), Half(0, part * highStandard));
    }
}
