namespace Looseloop.Statistics;

/// <summary>The special functions behind chi-square and Student's t (Abramowitz and Stegun, chapters 6 and 26; DLMF 8).</summary>
internal static class SpecialFunctions
{
    private const double Tiny = 1e-300;
    private const int MostTerms = 100000;

    /// <summary>Natural logarithm of the gamma function for x above 0: Stirling's series (DLMF 5.11.1) after a shift to x of 15 or more.</summary>
    public static double LogGamma(double x)
    {
        double shift = 0;
        while (x < 15)
        {
            shift += Math.Log(x);
            x++;
        }

        double r = 1 / (x * x);
        double series = (1.0 / 12) - (r * ((1.0 / 360) - (r * ((1.0 / 1260) - (r * ((1.0 / 1680) - (r / 1188)))))));
        return ((x - 0.5) * Math.Log(x)) - x + (0.5 * Math.Log(2 * Math.PI)) + (series / x) - shift;
    }

    /// <summary>Regularised upper incomplete gamma function Q(a, x), a above 0, x not negative.</summary>
    public static double GammaUpper(double a, double x)
    {
        if (x <= 0)
        {
            return 1;
        }

        double front = Math.Exp((a * Math.Log(x)) - x - LogGamma(a));
        if (x < a + 1)
        {
            double term = 1 / a;
            double sum = term;
            for (int n = 1; n < MostTerms && term > sum * 1e-17; n++)
            {
                term *= x / (a + n);
                sum += term;
            }

            return 1 - (front * sum);
        }

        // Continued fraction, DLMF 8.9.2, by Lentz's method.
        double b = x + 1 - a;
        double c = 1 / Tiny;
        double d = 1 / b;
        double h = d;
        for (int n = 1; n < MostTerms; n++)
        {
            double an = -n * (n - a);
            b += 2;
            d = 1 / NotZero((an * d) + b);
            c = NotZero(b + (an / c));
            h *= d * c;
            if (Math.Abs((d * c) - 1) < 1e-16)
            {
                break;
            }
        }

        return front * h;
    }

    /// <summary>Regularised incomplete beta function I_x(a, b), a and b above 0, x from 0 to 1.</summary>
    public static double BetaRegularised(double a, double b, double x)
    {
        if (x <= 0 || x >= 1)
        {
            return x <= 0 ? 0 : 1;
        }

        double front = Math.Exp(
            LogGamma(a + b) - LogGamma(a) - LogGamma(b) + (a * Math.Log(x)) + (b * Math.Log(1 - x)));
        return x < (a + 1) / (a + b + 2) ? front * BetaFraction(a, b, x) / a : 1 - (front * BetaFraction(b, a, 1 - x) / b);
    }

    // Continued fraction, DLMF 8.17.22, by Lentz's method.
    private static double BetaFraction(double a, double b, double x)
    {
        double c = 1;
        double d = 1 / NotZero(1 - ((a + b) * x / (a + 1)));
        double h = d;
        for (int n = 1; n < MostTerms; n++)
        {
            double even = n * (b - n) * x / ((a + (2 * n) - 1) * (a + (2 * n)));
            d = 1 / NotZero(1 + (even * d));
            c = NotZero(1 + (even / c));
            h *= d * c;
            double odd = -(a + n) * (a + b + n) * x / ((a + (2 * n)) * (a + (2 * n) + 1));
            d = 1 / NotZero(1 + (odd * d));
            c = NotZero(1 + (odd / c));
            h *= d * c;
            if (Math.Abs((d * c) - 1) < 1e-16)
            {
                break;
            }
        }

        return h;
    }

    private static double NotZero(double x) => Math.Abs(x) < Tiny ? Tiny : x;
}
