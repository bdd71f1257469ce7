using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Drift;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Report.Plots;
using Looseloop.Terminal;
using BrailleCanvas = Looseloop.Report.Plots.BrailleCanvas;

namespace Looseloop.Commands;

/// <summary><c>drift</c>: how a run's f0 or Q moved, whether it has settled, and when it leaves a window.</summary>
internal sealed class DriftCommand(Shell shell)
{
    private readonly Argument<string> _run = new("RUN")
    {
        Description = "The number of a run, or last for the newest log.",
        DefaultValueFactory = _ => "last",
    };

    private readonly Option<bool> _q = new("--q") { Description = "Q instead of f0." };
    private readonly Option<double?> _window = Quantity.HertzOption("--window", "Half the width of the driver's window: when is it left?");
    private readonly Option<double?> _centre = Quantity.HertzOption("--centre", "The window's centre (where the run began).");
    private readonly Option<double?> _use = Quantity.SecondsOption("--use", "How long a reading is to hold (30min).");
    private readonly Option<string?> _plot = new("--plot") { Description = "Draw the run into a .png or .svg file.", HelpName = "FILE" };

    public static Command Create(Shell shell) => new DriftCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("drift", "Tell how a run drifted, whether it has settled, and when it leaves a window.")
        {
            Arguments = { _run },
            Options = { _q, _window, _centre, _use, _plot, RecordChoice.RecordOption },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        using RecordReader record = RecordChoice.OpenForReading(shell, parsed);
        long run = RunNumber(record, parsed.GetValue(_run)!);
        bool q = parsed.GetValue(_q);
        long doubtful = 0;
        DriftSeries series = DriftSeries.Of(record.Track(run).Where(Sound).Select(p => new DriftPoint(
            p.TimeS, q ? p.Q : p.F0Hz, q ? p.QRepeatability : p.F0RepeatabilityHz, p.TemperatureC)));
        if (series.Count == 0)
        {
            throw new UserError($"Run {run} has no sound reading; {doubtful} are doubtful or without figures.", ExitCode.NotTrustworthy);
        }

        DriftAnalysis analysis = DriftAnalysis.Of(series, new DriftOptions
        {
            UseS = parsed.GetValue(_use) is { } use && use > 0 ? use : 1800,
            WindowHalfWidth = parsed.GetValue(_window) is { } half && half > 0 ? half : null,
            WindowCentre = parsed.GetValue(_centre),
        });
        PlotSheet sheet = DriftText.Sheet(run, q, series, analysis, parsed.GetValue(_window), parsed.GetValue(_centre));
        if (parsed.GetValue(_plot) is string path)
        {
            PlotOutput.Save(shell, path, sheet);
        }

        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => DriftJson.Write(json, run, q, doubtful, analysis)));
            return ExitCode.Ok;
        }

        DriftText.Write(shell, run, q, doubtful, analysis);
        if (series.Count > 1)
        {
            shell.Out.Write(new BrailleCanvas(sheet, 12));
        }

        return ExitCode.Ok;

        bool Sound(TrackPoint point)
        {
            // A doubtful figure would bend the curve as a sound one does; it is left out, and said.
            bool sound = point.Verdict == Verdict.Sound;
            doubtful += sound ? 0 : 1;
            return sound;
        }
    }

    private static long RunNumber(RecordReader record, string words)
    {
        if (long.TryParse(words, out long number))
        {
            return record.Run(number).Number;
        }

        if (!words.Equals("last", StringComparison.OrdinalIgnoreCase))
        {
            throw new UserError($"'{words}' is not a run: give its number as history shows it, or last.");
        }

        return record.Runs(new HistoryQuery { Limit = 1, Procedure = "log" }) is [var newest]
            ? newest.Number
            : throw new UserError("There is no log in the record: `looseloop log` makes one.", ExitCode.Failure);
    }
}
