using System.CommandLine;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Report.Plots;
using Looseloop.Terminal;
using Spectre.Console;
using BrailleCanvas = Looseloop.Report.Plots.BrailleCanvas;

namespace Looseloop.Commands;

/// <summary><c>show</c>: one reading of the record, with its raw points on a curve.</summary>
internal sealed class ShowCommand(Shell shell)
{
    private readonly Argument<string> _which = new("READING")
    {
        Description = "Its number, last, previous, or a note.",
        DefaultValueFactory = _ => "last",
    };

    private readonly Option<bool> _budget = new("--budget") { Description = "Show the uncertainty budget." };
    private readonly Option<string?> _plot = new("--plot") { Description = "Draw the points into a .png or .svg file.", HelpName = "FILE" };

    public static Command Create(Shell shell) => new ShowCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("show", "Show one reading of the record.")
        {
            Arguments = { _which },
            Options = { _budget, _plot, RecordChoice.RecordOption },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        using RecordReader record = RecordChoice.OpenForReading(shell, parsed);
        long number = record.Find(parsed.GetValue(_which)!);
        ReadingSummary figures = record.Figures(number);
        Reading reading = record.Reading(number);
        RunDocument run = record.Run(figures.Run);
        PlotSheet sheet = Sheet(number, reading);
        if (parsed.GetValue(_plot) is string path)
        {
            PlotOutput.Save(shell, path, sheet);
        }

        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("reading", number);
                json.WriteNumber("run", figures.Run);
                json.Figure("refit_of", figures.RefitOf ?? double.NaN);
                json.WriteStartArray("refits");
                foreach (ReadingSummary refit in record.Refits(number))
                {
                    json.WriteNumberValue(refit.Number);
                }

                json.WriteEndArray();
                ReadingJson.Write(json, reading);
            }));
            return ExitCode.Ok;
        }

        ShowHead(number, figures, reading, run);
        ReadingText.Write(shell.Out, reading);
        if (parsed.GetValue(_budget))
        {
            ReadingText.WriteBudget(shell.Out, reading);
        }

        if (reading.Points.Count > 1)
        {
            shell.Out.Write(new BrailleCanvas(sheet, 10));
        }

        ShowRefits(record, number);
        if (!parsed.GetValue(CommonOptions.Quiet))
        {
            ReadingText.WriteNotes(shell.ErrorConsole, reading);
        }

        return ExitCode.Ok;
    }

    private void ShowHead(long number, ReadingSummary figures, Reading reading, RunDocument run)
    {
        string refit = figures.RefitOf is { } of ? $", refit of reading {of}" : "";
        shell.Out.MarkupLineInterpolated($"[bold]reading {number}[/]{refit}, {RecordWords.Time(shell, reading.Utc)}, run {figures.Run} ({run.Start.Procedure}, {RecordWords.Status(run.Stop)})");
        if (reading.Coil is not null || reading.Note is not null)
        {
            shell.Out.MarkupLineInterpolated($"{(reading.Coil is null ? "" : $"coil {reading.Coil}")}{(reading.Coil is null || reading.Note is null ? "" : ", ")}{reading.Note}");
        }

        if (reading.SetUp.Count > 0)
        {
            shell.Out.MarkupLineInterpolated($"set-up: {string.Join(", ", reading.SetUp.Select(pair => $"{pair.Key} {pair.Value}"))}");
        }

        shell.Out.MarkupLineInterpolated(
            $"[dim]box {reading.Box.Port} ({reading.Box.Board}, firmware {reading.Box.FirmwareVersion}), host {reading.HostVersion}, id {figures.Id}[/]");
    }

    private void ShowRefits(RecordReader record, long number)
    {
        foreach (ReadingSummary refit in record.Refits(number))
        {
            shell.Out.MarkupLineInterpolated(
                $"fitted again as reading {refit.Number}, {RecordWords.Time(shell, refit.Utc)}: f0 {RecordWords.F0(refit)} Hz, Q {RecordWords.Q(refit)}, {refit.Verdict.ToString().ToLowerInvariant()}");
        }
    }

    private static PlotSheet Sheet(long number, Reading reading)
    {
        RawPoint[] points = [.. reading.Points.OrderBy(point => point.Setting.FrequencyHz)];
        double[] bars = [.. points.Select(point => 2 * Math.Sqrt(Math.Max(0, double.IsFinite(point.MeanVariance) ? point.MeanVariance : 0)))];
        PlotSheet sheet = CurveSheet.Of(
            $"reading {number}: raw points", [.. points.Select(point => point.Setting.FrequencyHz)], [.. points.Select(point => point.Mean)], bars, [], [],
            points.Any(point => point.Setting.FrequencyHz > 0.8 * reading.F0Hz) ? reading.F0Hz : double.NaN);
        return sheet with { YLabel = "raw counts, pedestal included" };
    }
}
