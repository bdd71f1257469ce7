using Spectre.Console;
using Spectre.Console.Rendering;

namespace Looseloop.Report.Plots;

/// <summary>
/// Draws a sheet on the terminal: eight dots to a character (Unicode braille patterns, U+2800 on), or one mark to a character
/// where the terminal has no Unicode. Axes with round values, the title above, the legend below.
/// </summary>
public sealed class BrailleCanvas : IRenderable
{
    private static readonly Color[] _colors = [Color.DodgerBlue1, Color.Orange1, Color.Green3, Color.Orchid, Color.Yellow3];

    private readonly PlotSheet _sheet;
    private readonly int _height;

    /// <param name="sheet">What to draw.</param>
    /// <param name="heightCells">Height of the plot area, characters, 3 or more.</param>
    public BrailleCanvas(PlotSheet sheet, int heightCells = 14)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(heightCells, 3);
        _sheet = sheet;
        _height = heightCells;
    }

    /// <summary>The width to take, characters, or null for all there is up to 100.</summary>
    public int? Width { get; init; }

    /// <inheritdoc/>
    public Measurement Measure(RenderOptions options, int maxWidth)
    {
        int width = Math.Min(Width ?? 100, maxWidth);
        return new Measurement(Math.Min(30, width), width);
    }

    /// <inheritdoc/>
    public IEnumerable<Segment> Render(RenderOptions options, int maxWidth)
    {
        int width = Math.Min(Width ?? 100, maxWidth);
        (double yLow, double yHigh) = _sheet.YRange();
        (double xLow, double xHigh) = _sheet.XRange();
        AxisTicks yTicks = AxisTicks.Of(yLow, yHigh, Math.Max(2, _height / 3));
        int gutter = yTicks.Labels.Max(label => label.Length);
        int columns = Math.Max(8, width - gutter - 2);
        DotField field = options.Unicode ? new BrailleField(columns, _height) : new CharacterField(columns, _height);
        DotPainter painter = new(field, xLow, xHigh, yLow, yHigh);
        foreach (PlotMark mark in _sheet.Marks)
        {
            painter.Mark(mark);
        }

        // Lines first, marks of measured points over them.
        foreach (PlotSeries series in _sheet.Series.OrderBy(series => series.Look == SeriesLook.Line ? 0 : 1))
        {
            painter.Series(series, IndexOf(series));
        }

        return Lines(options, field, yTicks, AxisTicks.Of(xLow, xHigh, Math.Max(2, columns / 14)), gutter, (xLow, xHigh, yLow, yHigh));
    }

    private List<Segment> Lines(
        RenderOptions options, DotField field, AxisTicks yTicks, AxisTicks xTicks, int gutter, (double XLow, double XHigh, double YLow, double YHigh) range)
    {
        List<Segment> segments = [];
        string bar = options.Unicode ? "\u2502" : "|";
        string notch = options.Unicode ? "\u2524" : "+";
        Text(_sheet.YLabel + "   " + _sheet.Title, Style.Plain);
        for (int row = 0; row < field.Rows; row++)
        {
            string label = "";
            for (int t = 0; t < yTicks.Values.Count; t++)
            {
                double share = (range.YHigh - yTicks.Values[t]) / (range.YHigh - range.YLow);
                if ((int)Math.Round(share * (field.Rows - 1)) == row)
                {
                    label = yTicks.Labels[t];
                }
            }

            segments.Add(new Segment(label.PadLeft(gutter) + " " + (label.Length > 0 ? notch : bar), new Style(Color.Grey)));
            field.AppendRow(row, segments, Ink);
            segments.Add(Segment.LineBreak);
        }

        Text(new string(' ', gutter + 1) + (options.Unicode ? "\u2514" + new string('\u2500', field.Columns) : "+" + new string('-', field.Columns)), new Style(Color.Grey));
        Text(new string(' ', gutter + 2) + TickLine(xTicks, range.XLow, range.XHigh, field.Columns), new Style(Color.Grey));
        segments.Add(new Segment(new string(' ', gutter + 2) + _sheet.XLabel));
        for (int i = 0; i < _sheet.Series.Count; i++)
        {
            segments.Add(new Segment("   " + field.Key(i) + " " + _sheet.Series[i].Name, Ink(i)));
        }

        foreach (string label in _sheet.Marks.Select(mark => mark.Label).Distinct())
        {
            segments.Add(new Segment("   " + field.Key(-1) + " " + label, Ink(-1)));
        }

        segments.Add(Segment.LineBreak);
        return segments;

        void Text(string text, Style style)
        {
            segments.Add(new Segment(text, style));
            segments.Add(Segment.LineBreak);
        }
    }

    private static Style Ink(int series) => series < 0 ? new Style(Color.Grey) : new Style(_colors[series % _colors.Length]);

    // Labels under their values; one that would run into its neighbour, or over the end, is left out.
    private static string TickLine(AxisTicks ticks, double low, double high, int columns)
    {
        char[] line = new char[columns];
        Array.Fill(line, ' ');
        int free = 0;
        for (int t = 0; t < ticks.Values.Count; t++)
        {
            string label = ticks.Labels[t];
            int centre = (int)Math.Round((ticks.Values[t] - low) / (high - low) * (columns - 1));
            int start = Math.Clamp(centre - (label.Length / 2), 0, Math.Max(0, columns - label.Length));
            if (start >= free && start + label.Length <= columns)
            {
                label.CopyTo(0, line, start, label.Length);
                free = start + label.Length + 1;
            }
        }

        return new string(line).TrimEnd();
    }

    private int IndexOf(PlotSeries series)
    {
        for (int i = 0; i < _sheet.Series.Count; i++)
        {
            if (ReferenceEquals(_sheet.Series[i], series))
            {
                return i;
            }
        }

        return 0;
    }
}
