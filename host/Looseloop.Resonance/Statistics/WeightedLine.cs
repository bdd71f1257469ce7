namespace Looseloop.Resonance;

/// <summary>
/// A straight line y = a + b x through points by weighted least squares, with its covariance (GUM H.3). Sums are taken about the
/// weighted mean, so that a small slope on a large value keeps its digits.
/// </summary>
public readonly record struct WeightedLine
{
    private WeightedLine(double meanX, double meanY, double slope, double meanVariance, double slopeVariance)
    {
        MeanX = meanX;
        MeanY = meanY;
        Slope = slope;
        MeanVariance = meanVariance;
        SlopeVariance = slopeVariance;
    }

    /// <summary>Weighted mean of x; there, value and slope are uncorrelated.</summary>
    public double MeanX { get; }

    /// <summary>The line's value at <see cref="MeanX"/>.</summary>
    public double MeanY { get; }

    public double Slope { get; }

    /// <summary>Variance of <see cref="MeanY"/>.</summary>
    public double MeanVariance { get; }

    public double SlopeVariance { get; }

    /// <summary>Sum of squared residuals over their variances.</summary>
    public double ChiSquare { get; private init; }

    /// <summary>Points less two.</summary>
    public int DegreesOfFreedom { get; private init; }

    /// <summary>The line's value at x = 0.</summary>
    public double Intercept => At(0);

    /// <summary>Standard uncertainty of <see cref="Intercept"/>.</summary>
    public double InterceptStandard => StandardAt(0);

    /// <summary>Standard uncertainty of <see cref="Slope"/>.</summary>
    public double SlopeStandard => Math.Sqrt(SlopeVariance);

    /// <summary>Correlation of intercept and slope.</summary>
    public double Correlation => -MeanX * SlopeStandard / InterceptStandard;

    /// <summary>The line through points of stated variances.</summary>
    /// <param name="x">At least two different values.</param>
    /// <param name="y">As many.</param>
    /// <param name="variance">Variances of y, all above 0.</param>
    /// <param name="line">The line.</param>
    /// <returns>False where the points do not determine a line.</returns>
    public static bool TryFit(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> variance, out WeightedLine line)
    {
        double weights = 0, sumX = 0, sumY = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double w = 1 / variance[i];
            weights += w;
            sumX += w * x[i];
            sumY += w * y[i];
        }

        double meanX = sumX / weights;
        double meanY = sumY / weights;
        double squares = 0, products = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double w = 1 / variance[i];
            squares += w * (x[i] - meanX) * (x[i] - meanX);
            products += w * (x[i] - meanX) * (y[i] - meanY);
        }

        line = default;
        double slope = products / squares;
        if (x.Length < 2 || !double.IsFinite(slope) || !double.IsFinite(meanY))
        {
            return false;
        }

        double chi = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double r = y[i] - meanY - (slope * (x[i] - meanX));
            chi += r * r / variance[i];
        }

        line = new WeightedLine(meanX, meanY, slope, 1 / weights, 1 / squares)
        {
            ChiSquare = chi,
            DegreesOfFreedom = x.Length - 2,
        };
        return true;
    }

    /// <summary>The line through points of equal, unknown variance, which is taken from their scatter; at least three.</summary>
    public static bool TryFit(ReadOnlySpan<double> x, ReadOnlySpan<double> y, out WeightedLine line)
    {
        double[] ones = new double[x.Length];
        Array.Fill(ones, 1);
        if (x.Length < 3 || !TryFit(x, y, ones, out WeightedLine plain))
        {
            line = default;
            return false;
        }

        line = plain.Scaled(plain.ChiSquare / plain.DegreesOfFreedom);
        return true;
    }

    /// <summary>The line's value.</summary>
    public double At(double x) => MeanY + (Slope * (x - MeanX));

    /// <summary>Standard uncertainty of the line's value.</summary>
    public double StandardAt(double x) => Math.Sqrt(MeanVariance + ((x - MeanX) * (x - MeanX) * SlopeVariance));

    /// <summary>The same line with all variances multiplied by a factor.</summary>
    public WeightedLine Scaled(double factor) =>
        new(MeanX, MeanY, Slope, MeanVariance * factor, SlopeVariance * factor)
        {
            ChiSquare = ChiSquare / factor,
            DegreesOfFreedom = DegreesOfFreedom,
        };
}
