using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Checks;

/// <summary>Whether the samples scatter as the box's own noise does, or hum and bursts sit on them.</summary>
public static class ScatterCheck
{
    /// <summary>Largest sample over the mean, in standard deviations of the middle point, that noise alone may show.</summary>
    private const double LargestExcursion = 8;

    private const double LargestHum = 0.01;

    public static IEnumerable<Reason> Reasons(Measurement measurement)
    {
        double[] sigmas = [.. measurement.Points.Select(point => Math.Sqrt(point.SampleVariance)).Order()];
        double middle = sigmas[sigmas.Length / 2];
        double worst = measurement.Points.Max(point => Math.Max(point.Max - point.Mean, point.Mean - point.Min));
        double peak = measurement.Points.Max(point => point.Mean) - measurement.DarkBefore.Mean;
        if (worst > LargestExcursion * middle && worst > 0.02 * peak)
        {
            yield return new Reason(ReasonCode.HumOrBursts, $"Single samples stray by {worst:0} counts, {worst / middle:0} times the usual scatter.");
        }
        else if (middle > LargestHum * peak && middle > 15)
        {
            yield return new Reason(ReasonCode.HumOrBursts, $"Samples scatter by {middle:0} counts, {middle / peak:P0} of the peak.");
        }
    }
}
