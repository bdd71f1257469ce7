using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Refit;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Terminal;

namespace Looseloop.Records;

/// <summary>A reading and what today's fit made of it; the bases are those of the full reading that a tracked one rests on.</summary>
internal sealed record RefitDone(long Number, Reading Kept, FitBasis Before, long NewNumber, Reading Now, FitBasis After)
{
    public RefitChanges Changes { get; } = RefitChanges.Between(Kept, Now);
}

/// <summary>Fits readings of a record again and keeps each as it comes, as a run that begins with the first.</summary>
/// <param name="shell">For the time.</param>
/// <param name="store">The record.</param>
/// <param name="factsNow">True to fit with the law, clock and pull that the record knows today.</param>
/// <param name="stated">What the user asked for, as it is kept with the run.</param>
internal sealed class RefitRun(Shell shell, RecordStore store, bool factsNow, IReadOnlyDictionary<string, string> stated)
{
    private const string Standoff = "standoff";

    private readonly RecordedFacts _facts = new(store.Reader);
    private Guid? _run;
    private (long Number, FitBasis Before, ReadOutcome Outcome)? _full;

    /// <summary>How many were fitted again.</summary>
    public long Count { get; private set; }

    /// <summary>Fits one again. What was fitted again before is fitted from its original.</summary>
    /// <exception cref="RefitException">It cannot be.</exception>
    public RefitDone Refit(long number)
    {
        ReadingSummary figures = store.Reader.Figures(number);
        long original = figures.RefitOf ?? number;
        Reading kept = store.Reader.Reading(original);
        RefitDone done;
        if (TrackedReading.Is(kept))
        {
            (FitBasis before, ReadOutcome full) = FullOf(original, kept);
            Reading now = ReadingRefit.Tracked(kept, full, AppVersion.Text, shell.Time);
            done = new RefitDone(original, kept, before, 0, now, full.Reading.Basis!);
        }
        else
        {
            (FitBasis before, ReadOutcome outcome) = Full(original, kept);
            done = new RefitDone(original, kept, before, 0, outcome.Reading, outcome.Reading.Basis!);
        }

        Guid run = Begin(kept);
        store.AppendRefit(run, done.Now, original);
        Count++;
        return done with { NewNumber = store.Reader.Refits(original)[^1].Number };
    }

    /// <summary>Writes the stop document, where there was a start.</summary>
    public void End(RunStatus status, string reason)
    {
        if (_run is Guid run)
        {
            store.Append(new RunStop(run, shell.Time.GetUtcNow(), status, reason, Count));
            _run = null;
        }
    }

    private Guid Begin(Reading reading)
    {
        if (_run is not Guid run)
        {
            DateTimeOffset now = shell.Time.GetUtcNow();
            run = Guid.CreateVersion7(now);
            store.Append(new RunStart { Id = run, Utc = now, Procedure = "refit", HostVersion = AppVersion.Text, Coil = reading.Coil, Options = stated });
            _run = run;
        }

        return run;
    }

    private (FitBasis Before, ReadOutcome Outcome) FullOf(long tracked, Reading kept)
    {
        long number = store.Reader.FullReadingBefore(tracked) ?? throw ReadingRefit.WithoutBasis(kept);
        if (_full is { } held && held.Number == number)
        {
            return (held.Before, held.Outcome);
        }

        return Full(number, store.Reader.Reading(number));
    }

    private (FitBasis Before, ReadOutcome Outcome) Full(long number, Reading kept)
    {
        FitBasis before = kept.Basis ?? throw ReadingRefit.WithoutBasis(kept);
        ReadOutcome outcome = ReadingRefit.Full(kept, factsNow ? Today(number, kept, before) : before, AppVersion.Text, shell.Time);
        _full = (number, before, outcome);
        return (before, outcome);
    }

    private FitBasis Today(long number, Reading kept, FitBasis before)
    {
        DetectorLaw law = _facts.LawOf(kept.Box.Port) is DetectorLaw known && known.Kind == before.Law.Kind && known != before.Law
            ? Pedestal.Settle(known, kept.Dark[0])
            : before.Law;

        // What a standoff found must not be in the readings that it was found from.
        string procedure = store.Reader.Run(store.Reader.Figures(number).Run).Start.Procedure;
        bool pulled = kept.Coil is not null && procedure != Standoff;
        return before with
        {
            Law = law,
            Clock = _facts.ClockOf(kept.Box.Port) ?? before.Clock,
            Commissioned = before.Commissioned || KnownFacts.IsCommissioned(kept.Box, _facts),
            Pull = pulled ? _facts.PullOf(kept.Coil!, kept.SetUp) ?? before.Pull : before.Pull,
        };
    }
}
