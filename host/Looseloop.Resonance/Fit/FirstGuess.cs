namespace Looseloop.Resonance;

/// <summary>Starts for the fit, each from another look at the points.</summary>
internal static class FirstGuess
{
    /// <summary>
    /// 1/y^2 of a single resonance without feed-through is linear in 1, sinh 2a and cosh 2a with a = ln(f/reference), exactly and
    /// at any Q: a linear regression gives f0 and Q without iteration. Weights by SD(1/y^2) = 2 sigma / y^3.
    /// </summary>
    public static bool TryLinear(FitData data, out double f0Hz, out double q)
    {
        f0Hz = double.NaN;
        q = double.NaN;
        double reference = Math.Sqrt(data.LowestHz * data.HighestHz);
        double span = Math.Log(data.HighestHz / data.LowestHz);
        double s00 = 0, s01 = 0, s02 = 0, s11 = 0, s12 = 0, s22 = 0, t0 = 0, t1 = 0, t2 = 0;
        double top2 = data.LargestAmplitude * data.LargestAmplitude;
        for (int i = 0; i < data.Count; i++)
        {
            // Constants of other harmonics would need another unknown each: the first group is enough for a start.
            double power = data.Power[i] / data.Drive2[i] / top2;
            if (data.Group[i] != 0 || !(power > 1e-6))
            {
                continue;
            }

            double a = Math.Log(data.FrequencyHz[i] / reference);
            double u1 = Math.Sinh(2 * a) / span;
            double half = Math.Sinh(a) / span;
            double u2 = 2 * half * half;
            double weight = power * data.ProjectionWeight[i];
            weight *= power * weight * data.Drive2[i] * data.Drive2[i];
            weight *= power;
            double z = 1 / power;
            s00 += weight;
            s01 += weight * u1;
            s02 += weight * u2;
            s11 += weight * u1 * u1;
            s12 += weight * u1 * u2;
            s22 += weight * u2 * u2;
            t0 += weight * z;
            t1 += weight * z * u1;
            t2 += weight * z * u2;
        }

        double c00 = (s11 * s22) - (s12 * s12);
        double c01 = (s02 * s12) - (s01 * s22);
        double c02 = (s01 * s12) - (s02 * s11);
        double determinant = (s00 * c00) + (s01 * c01) + (s02 * c02);
        double k0 = ((c00 * t0) + (c01 * t1) + (c02 * t2)) / determinant;
        double k1 = ((c01 * t0) + (((s00 * s22) - (s02 * s02)) * t1) + (((s01 * s02) - (s00 * s12)) * t2)) / determinant / span;
        double k2 = ((c02 * t0) + (((s01 * s02) - (s00 * s12)) * t1) + (((s00 * s11) - (s01 * s01)) * t2))
            / determinant / (span * span);
        if (!(k2 > Math.Abs(k1)))
        {
            return false;
        }

        // k1 = -K sinh 2b, k2 = K cosh 2b, K = 2 Q^2 / A^2, b = ln(f0/reference).
        double b = Math.Atanh(-k1 / k2) / 2;
        double product = Math.Sqrt((k2 - k1) * (k2 + k1));
        double halfStep = Math.Sinh(b);
        double inversePeak = k0 - (product * 2 * halfStep * halfStep);
        f0Hz = reference * Math.Exp(b);
        q = Math.Sqrt(product / (2 * inversePeak));
        return inversePeak > 0 && double.IsFinite(f0Hz) && double.IsFinite(q) && q > 0;
    }

    /// <summary>The largest point, against its drive, and the width at half its power; single sparks are passed over.</summary>
    public static bool TryTop(FitData data, bool passOverSparks, out double f0Hz, out double q)
    {
        int top = -1;
        double best = 0;
        for (int k = 0; k < data.Count; k++)
        {
            double value = Value(data, k, passOverSparks);
            if (value > best)
            {
                best = value;
                top = k;
            }
        }

        f0Hz = double.NaN;
        q = double.NaN;
        if (top < 0)
        {
            return false;
        }

        double high = Crossing(data, top, 1, best / 2, passOverSparks);
        double low = Crossing(data, top, -1, best / 2, passOverSparks);
        f0Hz = data.FrequencyHz[data.Order[top]];
        double width = double.IsNaN(high) && double.IsNaN(low) ? (data.HighestHz - data.LowestHz) / 3
            : double.IsNaN(high) ? 2 * (f0Hz - low)
            : double.IsNaN(low) ? 2 * (high - f0Hz)
            : high - low;
        if (!double.IsNaN(high) && !double.IsNaN(low))
        {
            f0Hz = (low + high) / 2;
        }

        q = f0Hz / width;
        return double.IsFinite(q) && q > 0;
    }

    private static double Crossing(FitData data, int top, int direction, double level, bool passOverSparks)
    {
        double previous = Value(data, top, passOverSparks);
        double previousHz = data.FrequencyHz[data.Order[top]];
        for (int k = top + direction; k >= 0 && k < data.Count; k += direction)
        {
            double value = Value(data, k, passOverSparks);
            double hz = data.FrequencyHz[data.Order[k]];
            if (value < level)
            {
                return previousHz + ((hz - previousHz) * (previous - level) / (previous - value));
            }

            previous = value;
            previousHz = hz;
        }

        return double.NaN;
    }

    private static double Value(FitData data, int k, bool passOverSparks)
    {
        if (!passOverSparks)
        {
            return At(data, k);
        }

        // The median of three in order of frequency.
        double a = At(data, Math.Max(k - 1, 0));
        double b = At(data, k);
        double c = At(data, Math.Min(k + 1, data.Count - 1));
        return Math.Max(Math.Min(a, b), Math.Min(Math.Max(a, b), c));
    }

    private static double At(FitData data, int k)
    {
        int i = data.Order[k];
        return data.Group[i] == 0 ? data.Power[i] / data.Drive2[i] : 0;
    }
}
