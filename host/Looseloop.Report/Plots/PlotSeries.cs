namespace Looseloop.Report.Plots;

/// <summary>One series of a plot. Points with a value that is not finite leave a gap.</summary>
/// <param name="Name">Its name in the legend.</param>
/// <param name="X">Where, in the unit of the x axis.</param>
/// <param name="Y">What, in the unit of the y axis; as many as X.</param>
/// <param name="Look">Marks or a line.</param>
/// <param name="HalfBars">Half-lengths of vertical bars (expanded uncertainties), as many as X, or null for none.</param>
public sealed record PlotSeries(
    string Name, IReadOnlyList<double> X, IReadOnlyList<double> Y, SeriesLook Look, IReadOnlyList<double>? HalfBars = null)
{
    /// <summary>
    /// The series thinned for drawing: of each of <paramref name="columns"/> stretches along its points the lowest and the
    /// highest stay, so that no excursion is lost.
    /// </summary>
    public PlotSeries Thinned(int columns)
    {
        if (X.Count <= 4 * columns)
        {
            return this;
        }

        List<int> kept = [];
        for (int c = 0; c < columns; c++)
        {
            int from = (int)((long)X.Count * c / columns);
            int to = (int)((long)X.Count * (c + 1) / columns);
            int low = -1;
            int high = -1;
            for (int i = from; i < to; i++)
            {
                if (double.IsFinite(Y[i]))
                {
                    low = low < 0 || Y[i] < Y[low] ? i : low;
                    high = high < 0 || Y[i] > Y[high] ? i : high;
                }
            }

            if (low >= 0)
            {
                kept.Add(Math.Min(low, high));
                if (low != high)
                {
                    kept.Add(Math.Max(low, high));
                }
            }
        }

        return this with
        {
            X = [.. kept.Select(i => X[i])],
            Y = [.. kept.Select(i => Y[i])],
            HalfBars = null,
        };
    }
}
