namespace Looseloop.Coil;

/// <summary>Geometric mean distance of two strips in one line (Maxwell, Treatise art. 691-692; Rosa 1906).</summary>
internal static class GeometricMeanDistance
{
    /// <summary>exp of the mean of ln|x - y|, x on the one strip, y on the other, metres.</summary>
    /// <param name="apart">Distance of their middles; at least half the sum of the widths.</param>
    /// <param name="widthA">Of the one.</param>
    /// <param name="widthB">Of the other.</param>
    public static double OfStrips(double apart, double widthA, double widthB)
    {
        double p = widthA / apart;
        double q = widthB / apart;
        double largest = Math.Max(p, q);
        if (largest < 0.1)
        {
            // The closed form loses digits here; the series' next term is below 1e-8.
            double second = ((p * p) + (q * q)) / 12;
            double fourth = (Math.Pow(p, 4) / 80) + (Math.Pow(q, 4) / 80) + (p * p * q * q / 24);
            return apart * Math.Exp(-(second / 2) - (fourth / 4));
        }

        double half = (p + q) / 2;
        double skew = (p - q) / 2;
        double sum = F(1 + half) - F(1 + skew) - F(1 - skew) + F(1 - half);
        return apart * Math.Exp(sum / (p * q));
    }

    // Second antiderivative of ln t.
    private static double F(double t)
    {
        double size = Math.Abs(t);
        return size < 1e-300 ? 0 : (t * t * Math.Log(size) / 2) - (0.75 * t * t);
    }
}
