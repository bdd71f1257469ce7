using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Boxes;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Ring;
using Looseloop.Procedures.Survey;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Tables;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>read</c>: f0 and Q of the coil in front of the box.</summary>
internal sealed class ReadCommand(Shell shell)
{
    private readonly Option<double?> _near = Quantity.HertzOption("--near", "Look only near this frequency, without a survey.");
    private readonly Option<double?> _from = Quantity.HertzOption("--from", "Lowest frequency of the survey (30k).");
    private readonly Option<double?> _to = Quantity.HertzOption("--to", "Highest frequency of the survey (600k).");
    private readonly Option<double?> _delay = Quantity.SecondsOption("--delay", "Wait before reading, to step back from the coil.");
    private readonly Option<double?> _mains = Quantity.HertzOption("--mains", "Mains frequency, 50 or 60 (50).");
    private readonly Option<bool> _ring = new("--ring") { Description = "Take Q by ring-down too, as a second opinion." };
    private readonly Option<bool> _budget = new("--budget") { Description = "Show the uncertainty budget." };
    private readonly Option<string?> _save = new("--save") { Description = "Write the points to a CSV file.", HelpName = "FILE" };
    private readonly Option<string?> _coil = new("--coil") { Description = "The coil's name.", HelpName = "NAME" };
    private readonly Option<string?> _of = new("--of")
    {
        Description = "What is read: secondary (as it is without this), or primary: the primary tank, the secondary away or shorted.",
        HelpName = "WHAT",
    };

    private readonly Option<string?> _note = new("--note") { Description = "A note to the reading.", HelpName = "TEXT" };

    public static Command Create(Shell shell) => new ReadCommand(shell).Make();

    private Command Make()
    {
        _of.AcceptOnlyFromAmong("primary", "secondary");
        var command = new Command("read", "Read f0 and Q of a coil that is not energised, with uncertainty and verdict.")
        {
            Options = { _near, _from, _to, _delay, _mains, _ring, _budget, _save, _coil, _of, _note, RecordChoice.RecordOption },
        };
        BoxChoice.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        bool quiet = parsed.GetValue(CommonOptions.Quiet);
        double low = parsed.GetValue(_from) ?? SurveySweep.LowHz;
        double high = parsed.GetValue(_to) ?? SurveySweep.HighHz;
        if (low >= high)
        {
            throw new UserError($"The survey's range is empty: --from {low:0} Hz is not below --to {high:0} Hz.");
        }

        using ChosenBox box = BoxChoice.Open(shell, parsed);
        if (parsed.GetValue(_delay) is double delay && delay > 0)
        {
            StepBack(box, delay, quiet);
        }

        var options = new ReadOptions
        {
            Law = box.Law ?? UndeclaredBox.LawOf(box.Session),
            NearHz = parsed.GetValue(_near),
            LowHz = low,
            HighHz = high,
            MainsHz = parsed.GetValue(_mains) ?? 50,
            Coil = parsed.GetValue(_coil),
            Note = parsed.GetValue(_note),
            Ring = parsed.GetValue(_ring),
            HostVersion = AppVersion.Text,
            Time = shell.Time,
        };
        options = KnownFacts.Apply(shell, parsed, options, box.Session.Identity);
        if (parsed.GetValue(_of) == "primary")
        {
            // What stands with the secondary says nothing of a tank that is read alone.
            options = options with { SetUp = new Dictionary<string, string> { ["of"] = "primary" }, Pull = null };
        }

        var progress = new ProgressLine(shell, quiet);
        ReadOutcome outcome;
        try
        {
            outcome = new ReadProcedure(box.Session, options, progress, shell.Cancel).Run();
            if (options.Ring)
            {
                outcome = RingSecondOpinion.Add(box.Session, options, outcome, progress, shell.Cancel).Outcome;
            }
        }
        finally
        {
            progress.End();
        }

        if (parsed.GetValue(_save) is string path)
        {
            PointFile.Save(path, outcome);
            shell.Say($"{outcome.Reading.Points.Count} points are in {path}.");
        }

        bool kept = ReadingKeeper.Keep(shell, parsed, "read", outcome.Reading);
        Show(parsed, outcome, quiet);
        return kept ? Verdicts.ExitCodeOf(outcome.Reading.Verdict) : ExitCode.Failure;
    }

    private void Show(ParseResult parsed, ReadOutcome outcome, bool quiet)
    {
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => ReadingJson.Write(json, outcome.Reading)));
            return;
        }

        if (shell.OutIsTerminal)
        {
            CurveView.Write(shell.Out, outcome, 0);
        }

        ReadingText.Write(shell.Out, outcome.Reading);
        if (parsed.GetValue(_budget))
        {
            ReadingText.WriteBudget(shell.Out, outcome.Reading);
        }

        if (!quiet)
        {
            ReadingText.WriteNotes(shell.ErrorConsole, outcome.Reading);
        }
    }

    /// <summary>Counts down, by the clock of the box: a virtual one does not keep its user waiting.</summary>
    private void StepBack(ChosenBox box, double seconds, bool quiet)
    {
        for (double left = seconds; left > 0; left -= 1)
        {
            if (!quiet && (shell.ErrorIsTerminal || left == seconds))
            {
                shell.ErrorText.Write(shell.ErrorIsTerminal ? $"\rstep back: {left:0} s \u001b[K" : $"step back: {left:0} s\n");
            }

            shell.Cancel.ThrowIfCancellationRequested();
            box.Session.Pause(TimeSpan.FromSeconds(Math.Min(left, 1)));
        }
    }
}
