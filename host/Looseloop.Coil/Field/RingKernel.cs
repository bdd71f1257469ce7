namespace Looseloop.Coil;

/// <summary>Potential of charged rings.</summary>
internal static class RingKernel
{
    /// <summary>
    /// Potential on a ring of radius a per charge on a ring of radius b, volts per coulomb: K(m)/(2 pi^2 eps0 s),
    /// s^2 = (a+b)^2 + dz^2, 1 - m = apart^2/s^2 (Smythe, Static and Dynamic Electricity; Harrington, Field Computation by Moment
    /// Methods, 1968).
    /// </summary>
    public static double Potential(double a, double b, double apartSquare, double dz)
    {
        double sum = ((a + b) * (a + b)) + (dz * dz);
        (double k, _) = EllipticIntegrals.WithHigherSum(Math.Min(1, apartSquare / sum));
        return k / (2 * Math.PI * Math.PI * PhysicalConstants.Epsilon0 * Math.Sqrt(sum));
    }

    /// <summary>Potential and mutual inductance of two filaments at one stroke: both come from the same mean.</summary>
    public static (double PotentialPerCoulomb, double MutualH) Both(double a, double b, double apartSquare, double dz)
    {
        double sum = ((a + b) * (a + b)) + (dz * dz);
        (double k, double s) = EllipticIntegrals.WithHigherSum(Math.Min(1, apartSquare / sum));
        double m = 4 * a * b / sum;
        return (
            k / (2 * Math.PI * Math.PI * PhysicalConstants.Epsilon0 * Math.Sqrt(sum)),
            2 * PhysicalConstants.Mu0 * Math.Sqrt(a * b) * m * Math.Sqrt(m) * k * s);
    }

    /// <summary>
    /// Mean of both over two bands of one cylinder. Near by, each kernel is a logarithm of the distance plus a smooth even function:
    /// the first is averaged by the geometric mean distance, the second by the root mean square distance. Further off two points
    /// with the distance's own variance are exact to the second order.
    /// </summary>
    public static (double PotentialPerCoulomb, double MutualH) OnCylinder(double radius, double apart, double widthA, double widthB)
    {
        double variance = ((widthA * widthA) + (widthB * widthB)) / 12;
        if (apart > 5 * Math.Max(widthA, widthB))
        {
            double spread = Math.Sqrt(variance);
            (double p1, double m1) = Both(radius, radius, (apart - spread) * (apart - spread), apart - spread);
            (double p2, double m2) = Both(radius, radius, (apart + spread) * (apart + spread), apart + spread);
            return ((p1 + p2) / 2, (m1 + m2) / 2);
        }

        double square = (apart * apart) + variance;
        (double p, double m) = Both(radius, radius, square, Math.Sqrt(square));
        double mean = apart > 0 ? GeometricMeanDistance.OfStrips(apart, widthA, widthB) : widthA * Math.Exp(-1.5);
        double log = 0.5 * Math.Log(square / (mean * mean));
        // K/s tends to ln(8a/t)/(2a), M to mu0 a ln(8a/t).
        return (
            p + (log / (4 * Math.PI * Math.PI * PhysicalConstants.Epsilon0 * radius)),
            m + (PhysicalConstants.Mu0 * radius * log));
    }
}
