namespace Looseloop.Drift;

/// <summary>The quantile of the normal distribution, by P. J. Acklam's rational approximation (relative error below 1.2e-9).</summary>
internal static class NormalQuantile
{
    private const double Low = 0.02425;

    private static readonly double[] _a =
    [
        -3.969683028665376e+01, 2.209460984245205e+02, -2.759285104469687e+02, 1.383577518672690e+02, -3.066479806614716e+01,
        2.506628277459239e+00,
    ];

    private static readonly double[] _b =
        [-5.447609879822406e+01, 1.615858368580409e+02, -1.556989798598866e+02, 6.680131188771972e+01, -1.328068155288572e+01, 1];

    private static readonly double[] _c =
    [
        -7.784894002430293e-03, -3.223964580411365e-01, -2.400758277161838e+00, -2.549732539343734e+00, 4.374664141464968e+00,
        2.938163982698783e+00,
    ];

    private static readonly double[] _d = [7.784695709041462e-03, 3.224671290700398e-01, 2.445134137142996e+00, 3.754408661907416e+00, 1];

    /// <summary>z with the probability <paramref name="p"/> (between 0 and 1) below it.</summary>
    public static double At(double p)
    {
        if (p < Low)
        {
            double q = Math.Sqrt(-2 * Math.Log(p));
            return Polynomial(_c, q) / Polynomial(_d, q);
        }

        if (p > 1 - Low)
        {
            return -At(1 - p);
        }

        double centred = p - 0.5;
        double r = centred * centred;
        return Polynomial(_a, r) * centred / Polynomial(_b, r);
    }

    private static double Polynomial(double[] coefficients, double x)
    {
        double sum = 0;
        foreach (double coefficient in coefficients)
        {
            sum = (sum * x) + coefficient;
        }

        return sum;
    }
}
