namespace Looseloop.Drift;

/// <summary>Student's t and Fisher's F, from the regularised incomplete beta function (DLMF 8.17).</summary>
public static class Distributions
{
    /// <summary>
    /// The coverage factor of a two-sided interval (GUM, JCGM 100:2008, table G.2): t for the probability
    /// <paramref name="coverage"/> (0..1) and <paramref name="degreesOfFreedom"/> (above 0, may be infinite).
    /// </summary>
    public static double CoverageFactor(double coverage, double degreesOfFreedom)
    {
        if (!(coverage > 0 && coverage < 1))
        {
            throw new ArgumentOutOfRangeException(nameof(coverage), coverage, "a probability between 0 and 1 is needed");
        }

        if (!(degreesOfFreedom > 0))
        {
            throw new ArgumentOutOfRangeException(nameof(degreesOfFreedom), degreesOfFreedom, "must be above zero");
        }

        if (degreesOfFreedom > 200)
        {
            return NearNormal(NormalQuantile.At((1 + coverage) / 2), degreesOfFreedom);
        }

        double tail = 1 - coverage;
        double low = 0;
        double high = 1;
        while (StudentTwoSided(high, degreesOfFreedom) > tail)
        {
            high *= 2;
        }

        for (int i = 0; i < 50; i++)
        {
            double middle = (low + high) / 2;
            if (StudentTwoSided(middle, degreesOfFreedom) > tail)
            {
                low = middle;
            }
            else
            {
                high = middle;
            }
        }

        return (low + high) / 2;
    }

    /// <summary>The probability that |t| is above <paramref name="t"/>.</summary>
    public static double StudentTwoSided(double t, double degreesOfFreedom) =>
        RegularisedBeta(degreesOfFreedom / (degreesOfFreedom + (t * t)), degreesOfFreedom / 2, 0.5);

    /// <summary>The probability that F with the given degrees of freedom is above <paramref name="f"/>.</summary>
    public static double FisherAbove(double f, double numerator, double denominator) =>
        f <= 0 ? 1 : RegularisedBeta(denominator / (denominator + (numerator * f)), denominator / 2, numerator / 2);

    /// <summary>I_x(a, b), 0..1, for x in 0..1 and a, b above zero.</summary>
    public static double RegularisedBeta(double x, double a, double b)
    {
        if (x <= 0)
        {
            return 0;
        }

        if (x >= 1)
        {
            return 1;
        }

        // The continued fraction DLMF 8.17.22 converges fast below this x; above it the mirrored one does (8.17.4).
        return x < (a + 1) / (a + b + 2) ? Fraction(x, a, b) : 1 - Fraction(1 - x, b, a);
    }

    // Student's quantile from the normal one (Abramowitz and Stegun 26.7.5); 1e-8 at 200 degrees of freedom.
    private static double NearNormal(double z, double v)
    {
        double z2 = z * z;
        double g1 = z * (z2 + 1) / 4;
        double g2 = z * ((((5 * z2) + 16) * z2) + 3) / 96;
        double g3 = z * ((((((3 * z2) + 19) * z2) + 17) * z2) - 15) / 384;
        return z + (g1 / v) + (g2 / v / v) + (g3 / v / v / v);
    }

    private static double Fraction(double x, double a, double b)
    {
        const double Tiny = 1e-300;
        double front = Math.Exp((a * Math.Log(x)) + (b * Math.Log(1 - x)) + LogGamma(a + b) - LogGamma(a) - LogGamma(b)) / a;
        double c = 1;
        double d = 1 / Away(1 - ((a + b) * x / (a + 1)));
        double h = d;
        for (int m = 1; m < 20000; m++)
        {
            double even = m * (b - m) * x / ((a + (2 * m) - 1) * (a + (2 * m)));
            d = 1 / Away(1 + (even * d));
            c = Away(1 + (even / c));
            h *= d * c;
            double odd = -(a + m) * (a + b + m) * x / ((a + (2 * m)) * (a + (2 * m) + 1));
            d = 1 / Away(1 + (odd * d));
            c = Away(1 + (odd / c));
            h *= d * c;
            if (Math.Abs((d * c) - 1) < 1e-15)
            {
                break;
            }
        }

        return front * h;

        static double Away(double v) => Math.Abs(v) < Tiny ? Tiny : v;
    }

    // Stirling's series (DLMF 5.11.1), after stepping the argument up to where it is exact to double precision.
    private static double LogGamma(double x)
    {
        double shift = 0;
        while (x < 10)
        {
            shift -= Math.Log(x);
            x++;
        }

        double r = 1 / (x * x);
        double series = ((((((((-3617.0 / 122400 * r) + (1.0 / 156)) * r) - (691.0 / 360360)) * r) + (1.0 / 1188)) * r) - (1.0 / 1680)) * r;
        series = ((((series + (1.0 / 1260)) * r) - (1.0 / 360)) * r) + (1.0 / 12);
        return shift + ((x - 0.5) * Math.Log(x)) - x + (0.5 * Math.Log(2 * Math.PI)) + (series / x);
    }
}
