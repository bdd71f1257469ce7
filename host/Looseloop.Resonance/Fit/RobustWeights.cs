namespace Looseloop.Resonance;

/// <summary>Weights of iterated reweighting, and what they do to the covariance.</summary>
internal static class RobustWeights
{
    private const double HuberConstant = 1.345;
    private const double CauchyConstant = 2.385;
    private const double BisquareConstant = 4.685;

    /// <summary>The median absolute residual of Gaussian noise is this part of its standard deviation.</summary>
    private const double MedianOfGaussian = 0.674489750196082;

    /// <summary>Weight of a residual in units of the scale: psi(r)/r.</summary>
    public static double Weight(RobustLoss loss, double r)
    {
        double size = Math.Abs(r);
        switch (loss)
        {
            case RobustLoss.Huber:
                return size <= HuberConstant ? 1 : HuberConstant / size;
            case RobustLoss.Cauchy:
                return 1 / (1 + (r * r / (CauchyConstant * CauchyConstant)));
            case RobustLoss.Bisquare:
                double part = 1 - (r * r / (BisquareConstant * BisquareConstant));
                return part > 0 ? part * part : 0;
            default:
                return 1;
        }
    }

    /// <summary>The derivative psi'(r).</summary>
    public static double PsiSlope(RobustLoss loss, double r)
    {
        switch (loss)
        {
            case RobustLoss.Huber:
                return Math.Abs(r) <= HuberConstant ? 1 : 0;
            case RobustLoss.Cauchy:
                double u = r * r / (CauchyConstant * CauchyConstant);
                return (1 - u) / ((1 + u) * (1 + u));
            case RobustLoss.Bisquare:
                double v = r * r / (BisquareConstant * BisquareConstant);
                return v < 1 ? (1 - v) * (1 - (5 * v)) : 0;
            default:
                return 1;
        }
    }

    /// <summary>Standard deviation of the residuals by their median, the parameters counted off; sorts its argument.</summary>
    public static double Scale(Span<double> sizes, int parameters)
    {
        sizes.Sort();
        int n = sizes.Length;
        double median = n % 2 == 1 ? sizes[n / 2] : (sizes[(n / 2) - 1] + sizes[n / 2]) / 2;
        return median / MedianOfGaussian * Math.Sqrt((double)n / Math.Max(n - parameters, 1));
    }
}
