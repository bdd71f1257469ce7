namespace Looseloop.Drift;

/// <summary>How a value moves with temperature, by a weighted line through the readings that have one.</summary>
/// <param name="PerK">Change per kelvin, in the value's unit.</param>
/// <param name="StandardPerK">Its standard uncertainty.</param>
/// <param name="PpmPerK">Change per kelvin in parts per million of the mean value.</param>
/// <param name="StandardPpmPerK">Its standard uncertainty.</param>
/// <param name="MeanC">Mean temperature, degrees Celsius.</param>
/// <param name="RangeK">Highest less lowest temperature, kelvin.</param>
/// <param name="Count">How many readings have a temperature.</param>
public sealed record TemperatureCoefficient(
    double PerK, double StandardPerK, double PpmPerK, double StandardPpmPerK, double MeanC, double RangeK, int Count)
{
    /// <summary>Over less than this many kelvin the thermistor's own errors would be read as a coefficient (common practice, no source).</summary>
    public const double LeastRangeK = 0.5;

    /// <summary>Fits it, or null where there are fewer than 8 temperatures or they span less than <see cref="LeastRangeK"/>.</summary>
    public static TemperatureCoefficient? Fit(DriftSeries series)
    {
        List<double> x = [];
        List<double> y = [];
        List<double> u = [];
        for (int i = 0; i < series.TemperatureC.Length; i++)
        {
            if (double.IsFinite(series.TemperatureC[i]))
            {
                x.Add(series.TemperatureC[i]);
                y.Add(series.Value[i]);
                u.Add(series.Standard[i]);
            }
        }

        if (x.Count < Settling.FewestReadings || x.Max() - x.Min() < LeastRangeK)
        {
            return null;
        }

        double mean = x.Average();
        double[] centred = [.. x.Select(t => t - mean)];
        WeightedLine line = WeightedLine.Fit(centred, y.ToArray(), u.ToArray());
        double ppm = 1e6 / line.Intercept;
        return new TemperatureCoefficient(
            line.Slope, line.SlopeStandard, line.Slope * ppm, line.SlopeStandard * Math.Abs(ppm), mean, x.Max() - x.Min(), x.Count);
    }
}
