namespace Looseloop.Report.Plots;

/// <summary>A value over time: readings, the model through them, and the edges of a window.</summary>
public static class DriftSheet
{
    /// <summary>More points than this tell nothing more on a page.</summary>
    private const int MostColumns = 1000;

    /// <summary>Lays the plot out; the unit of time follows the length of the run.</summary>
    /// <param name="title">Its title.</param>
    /// <param name="valueLabel">What the value is, with its unit.</param>
    /// <param name="timeS">Times of the readings, seconds.</param>
    /// <param name="value">The readings.</param>
    /// <param name="halfBars">Their expanded uncertainties, or null.</param>
    /// <param name="model">The model's value at a time, or null for none.</param>
    /// <param name="edges">The edges of the window, or none.</param>
    public static PlotSheet Of(
        string title, string valueLabel, IReadOnlyList<double> timeS, IReadOnlyList<double> value, IReadOnlyList<double>? halfBars,
        Func<double, double>? model, IReadOnlyList<double> edges)
    {
        double last = timeS.Count > 0 ? timeS[^1] : 0;
        (double unitS, string unit) = last >= 3 * 3600 ? (3600.0, "h") : last >= 300 ? (60.0, "min") : (1.0, "s");
        PlotSeries readings = new("readings", [.. timeS.Select(t => t / unitS)], value, SeriesLook.Points, halfBars);
        List<PlotSeries> series = [readings.Thinned(MostColumns)];
        if (model is not null && timeS.Count > 1)
        {
            double[] at = [.. Enumerable.Range(0, 301).Select(i => timeS[0] + ((last - timeS[0]) * i / 300.0))];
            series.Add(new PlotSeries("warm-up", [.. at.Select(t => t / unitS)], [.. at.Select(model)], SeriesLook.Line));
        }

        return new PlotSheet(title, $"time in {unit}", valueLabel, series)
        {
            Marks = [.. edges.Select(edge => new PlotMark(false, edge, "window"))],
        };
    }
}
