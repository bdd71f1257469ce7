using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>
/// A log's pauses for a field, and what the cool-down after each says of the moment it ended. While a pause lasts, the box
/// is only listened to.
/// </summary>
internal sealed class LogPauses(
    LogOptions options, BoxKeeper keeper, RunWriter writer, LogState state, ILogWatch watch, CancellationToken cancel)
{
    private const int LongLookMs = 1000;
    private const double LeastSpacingForLooksS = 2;

    private FieldPause? _pause;
    private CoolDownWatch? _coolDown;

    /// <summary>True while a field is present, or was within the lock-out's time.</summary>
    public bool IsPaused => _pause is not null;

    /// <summary>f0 and Q at the last end of a field, or null.</summary>
    public FieldEnd? LastFieldEnd { get; private set; }

    /// <summary>
    /// How long before a slot to look, seconds. The box's own looks between sweeps are short, and an interrupted field is
    /// silent most of the time: where there is time for it, a whole second is looked at before each reading.
    /// </summary>
    public double LeadS => options.BetweenRuns || options.Every.TotalSeconds >= LeastSpacingForLooksS ? LongLookMs * 1e-3 : 0;

    /// <summary>Looks for a second; a field that is seen begins a pause.</summary>
    public bool BeginIfSeen(BoxSession box)
    {
        bool seen = FieldPause.Sees(box.Dark(LongLookMs, cancel: cancel), keeper.Limits, box);
        if (seen)
        {
            Begin();
        }

        return seen;
    }

    /// <summary>A field was seen.</summary>
    public void Begin()
    {
        FinishCoolDown();
        _coolDown = null;
        state.Pauses++;
        DateTimeOffset now = writer.Now;
        _pause = new FieldPause(now, keeper.Limits, options.LockOut);
        writer.Keep(RunEventKind.PausedFieldPresent, "paused: field present. The box does not drive.", now);
    }

    /// <summary>Looks once more during a pause.</summary>
    /// <returns>True if it is over.</returns>
    public bool LookForItsEnd(BoxSession box)
    {
        if (_pause is not { } pause || !pause.Look(box, cancel))
        {
            return false;
        }

        End(pause);
        return true;
    }

    /// <summary>Takes a reading into the cool-down, where there is one.</summary>
    public void Add(Reading reading, LogPoint point)
    {
        if (_coolDown is { } cooling && cooling.Add(reading, point))
        {
            Tell(cooling);
        }
    }

    /// <summary>Extrapolates from what has come since the last time.</summary>
    public void FinishCoolDown()
    {
        if (_coolDown is { HasMore: true } cooling)
        {
            Tell(cooling);
        }
    }

    private void End(FieldPause pause)
    {
        _pause = null;
        double spanS = (pause.EndedBefore - pause.EndedAfter).TotalSeconds;
        DateTimeOffset stop = pause.EndedAfter + ((pause.EndedBefore - pause.EndedAfter) / 2);
        DateTimeOffset now = writer.Now;
        writer.Keep(
            RunEventKind.FieldEnded,
            FormattableString.Invariant($"The field ended {(now - stop).TotalSeconds:0.0} s ago, known to {spanS / 2:0.00} s."), pause.EndedAfter, pause.EndedBefore);
        writer.Keep(
            RunEventKind.Resumed,
            FormattableString.Invariant($"No field for {options.LockOut.TotalSeconds:0} s: reading goes on after {(now - pause.From).TotalSeconds:0} s."), pause.From, now);
        if (options.BetweenRuns)
        {
            double stopS = writer.NowS - (now - stop).TotalSeconds;
            _coolDown = new CoolDownWatch(stop, stopS, spanS / Math.Sqrt(12));
        }
    }

    private void Tell(CoolDownWatch cooling)
    {
        if (cooling.Extrapolate() is not { } end)
        {
            return;
        }

        LastFieldEnd = end;
        string q = end.Q is null ? "Q not determinable" : FormattableString.Invariant($"Q {end.Q.AtStop:0.00} +- {2 * end.QStandard:0.00}");
        writer.Keep(
            RunEventKind.AtFieldEnd,
            FormattableString.Invariant($"At the end of the field f0 was {end.F0.AtStop:0.00} +- {2 * end.F0StandardHz:0.00} Hz, {q} (95 %), from {end.Readings} readings since."),
            end.Utc, end.Utc);
        watch.CoolDown(end);
    }
}
