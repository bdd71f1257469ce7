namespace Looseloop.Drift;

/// <summary>
/// One quantity over time: f0 in hertz, or Q. Times rise strictly; every value is finite. Where no uncertainty is known the
/// standard uncertainties are all equal, and only ratios of what comes out of the scatter count.
/// </summary>
public sealed class DriftSeries
{
    private readonly double[] _timeS;
    private readonly double[] _value;
    private readonly double[] _standard;
    private readonly double[]? _temperatureC;

    private DriftSeries(double[] timeS, double[] value, double[] standard, double[]? temperatureC)
    {
        _timeS = timeS;
        _value = value;
        _standard = standard;
        _temperatureC = temperatureC;
    }

    /// <summary>How many readings.</summary>
    public int Count => _timeS.Length;

    /// <summary>Times, seconds from an arbitrary zero.</summary>
    public ReadOnlySpan<double> TimeS => _timeS;

    /// <summary>The quantity, in its unit.</summary>
    public ReadOnlySpan<double> Value => _value;

    /// <summary>Standard uncertainty of each value by repeatability, in the value's unit; above zero.</summary>
    public ReadOnlySpan<double> Standard => _standard;

    /// <summary>Temperatures, degrees Celsius; empty where there is no such column, NaN where one is missing.</summary>
    public ReadOnlySpan<double> TemperatureC => _temperatureC;

    /// <summary>From first to last, seconds.</summary>
    public double DurationS => Count == 0 ? 0 : _timeS[^1] - _timeS[0];

    /// <summary>
    /// A series of points in any order. Points without a finite time and value are left out, and so are repeated times
    /// (the first one counts).
    /// </summary>
    public static DriftSeries Of(IEnumerable<DriftPoint> points)
    {
        List<DriftPoint> kept = [.. points.Where(p => double.IsFinite(p.TimeS) && double.IsFinite(p.Value))];
        bool ordered = true;
        for (int i = 1; i < kept.Count && ordered; i++)
        {
            ordered = kept[i].TimeS > kept[i - 1].TimeS;
        }

        if (!ordered)
        {
            kept = [.. kept.OrderBy(p => p.TimeS).DistinctBy(p => p.TimeS)];
        }

        double[] time = new double[kept.Count];
        double[] value = new double[kept.Count];
        double[] standard = new double[kept.Count];
        double[] temperature = new double[kept.Count];
        bool warm = false;
        bool known = kept.Count > 0;
        for (int i = 0; i < kept.Count; i++)
        {
            time[i] = kept[i].TimeS;
            value[i] = kept[i].Value;
            standard[i] = kept[i].Standard;
            temperature[i] = kept[i].TemperatureC;
            warm |= double.IsFinite(temperature[i]);
            known &= standard[i] > 0 && double.IsFinite(standard[i]);
        }

        if (!known)
        {
            // A weight that is missing for some would throw those away or let them rule: then all count alike.
            Array.Fill(standard, AdjacentScatter(value));
        }

        return new DriftSeries(time, value, standard, warm ? temperature : null);
    }

    /// <summary>The points from one index on, <paramref name="count"/> of them.</summary>
    internal DriftSeries Slice(int from, int count) => new(
        _timeS.AsSpan(from, count).ToArray(), _value.AsSpan(from, count).ToArray(), _standard.AsSpan(from, count).ToArray(),
        _temperatureC?.AsSpan(from, count).ToArray());

    /// <summary>The same times with other values.</summary>
    internal DriftSeries WithValues(double[] value) => new(_timeS, value, _standard, _temperatureC);

    // Differences of neighbours over sqrt 2: a drift that is slow against the spacing does not enter.
    private static double AdjacentScatter(double[] value)
    {
        double sum = 0;
        for (int i = 1; i < value.Length; i++)
        {
            sum += (value[i] - value[i - 1]) * (value[i] - value[i - 1]);
        }

        double sd = value.Length > 1 ? Math.Sqrt(sum / (2.0 * (value.Length - 1))) : 0;
        return sd > 0 ? sd : Math.Max(Math.Abs(value.Length > 0 ? value[0] : 1) * 1e-12, double.Epsilon * 1e20);
    }
}
