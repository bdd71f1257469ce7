namespace Looseloop.Statistics;

/// <summary>
/// The factor k between a standard uncertainty and the half-width of an interval: Student's t, two-sided (JCGM 100:2008, GUM, G.3
/// and table G.2).
/// </summary>
public static class CoverageFactor
{
    /// <summary>The factor for a level of confidence.</summary>
    /// <param name="degreesOfFreedom">Above 0, whole or not; infinity for a normal distribution.</param>
    /// <param name="probability">Between 0 and 1, such as 0.95.</param>
    /// <returns>k, or NaN where an argument is out of its range.</returns>
    public static double TwoSided(double degreesOfFreedom, double probability)
    {
        if (!(degreesOfFreedom > 0 && probability is > 0 and < 1))
        {
            return double.NaN;
        }

        double low = 0;
        double high = 1;
        while (Probability(degreesOfFreedom, high) < probability && high < 1e300)
        {
            low = high;
            high *= 2;
        }

        for (int i = 0; i < 200 && high - low > 1e-15 * high; i++)
        {
            double middle = (low + high) / 2;
            if (Probability(degreesOfFreedom, middle) < probability)
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

    /// <summary>The probability that a quantity lies within k standard uncertainties.</summary>
    /// <param name="degreesOfFreedom">Above 0; infinity for a normal distribution.</param>
    /// <param name="k">Not negative.</param>
    public static double Probability(double degreesOfFreedom, double k)
    {
        double square = k * k;
        return double.IsPositiveInfinity(degreesOfFreedom) || degreesOfFreedom > 1e8
            ? 1 - SpecialFunctions.GammaUpper(0.5, square / 2)
            : SpecialFunctions.BetaRegularised(0.5, degreesOfFreedom / 2, square / (degreesOfFreedom + square));
    }
}
