namespace Looseloop.Resonance;

/// <summary>The law of propagation of uncertainty and what goes with it (JCGM 100:2008, GUM, 5.1.2, 5.2.2, G.4.1).</summary>
public static class UncertaintyPropagation
{
    /// <summary>Combined standard uncertainty of a quantity from correlated inputs: u^2 = sum over i, j of c_i c_j u_i u_j r_ij.</summary>
    /// <param name="sensitivities">c, the derivatives of the quantity by its inputs.</param>
    /// <param name="covariance">Covariance of the inputs, symmetric, row by row.</param>
    public static double Combine(ReadOnlySpan<double> sensitivities, ReadOnlySpan<double> covariance) =>
        Math.Sqrt(Covariance(sensitivities, sensitivities, covariance));

    /// <summary>Covariance of two quantities that come from the same inputs.</summary>
    /// <param name="first">Derivatives of the one by the inputs.</param>
    /// <param name="second">Derivatives of the other.</param>
    /// <param name="covariance">Covariance of the inputs, symmetric, row by row.</param>
    public static double Covariance(ReadOnlySpan<double> first, ReadOnlySpan<double> second, ReadOnlySpan<double> covariance)
    {
        int n = first.Length;
        if (second.Length != n || covariance.Length != n * n)
        {
            throw new ArgumentException("Sensitivities and covariance are of different sizes.");
        }

        double sum = 0;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                sum += first[i] * second[j] * covariance[(i * n) + j];
            }
        }

        return sum;
    }

    /// <summary>
    /// Covariance of the means of quantities that were observed together (GUM 5.2.3 and 4.2): the scatter of the sets over their
    /// number.
    /// </summary>
    /// <param name="sets">At least two sets, each with one value of every quantity.</param>
    /// <returns>The means, and their covariance row by row.</returns>
    public static (double[] Means, double[] Covariance) OfMeans(IReadOnlyList<double[]> sets)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(sets.Count, 2);
        int n = sets[0].Length;
        double[] means = new double[n];
        foreach (double[] set in sets)
        {
            for (int i = 0; i < n; i++)
            {
                means[i] += set[i] / sets.Count;
            }
        }

        double[] covariance = new double[n * n];
        double divisor = (double)sets.Count * (sets.Count - 1);
        foreach (double[] set in sets)
        {
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < n; j++)
                {
                    covariance[(i * n) + j] += (set[i] - means[i]) * (set[j] - means[j]) / divisor;
                }
            }
        }

        return (means, covariance);
    }

    /// <summary>Effective degrees of freedom of a sum of independent terms (Welch-Satterthwaite, GUM G.4.1).</summary>
    /// <param name="terms">Standard uncertainty that each term makes, and its degrees of freedom (infinity allowed).</param>
    public static double EffectiveDegreesOfFreedom(ReadOnlySpan<(double Standard, double DegreesOfFreedom)> terms)
    {
        double variance = 0;
        double denominator = 0;
        foreach ((double standard, double freedom) in terms)
        {
            double square = standard * standard;
            variance += square;
            denominator += square * square / freedom;
        }

        return denominator > 0 ? variance * variance / denominator : double.PositiveInfinity;
    }
}
