namespace Looseloop.Drift;

/// <summary>Everything that is said about a series: model, rest, temperature, window, stability.</summary>
/// <param name="Count">How many readings.</param>
/// <param name="DurationS">From first to last, seconds.</param>
/// <param name="First">The model's value at the first reading, or the reading itself without a model.</param>
/// <param name="Last">The same at the last.</param>
/// <param name="Model">The warm-up with as many terms as the data ask for; null for fewer than 3 readings.</param>
/// <param name="Settling">Settled, not settled, or not determinable.</param>
/// <param name="Temperature">The temperature coefficient, or null where there is no column for it.</param>
/// <param name="Window">When the window is left, or null where none was asked for.</param>
/// <param name="Stability">Allan deviations of what the model leaves.</param>
public sealed record DriftAnalysis(
    int Count, double DurationS, double First, double Last, WarmUpModel? Model, Settling Settling,
    TemperatureCoefficient? Temperature, WindowExit? Window, Stability Stability)
{
    /// <summary>Analyses a series. Time and memory are of order N; a million readings take some seconds at most.</summary>
    public static DriftAnalysis Of(DriftSeries series, DriftOptions options)
    {
        if (series.Count == 0)
        {
            throw new ArgumentException("a series without a reading has no drift", nameof(series));
        }

        WarmUpModel? model = WarmUpFit.Choose(series);
        double firstS = series.TimeS[0];
        double first = model?.At(firstS) ?? series.Value[0];
        double last = model?.At(series.TimeS[^1]) ?? series.Value[^1];
        double limit = options.ReadingExpanded ?? 2 * Median(series.Standard);
        WindowExit? window = options.WindowHalfWidth is { } half
            ? WindowExit.Find(model, options.WindowCentre ?? first, half, firstS)
            : null;
        return new DriftAnalysis(
            series.Count, series.DurationS, first, last, model, Settling.Judge(series, model, limit, options.UseS),
            TemperatureCoefficient.Fit(series), window, Stability.Of(series, model));
    }

    private static double Median(ReadOnlySpan<double> values)
    {
        double[] sorted = values.ToArray();
        Array.Sort(sorted);
        return sorted[sorted.Length / 2];
    }
}
