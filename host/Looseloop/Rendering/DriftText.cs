using System.Globalization;
using Looseloop.Drift;
using Looseloop.Report.Plots;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>A drift analysis as a person reads it.</summary>
internal static class DriftText
{
    public static void Write(Shell shell, long run, bool q, long left, DriftAnalysis analysis)
    {
        string unit = q ? "" : " Hz";
        Line(shell, $"run {run}: {analysis.Count} sound readings over {Duration(analysis.DurationS)}{(left > 0 ? $"; {left} doubtful or without figures left out" : "")}");
        if (analysis.Model is { } model)
        {
            Model(shell, model, unit);
        }

        shell.Out.MarkupLineInterpolated($"[bold]{Word(analysis.Settling.State)}[/]: {analysis.Settling.Because}{unit}");
        if (analysis.Temperature is { } t)
        {
            Line(shell, $"with temperature: {t.PerK:+0.###;-0.###} ± {2 * t.StandardPerK:0.###}{unit} per kelvin ({t.PpmPerK:+0.#;-0.#} ± {2 * t.StandardPpmPerK:0.#} ppm/K) over {t.RangeK:0.0} K");
        }

        if (analysis.Window is { } window)
        {
            Line(shell, $"{Window(window)}");
        }

        StabilityTable(shell, analysis.Stability);
    }

    /// <summary>The run as a plot.</summary>
    public static PlotSheet Sheet(long run, bool q, DriftSeries series, DriftAnalysis analysis, double? window, double? centre)
    {
        double middle = centre ?? analysis.First;
        double originS = series.TimeS[0];
        double[] time = [.. series.TimeS.ToArray().Select(t => t - originS)];
        double[]? bars = series.Count <= 300 ? [.. series.Standard.ToArray().Select(u => 2 * u)] : null;
        Func<double, double>? model = analysis.Model is { Terms.Count: > 0 } fitted ? t => fitted.At(t + originS) : null;
        return DriftSheet.Of(
            $"run {run}", q ? "Q" : "f0 in Hz", time, series.Value.ToArray(), bars, model, window is { } half && half > 0 ? [middle - half, middle + half] : []);
    }

    private static void Model(Shell shell, WarmUpModel model, string unit)
    {
        if (model.Terms.Count == 0)
        {
            Line(shell, $"no warm-up is seen; mean {Figures.Value(model.End, 2 * model.EndStandard)} ± {Figures.Uncertainty(2 * model.EndStandard)}{unit}");
            return;
        }

        if (!model.AtBound)
        {
            Line(shell, $"ends at {Figures.Value(model.End, 2 * model.EndStandard)} ± {Figures.Uncertainty(2 * model.EndStandard)}{unit}");
        }

        for (int i = 0; i < model.Terms.Count; i++)
        {
            double amplitude = 2 * model.AmplitudeStandard(i);
            double tau = 2 * model.TauStandardS(i);
            Line(shell, $"from {Figures.Value(model.Terms[i].Amplitude, amplitude)} ± {Figures.Uncertainty(amplitude)}{unit} off, with a time constant of {Figures.Value(model.Terms[i].TauS, tau)} ± {Figures.Uncertainty(tau)} s");
        }
    }

    private static void StabilityTable(Shell shell, Stability stability)
    {
        if (stability.Points.Count == 0)
        {
            return;
        }

        Table table = new Table().Border(TableBorder.Simple)
            .Title(stability.DriftRemoved ? "Allan deviation, the warm-up taken off" : "Allan deviation")
            .AddColumns("averaging s", "overlapping", "modified", "total", "± about");
        foreach (StabilityPoint point in stability.Points)
        {
            table.AddRow(
                Text($"{point.AveragingS:0.###}"), Text($"{point.Overlapping:0.00e+0}"), double.IsFinite(point.Modified) ? Text($"{point.Modified:0.00e+0}") : "-",
                Text($"{point.Total:0.00e+0}"), Text($"{100 * point.RelativeStandard:0} %"));
        }

        shell.Out.Write(table);
    }

    private static string Window(WindowExit window) => window.Kind switch
    {
        WindowExitKind.Stays => "window: stays inside",
        WindowExitKind.Leaves => Text($"window: left {Duration(window.TimeS)} ± {Duration(2 * window.StandardS)} after the first reading (between {Duration(window.EarliestS)} and {Duration(window.LatestS)})"),
        WindowExitKind.MayLeave when double.IsFinite(window.EarliestS) => Text($"window: may be left, from {Duration(window.EarliestS)} on; the end lies too near its edge to tell"),
        WindowExitKind.Outside => "window: outside from the first reading on",
        _ => "window: when it is left cannot be told from this run",
    };

    private static string Word(SettledState state) => state switch
    {
        SettledState.Settled => "settled",
        SettledState.NotSettled => "not settled",
        _ => "not determinable",
    };

    private static string Duration(double seconds) => double.IsPositiveInfinity(seconds) ? "never"
        : seconds >= 2 * 3600 ? Text($"{seconds / 3600:0.0} h")
        : seconds >= 120 ? Text($"{seconds / 60:0.0} min")
        : Text($"{seconds:0.#} s");

    private static void Line(Shell shell, FormattableString text) => shell.Out.WriteLine(Text(text));

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
