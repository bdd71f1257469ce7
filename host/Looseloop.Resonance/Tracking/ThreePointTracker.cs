namespace Looseloop.Resonance;

/// <summary>
/// f0, Q and peak amplitude from three amplitudes: 1/y^2 of a resonance without feed-through is linear in 1, sinh 2a and cosh 2a,
/// a = ln(f / any reference), so three points determine it exactly. Order the visits L C H H C L: a steady drift then cancels.
/// </summary>
public static class ThreePointTracker
{
    /// <summary>Solves for the curve through three points.</summary>
    /// <param name="frequenciesHz">Three different frequencies, rising, hertz.</param>
    /// <param name="amplitudes">The amplitudes there over their drive weights, above 0.</param>
    /// <param name="f0Hz">Resonant frequency, hertz.</param>
    /// <param name="q">Quality factor.</param>
    /// <param name="peak">Peak amplitude.</param>
    /// <returns>False where no resonance goes through the points.</returns>
    public static bool TrySolve(
        ReadOnlySpan<double> frequenciesHz, ReadOnlySpan<double> amplitudes, out double f0Hz, out double q, out double peak)
    {
        f0Hz = q = peak = double.NaN;
        if (frequenciesHz.Length != 3 || amplitudes.Length != 3 || !(frequenciesHz[0] > 0 && frequenciesHz[1] > frequenciesHz[0]
            && frequenciesHz[2] > frequenciesHz[1] && amplitudes[0] > 0 && amplitudes[1] > 0 && amplitudes[2] > 0))
        {
            return false;
        }

        // Relative to the middle point: 1/y^2 = k0 + k1 sinh 2a + k2 (cosh 2a - 1).
        double low = Math.Log(frequenciesHz[0] / frequenciesHz[1]);
        double high = Math.Log(frequenciesHz[2] / frequenciesHz[1]);
        double k0 = 1 / (amplitudes[1] * amplitudes[1]);
        double lowRise = (1 / (amplitudes[0] * amplitudes[0])) - k0;
        double highRise = (1 / (amplitudes[2] * amplitudes[2])) - k0;
        double s1 = Math.Sinh(2 * low);
        double s3 = Math.Sinh(2 * high);
        double c1 = 2 * Math.Sinh(low) * Math.Sinh(low);
        double c3 = 2 * Math.Sinh(high) * Math.Sinh(high);
        double determinant = (s1 * c3) - (s3 * c1);
        double k1 = ((lowRise * c3) - (highRise * c1)) / determinant;
        double k2 = ((s1 * highRise) - (s3 * lowRise)) / determinant;
        if (!(k2 > Math.Abs(k1)))
        {
            return false;
        }

        double b = Math.Atanh(-k1 / k2) / 2;
        double product = Math.Sqrt((k2 - k1) * (k2 + k1));
        double inversePeak = k0 - (product * 2 * Math.Sinh(b) * Math.Sinh(b));
        f0Hz = frequenciesHz[1] * Math.Exp(b);
        q = Math.Sqrt(product / (2 * inversePeak));
        peak = 1 / Math.Sqrt(inversePeak);
        return inversePeak > 0 && double.IsFinite(f0Hz) && double.IsFinite(q);
    }

    /// <summary>Covariance of f0 and Q from the standard uncertainties of the three amplitudes, by differences.</summary>
    public static ParameterCovariance Covariance(
        ReadOnlySpan<double> frequenciesHz, ReadOnlySpan<double> amplitudes, ReadOnlySpan<double> standards)
    {
        const double part = 0.1;
        Span<double> moved = stackalloc double[3];
        double f0Variance = 0, qVariance = 0, both = 0;
        for (int i = 0; i < 3; i++)
        {
            amplitudes.CopyTo(moved);
            moved[i] += part * standards[i];
            bool solved = TrySolve(frequenciesHz, moved, out double f0Plus, out double qPlus, out _);
            moved[i] -= 2 * part * standards[i];
            solved &= TrySolve(frequenciesHz, moved, out double f0Minus, out double qMinus, out _);
            if (!solved)
            {
                return ParameterCovariance.Unknown;
            }

            double byF0 = (f0Plus - f0Minus) / (2 * part);
            double byQ = (qPlus - qMinus) / (2 * part);
            f0Variance += byF0 * byF0;
            qVariance += byQ * byQ;
            both += byF0 * byQ;
        }

        return new ParameterCovariance(f0Variance, qVariance, both);
    }
}
