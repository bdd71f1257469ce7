namespace Looseloop.Drift;

/// <summary>A straight line through weighted points (GUM, JCGM 100:2008, H.3, with weights).</summary>
/// <param name="Slope">Its slope.</param>
/// <param name="SlopeStandard">Standard uncertainty of the slope; infinite where it cannot be told.</param>
/// <param name="Intercept">The value at x = 0.</param>
/// <param name="InterceptStandard">Standard uncertainty of that.</param>
/// <param name="Correlation">Correlation of the two, -1..1.</param>
/// <param name="Scatter">What the stated uncertainties must be multiplied by to explain the scatter.</param>
public readonly record struct WeightedLine(
    double Slope, double SlopeStandard, double Intercept, double InterceptStandard, double Correlation, double Scatter)
{
    /// <summary>
    /// Fits the line. Uncertainties come from the scatter about it, widened where neighbouring residuals are alike
    /// (see <see cref="ResidualScatter"/>); with <paramref name="trustStated"/> never below the stated ones.
    /// </summary>
    public static WeightedLine Fit(
        ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> standard, bool trustStated = true)
    {
        int n = x.Length;
        if (n < 2)
        {
            return new WeightedLine(0, double.PositiveInfinity, n == 1 ? y[0] : double.NaN, double.PositiveInfinity, 0, double.NaN);
        }

        double weights = 0;
        double meanX = 0;
        double meanY = 0;
        for (int i = 0; i < n; i++)
        {
            double w = 1 / (standard[i] * standard[i]);
            weights += w;
            meanX += w * x[i];
            meanY += w * y[i];
        }

        meanX /= weights;
        meanY /= weights;
        double sxx = 0;
        double sxy = 0;
        for (int i = 0; i < n; i++)
        {
            double w = 1 / (standard[i] * standard[i]);
            sxx += w * (x[i] - meanX) * (x[i] - meanX);
            sxy += w * (x[i] - meanX) * (y[i] - meanY);
        }

        if (!(sxx > 0))
        {
            return new WeightedLine(0, double.PositiveInfinity, meanY, double.PositiveInfinity, 0, double.NaN);
        }

        double slope = sxy / sxx;
        ResidualScatter scatter = default;
        for (int i = 0; i < n; i++)
        {
            scatter.Add((y[i] - meanY - (slope * (x[i] - meanX))) / standard[i]);
        }

        double reduced = n > 2 ? scatter.SumSquares / (n - 2) : 0;
        double factor = (trustStated || n <= 2 ? Math.Max(1, reduced) : reduced) * scatter.Inflation;
        double slopeVariance = factor / sxx;
        double interceptVariance = factor * ((1 / weights) + (meanX * meanX / sxx));
        double correlation = -factor * meanX / sxx / Math.Sqrt(slopeVariance * interceptVariance);
        return new WeightedLine(
            slope, Math.Sqrt(slopeVariance), meanY - (slope * meanX), Math.Sqrt(interceptVariance), correlation, Math.Sqrt(reduced));
    }

    /// <summary>The value at <paramref name="x"/>.</summary>
    public double At(double x) => Intercept + (Slope * x);

    /// <summary>Its standard uncertainty (GUM H.3.4).</summary>
    public double StandardAt(double x) => Math.Sqrt(
        (InterceptStandard * InterceptStandard) + (x * x * SlopeStandard * SlopeStandard)
        + (2 * x * InterceptStandard * SlopeStandard * Correlation));
}
