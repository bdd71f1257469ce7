using System.Globalization;

namespace Looseloop.CommandLine.Tests;

/// <summary>What <c>fit</c> says to tables of all sorts. Curves are the exact RLC magnitude, written here.</summary>
public sealed class FitFileTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("looseloop-fit").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public void A_clean_table_is_sound_and_right()
    {
        AppRun run = Fit(Curve(151_000, 120, 60, -5, 5));
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("151 000", run.Out);
        Assert.Contains("sound", run.Out);
    }

    [Theory]
    [InlineData("frequency_khz,amplitude\n", 1e-3)]
    [InlineData("f (MHz); level\n", 1e-6)]
    [InlineData("frequency/Hz\tamplitude\n", 1)]
    public void A_header_names_unit_and_columns(string header, double unit)
    {
        char separator = header.Contains(';') ? ';' : header.Contains('\t') ? '\t' : ',';
        string rows = string.Join('\n', Points(98_000, 80, 50, -4, 4).Select(p => Row(p.Hz * unit, p.Y, separator)));
        AppRun run = Fit(header + rows);
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("98 000", run.Out);
    }

    [Theory]
    [InlineData("1000,1\n1010,abc\n1020,1\n", "line 2", "'abc'")]
    [InlineData("1000,1\n1010,NaN\n1020,1\n", "line 2", "NaN")]
    [InlineData("1000,1\n1010\n", "line 2", "no amplitude")]
    [InlineData("1000,1\n-5,1\n", "line 2", "above 0")]
    [InlineData("", "no points", "amplitudes")]
    public void A_table_that_is_none_names_the_line_and_is_exit_code_2(string text, string where, string what)
    {
        AppRun run = Fit(text);
        Assert.Equal(2, run.ExitCode);
        Assert.Empty(run.Out);
        Assert.Contains(where, run.Error);
        Assert.Contains(what, run.Error);
    }

    [Fact]
    public void A_missing_file_is_exit_code_2()
    {
        AppRun run = AppRun.Of("fit", Path.Combine(_folder, "none.csv"));
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("There is no file", run.Error);
    }

    [Fact]
    public void One_point_is_no_reading()
    {
        AppRun run = Fit("150000,1\n");
        Assert.Equal(5, run.ExitCode);
        Assert.Contains("too-few-points", run.Out);
        Assert.DoesNotContain("sound", run.Out);
    }

    [Fact]
    public void Unsorted_and_repeated_frequencies_are_said_and_do_no_harm()
    {
        (double Hz, double Y)[] points = Points(151_000, 120, 60, -5, 5);
        var random = new Random(3);
        (double Hz, double Y)[] shuffled = [.. points.Concat(points.Take(7)).OrderBy(_ => random.Next())];
        AppRun run = Fit(string.Join('\n', shuffled.Select(p => Row(p.Hz, p.Y, ','))));
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("151 000", run.Out);
        Assert.Contains("7 frequencies occur more than once", run.Error);
        Assert.Contains("not in order", run.Error);
    }

    [Fact]
    public void Noise_without_a_peak_is_no_reading()
    {
        var random = new Random(4);
        string rows = string.Join('\n', Enumerable.Range(0, 50).Select(i => Row(100_000 + (i * 500), 1 + (0.01 * random.NextDouble()), ',')));
        AppRun run = Fit(rows);
        Assert.Equal(5, run.ExitCode);
        Assert.DoesNotContain("sound", run.Out);
    }

    [Fact]
    public void A_peak_at_the_edge_is_not_sound()
    {
        AppRun run = Fit(Curve(151_000, 120, 40, -0.2, 6));
        Assert.Equal(5, run.ExitCode);
        Assert.Contains("peak-at-edge", run.Out);
    }

    [Fact]
    public void A_flat_top_is_not_sound()
    {
        string rows = string.Join('\n', Points(151_000, 120, 61, -4, 4).Select(p => Row(p.Hz, Math.Min(p.Y, 0.8), ',')));
        AppRun run = Fit(rows);
        Assert.Equal(5, run.ExitCode);
        Assert.Contains("saturated", run.Out);
    }

    [Fact]
    public void Output_does_not_depend_on_the_culture()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        AppRun here = Fit(Curve(151_000, 120, 60, -5, 5));
        try
        {
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo("de-DE");
            Assert.Equal(here.Out, Fit(Curve(151_000, 120, 60, -5, 5)).Out);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    private AppRun Fit(string text)
    {
        string path = Path.Combine(_folder, "table.csv");
        File.WriteAllText(path, text);
        AppRun run = AppRun.Of("fit", path);
        Assert.DoesNotContain("   at ", run.Error + run.Out);
        return run;
    }

    private static string Curve(double f0, double q, int count, double low, double high) =>
        string.Join('\n', Points(f0, q, count, low, high).Select(p => Row(p.Hz, p.Y, ',')));

    private static (double Hz, double Y)[] Points(double f0, double q, int count, double low, double high)
    {
        // A trace of noise, so that the scatter the uncertainty comes from is not zero.
        var random = new Random(1);
        return
        [
            .. Enumerable.Range(0, count).Select(i =>
            {
                double hz = f0 + ((low + ((high - low) * i / (count - 1))) * f0 / q);
                double x = q * ((hz / f0) - (f0 / hz));
                return (hz, (1 / Math.Sqrt(1 + (x * x))) + (2e-4 * (random.NextDouble() - 0.5)));
            }),
        ];
    }

    private static string Row(double x, double y, char separator) =>
        string.Create(CultureInfo.InvariantCulture, $"{x:R}{separator}{y:R}");
}
