namespace Looseloop.Coil;

/// <summary>
/// Complete elliptic integrals by the arithmetic-geometric mean (DLMF 19.8). All take the complementary parameter
/// m1 = 1 - k^2, 0 &lt; m1 &lt;= 1, so that nothing is lost by cancellation where two rings lie close together.
/// </summary>
public static class EllipticIntegrals
{
    /// <summary>K, E and D = (K - E) / k^2.</summary>
    public static (double K, double E, double D) Complete(double m1)
    {
        Demand.Within(m1, double.Epsilon, 1, nameof(m1), "");
        (double k, double higher) = WithHigherSum(m1);
        double m = 1 - m1;
        // (K - E)/K = sum over n >= 0 of 2^(n-1) c_n^2, whose first term is m/2.
        double d = k * (0.5 + (higher * m));
        return (k, k - (m * d), d);
    }

    /// <summary>
    /// K, and S = sum over n >= 1 of 2^(n-1) c_n^2 / m^2. From it (K - E)/m - K/2 = K m S with no cancellation, which is
    /// what the mutual inductance of two loops needs at any distance.
    /// </summary>
    internal static (double K, double S) WithHigherSum(double m1)
    {
        double m = 1 - m1;
        double a = 1;
        double b = Math.Sqrt(m1);
        // c_n is carried as c_n / m: c_1 = c_0^2/(4 a_1) = m/(4 a_1), c_(n+1) = c_n^2/(4 a_(n+1)).
        double a1 = 0.5 * (a + b);
        double c = 0.25 / a1;
        b = Math.Sqrt(a * b);
        a = a1;
        double power = 1;
        double sum = c * c;
        while (Math.Abs(a - b) > 1e-8 * a)
        {
            double next = 0.5 * (a + b);
            c = c * c * m / (4 * next);
            b = Math.Sqrt(a * b);
            a = next;
            power *= 2;
            sum += power * c * c;
        }

        // One more step of the mean is exact to rounding; its c is below 1e-17.
        return (Math.PI / (a + b), sum);
    }
}
