using System.Globalization;
using ScottPlot;

namespace Looseloop.Report.Plots;

/// <summary>Draws a sheet as a picture, PNG or SVG.</summary>
public static class PlotPicture
{
    // Told apart by lightness too, for grey print and for readers who see few colours (Okabe and Ito's set).
    private static readonly Color[] _colors =
        [Color.FromHex("#0072B2"), Color.FromHex("#D55E00"), Color.FromHex("#009E73"), Color.FromHex("#CC79A7"), Color.FromHex("#E69F00")];

    private static readonly Color _ink = Color.FromHex("#222222");

    /// <summary>The bytes of a PNG picture.</summary>
    public static byte[] Png(PlotSheet sheet, int widthPx, int heightPx)
    {
        using Plot plot = Draw(sheet);
        return plot.GetImageBytes(widthPx, heightPx, ImageFormat.Png);
    }

    /// <summary>The text of an SVG picture.</summary>
    public static string Svg(PlotSheet sheet, int widthPx, int heightPx)
    {
        using Plot plot = Draw(sheet);
        return plot.GetSvgXml(widthPx, heightPx);
    }

    /// <summary>Writes a picture; the ending of the file says which kind.</summary>
    /// <exception cref="ArgumentException">The ending is neither .png nor .svg.</exception>
    public static void Save(PlotSheet sheet, string path, int widthPx = 1000, int heightPx = 600)
    {
        switch (Path.GetExtension(path).ToLowerInvariant())
        {
            case ".png":
                File.WriteAllBytes(path, Png(sheet, widthPx, heightPx));
                break;
            case ".svg":
                File.WriteAllText(path, Svg(sheet, widthPx, heightPx));
                break;
            default:
                throw new ArgumentException($"{path}: a picture is a .png or a .svg file", nameof(path));
        }
    }

    private static Plot Draw(PlotSheet sheet)
    {
        EmbeddedFont.Install();
        Plot plot = new();
        plot.Font.Set(EmbeddedFont.Name);
        plot.Axes.Color(_ink);
        plot.Grid.MajorLineColor = Color.FromHex("#E4E4E4");
        for (int i = 0; i < sheet.Series.Count; i++)
        {
            Add(plot, sheet.Series[i], _colors[i % _colors.Length]);
        }

        foreach (PlotMark mark in sheet.Marks)
        {
            Color color = Color.FromHex("#666666");
            ScottPlot.Plottables.AxisLine line = mark.Vertical
                ? plot.Add.VerticalLine(mark.Value, 1, color, LinePattern.Dashed)
                : plot.Add.HorizontalLine(mark.Value, 1, color, LinePattern.Dashed);
            line.LegendText = mark.Label;
        }

        plot.Title(sheet.Title, 16);
        plot.XLabel(sheet.XLabel, 13);
        plot.YLabel(sheet.YLabel, 13);

        // A comma between thousands would be a decimal comma to half of the readers.
        Func<double, string> label = value => value.ToString("0.#######", CultureInfo.InvariantCulture);
        plot.Axes.Left.TickGenerator = new ScottPlot.TickGenerators.NumericAutomatic { LabelFormatter = label };
        plot.Axes.Bottom.TickGenerator = new ScottPlot.TickGenerators.NumericAutomatic { LabelFormatter = label };
        plot.Axes.Left.MinimumSize = 85;

        // Few lines on the legend: the marks of one kind share one.
        HashSet<string> seen = [];
        foreach (IHasLegendText item in plot.GetPlottables().OfType<IHasLegendText>().Where(item => !seen.Add(item.LegendText)))
        {
            item.LegendText = "";
        }

        plot.ShowLegend(Alignment.UpperRight);
        return plot;
    }

    private static void Add(Plot plot, PlotSeries series, Color color)
    {
        int[] kept = [.. Enumerable.Range(0, series.X.Count).Where(i => double.IsFinite(series.X[i]) && (series.Look == SeriesLook.Line || double.IsFinite(series.Y[i])))];
        double[] x = [.. kept.Select(i => series.X[i])];
        double[] y = [.. kept.Select(i => series.Y[i])];
        ScottPlot.Plottables.Scatter drawn;
        if (series.Look == SeriesLook.Line)
        {
            drawn = plot.Add.ScatterLine(x, y, color);
            drawn.LineWidth = 2;
        }
        else
        {
            if (series.HalfBars is { } bars)
            {
                ScottPlot.Plottables.ErrorBar bar = plot.Add.ErrorBar(x, y, kept.Select(i => bars[i]).ToArray());
                bar.Color = color.WithAlpha(0.5);
                bar.LegendText = "";
            }

            drawn = plot.Add.ScatterPoints(x, y, color);
            drawn.MarkerSize = x.Length > 300 ? 2 : 6;
        }

        drawn.LegendText = series.Name;
    }
}
