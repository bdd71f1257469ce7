namespace Looseloop.Report.Plots;

/// <summary>What a plot shows, whatever draws it: the terminal or a picture.</summary>
/// <param name="Title">Its title.</param>
/// <param name="XLabel">What x is, with the unit.</param>
/// <param name="YLabel">What y is, with the unit.</param>
/// <param name="Series">The series, drawn in order.</param>
public sealed record PlotSheet(string Title, string XLabel, string YLabel, IReadOnlyList<PlotSeries> Series)
{
    /// <summary>Lines across the plot.</summary>
    public IReadOnlyList<PlotMark> Marks { get; init; } = [];

    /// <summary>The range of finite values along x, marks included; 0..1 where there are none.</summary>
    public (double Low, double High) XRange() => Range(
        Series.SelectMany(s => Finite(s).Select(i => s.X[i])).Concat(Marks.Where(m => m.Vertical).Select(m => m.Value)));

    /// <summary>The range of finite values along y, marks included; 0..1 where there are none.</summary>
    public (double Low, double High) YRange() => Range(
        Series.SelectMany(s => Finite(s).Select(i => s.Y[i])).Concat(Marks.Where(m => !m.Vertical).Select(m => m.Value)));

    private static IEnumerable<int> Finite(PlotSeries series) =>
        Enumerable.Range(0, series.X.Count).Where(i => double.IsFinite(series.X[i]) && double.IsFinite(series.Y[i]));

    private static (double Low, double High) Range(IEnumerable<double> values)
    {
        double low = double.PositiveInfinity;
        double high = double.NegativeInfinity;
        foreach (double value in values)
        {
            low = Math.Min(low, value);
            high = Math.Max(high, value);
        }

        if (low > high)
        {
            return (0, 1);
        }

        // A flat line gets room above and below, or it would fall onto the frame.
        double room = high > low ? 0 : Math.Max(Math.Abs(low) * 1e-6, 1e-9);
        return (low - room, high + room);
    }
}
