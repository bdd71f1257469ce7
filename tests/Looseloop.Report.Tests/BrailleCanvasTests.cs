using Looseloop.Report.Plots;
using Spectre.Console.Testing;

namespace Looseloop.Report.Tests;

public class BrailleCanvasTests
{
    private static string[] Draw(PlotSheet sheet, bool unicode, int width = 80, int height = 12)
    {
        using TestConsole console = new();
        console.Profile.Capabilities.Unicode = unicode;
        console.Profile.Width = width;
        console.Write(new BrailleCanvas(sheet, height) { Width = width });
        return console.Output.TrimEnd('\n').Split('\n');
    }

    private static PlotSheet Of(double[] x, double[] y, SeriesLook look = SeriesLook.Points) =>
        new("title", "x in s", "y in Hz", [new PlotSeries("one", x, y, look)]);

    // The dot of each cell by The Unicode Standard, Braille Patterns: bit 0x08 is the upper right dot, 0x40 the lower left.
    [Fact]
    public void Corners_of_the_range_fall_on_corner_dots()
    {
        string[] lines = Draw(Of([0, 1], [0, 1], SeriesLook.Line), unicode: true, width: 40, height: 4);
        Assert.Equal(0x08, lines[1].TrimEnd()[^1] & 0x08);
        Assert.Equal(0x40, lines[4].First(c => c > '\u2800' && c <= '\u28FF') & 0x40);
    }

    [Fact]
    public void A_line_passes_every_column_and_never_jumps_a_row()
    {
        double[] x = [.. Enumerable.Range(0, 50).Select(i => i / 49.0)];
        string[] lines = Draw(Of(x, [.. x.Select(v => v * v)], SeriesLook.Line), unicode: true, width: 60, height: 10);
        string[] area = [.. lines.Skip(1).Take(10).Select(line => line[(line.IndexOfAny(['\u2502', '\u2524']) + 1)..].PadRight(60))];
        int columns = area.Max(line => line.TrimEnd().Length);
        for (int c = 0; c < columns; c++)
        {
            Assert.Contains(area, line => line[c] is >= '\u2801' and <= '\u28FF');
        }
    }

    [Fact]
    public void Without_Unicode_every_character_is_ASCII()
    {
        foreach (string line in Draw(Sheets.Drift(), unicode: false))
        {
            Assert.DoesNotContain(line, c => c > 126);
        }

        Assert.Contains(Draw(Sheets.Drift(), unicode: false), line => line.Contains('*', StringComparison.Ordinal));
    }

    [Theory]
    [InlineData(true, 40)]
    [InlineData(true, 100)]
    [InlineData(false, 60)]
    public void No_line_of_the_plot_is_wider_than_allowed(bool unicode, int width)
    {
        string[] lines = Draw(Of([0, 5, 10], [149990.25, 150000.5, 150003]), unicode, width);
        Assert.All(lines, line => Assert.InRange(line.Length, 0, width));
    }

    [Fact]
    public void Values_that_are_not_numbers_leave_a_gap_and_an_empty_sheet_is_drawn()
    {
        Assert.NotEmpty(Draw(Of([0, 1, 2], [1, double.NaN, 3], SeriesLook.Line), unicode: true));
        Assert.NotEmpty(Draw(Of([], []), unicode: true));
        Assert.NotEmpty(Draw(Of([1, 2], [5, 5]), unicode: true));
    }

    [Fact]
    public void Axes_carry_labels_and_the_legend_names_the_series()
    {
        string text = string.Join('\n', Draw(Sheets.Drift(), unicode: true, width: 100));
        Assert.Contains("150000", text, StringComparison.Ordinal);
        Assert.Contains("time in min", text, StringComparison.Ordinal);
        Assert.Contains("readings", text, StringComparison.Ordinal);
        Assert.Contains("warm-up", text, StringComparison.Ordinal);
        Assert.Contains("window", text, StringComparison.Ordinal);
    }
}
