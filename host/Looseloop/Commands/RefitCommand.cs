using System.CommandLine;
using Looseloop.Procedures.Refit;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>refit</c>: today's fit over the raw points of readings in the record. The old figures stay.</summary>
internal sealed class RefitCommand(Shell shell)
{
    private readonly HistoryFilter _filter = new();

    private readonly Argument<string[]> _which = new("READING")
    {
        Description = "Their numbers, last, previous, or notes; last where none is given.",
        Arity = ArgumentArity.ZeroOrMore,
    };

    private readonly Option<bool> _all = new("--all") { Description = "Every reading of the record, or all that fit the options." };

    private readonly Option<bool> _factsNow = new("--facts-now")
    {
        Description = "Fit with the detector's law, clock and pull that the record knows today, instead of those that each reading was made with.",
    };

    public static Command Create(Shell shell) => new RefitCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("refit", "Fit readings of the record again from their raw points, and say what changed; both are kept.")
        {
            Arguments = { _which },
            Options = { _all, _factsNow, RecordChoice.RecordOption },
        };
        _filter.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        string[] named = parsed.GetValue(_which) ?? [];
        bool all = parsed.GetValue(_all);
        HistoryQuery query = _filter.Query(shell, parsed, int.MaxValue);
        if (all && named.Length > 0)
        {
            throw new UserError("Name readings, or take --all of them, not both.");
        }

        if (!all && query != new HistoryQuery { Limit = int.MaxValue })
        {
            throw new UserError("--coil, --note, --since and --until choose among all readings: add --all.");
        }

        if (!File.Exists(RecordChoice.PathOf(shell, parsed)))
        {
            // Says that there is none, rather than make an empty one.
            RecordChoice.OpenForReading(shell, parsed).Dispose();
        }

        using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
        if (all)
        {
            // As a list: what is added to the record meanwhile is not read again.
            List<long> runs = [.. store.Reader.RunNumbers(query)];
            return Refit(parsed, store, runs.SelectMany(run => store.Reader.ReadingsOf(run)), many: true);
        }

        long[] numbers = [.. (named.Length == 0 ? ["last"] : named).Select(store.Reader.Find).Distinct()];
        return Refit(parsed, store, numbers, many: numbers.Length > 1);
    }

    private int Refit(ParseResult parsed, RecordStore store, IEnumerable<long> numbers, bool many)
    {
        bool all = parsed.GetValue(_all);
        bool json = parsed.GetValue(CommonOptions.Json);
        var run = new RefitRun(shell, store, parsed.GetValue(_factsNow), Stated(parsed));
        var outcome = new Outcome();
        RunStatus status = RunStatus.Fault;
        try
        {
            foreach (long number in numbers)
            {
                shell.Cancel.ThrowIfCancellationRequested();
                One(run, number, outcome, all, json, many);
            }

            status = RunStatus.Completed;
        }
        catch (OperationCanceledException)
        {
            status = RunStatus.Interrupted;
            shell.Say($"Fitted again before the interruption, and kept: {run.Count}.");
            throw;
        }
        finally
        {
            run.End(status, status == RunStatus.Completed ? "done" : "It did not reach its end.");
        }

        return Sum(parsed, run, outcome, all, json, many);
    }

    private void One(RefitRun run, long number, Outcome outcome, bool all, bool json, bool many)
    {
        try
        {
            RefitDone done = run.Refit(number);
            outcome.Changed += done.Changes.Same ? 0 : 1;
            outcome.Worst = done.Now.Verdict < outcome.Worst ? done.Now.Verdict : outcome.Worst;
            if (json)
            {
                shell.OutText.WriteLine(JsonText.Object(line => RefitJson.Write(line, done), oneLine: many));
            }
            else if (!many)
            {
                RefitText.Write(shell, done);
            }
            else if (!all || !done.Changes.Same)
            {
                RefitText.WriteLine(shell, done);
            }
        }
        catch (RefitException error)
        {
            outcome.Refused++;
            if (all)
            {
                outcome.Why.TryAdd(error.Message, number);
            }
            else
            {
                shell.Error($"reading {number} {error.Message}");
            }
        }
    }

    private int Sum(ParseResult parsed, RefitRun run, Outcome outcome, bool all, bool json, bool many)
    {
        if (many && !json)
        {
            string were = run.Count == 1 ? "reading was" : "readings were";
            shell.OutText.WriteLine($"{run.Count} {were} fitted again, {outcome.Changed} came out otherwise; {outcome.Refused} could not be.");
        }

        if (!parsed.GetValue(CommonOptions.Quiet))
        {
            foreach ((string why, long first) in outcome.Why)
            {
                shell.Say($"Reading {first} (and others like it) {why}");
            }
        }

        if (outcome.Refused > 0 && !all)
        {
            return ExitCode.Failure;
        }

        return many ? ExitCode.Ok : Verdicts.ExitCodeOf(outcome.Worst);
    }

    private Dictionary<string, string> Stated(ParseResult parsed) => new()
    {
        ["of"] = parsed.GetValue(_all) ? "all" : string.Join(' ', parsed.GetValue(_which) is { Length: > 0 } named ? named : ["last"]),
        ["facts"] = parsed.GetValue(_factsNow) ? "of today" : "as recorded",
    };

    private sealed class Outcome
    {
        public long Changed { get; set; }

        public long Refused { get; set; }

        public Verdict Worst { get; set; } = Verdict.Sound;

        /// <summary>Why readings could not be fitted again, each with the first one of it.</summary>
        public Dictionary<string, long> Why { get; } = [];
    }
}
