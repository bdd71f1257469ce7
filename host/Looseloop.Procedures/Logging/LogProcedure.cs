using Looseloop.Box;
using Looseloop.Drift;
using Looseloop.Link;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>
/// A log: a full reading, tracked readings after it, a full one now and then. It outlives unplugging and resets, pauses
/// while a field is present, and keeps every document in the sink before anybody is told of it.
/// </summary>
public sealed class LogProcedure
{
    private static readonly TimeSpan _slice = TimeSpan.FromMilliseconds(250);
    private const double JudgeEveryS = 30;
    private const int LongLookMs = 1000;
    private const double LeastSpacingForLooksS = 2;

    /// <summary>A shorter wait is none: it would round to nothing and never end.</summary>
    private const double LeastWaitS = 1e-3;

    /// <summary>Overslept by this much (and by more than a reading's spacing), the host was suspended.</summary>
    private const double OversleptS = 5;

    private readonly LogOptions _options;
    private readonly TimeProvider _time;
    private readonly ILogWatch _watch;
    private readonly CancellationToken _cancel;
    private readonly LogState _state = new();
    private readonly BoxKeeper _keeper;
    private readonly RunWriter _writer;
    private ReadOptions _read;
    private Tracker _tracker;
    private double _startS;
    private double _lastFullS = double.NegativeInfinity;
    private double _lastJudgedS = double.NegativeInfinity;
    private bool _fullIsDue;
    private string? _lastFailure;
    private DateTimeOffset _lostAt;
    private FieldPause? _pause;
    private CoolDownWatch? _coolDown;
    private FieldEnd? _lastFieldEnd;
    private Settling? _settling;

    public LogProcedure(IBoxSource source, LogOptions options, IRunSink sink, ILogWatch watch, CancellationToken cancel)
    {
        _options = options;
        _time = source.Time;
        _read = options.Read with { Time = _time };
        _watch = watch;
        _cancel = cancel;
        _keeper = new BoxKeeper(source, options, _state, cancel);
        _writer = new RunWriter(sink, watch, source.Time);
        _tracker = new Tracker(_read);
    }

    /// <summary>Logs until the time is up, f0 is settled, or the user interrupts.</summary>
    /// <returns>The summary; its stop document is kept.</returns>
    /// <exception cref="LinkOpenException">The port could not be opened at the start; there is no run then.</exception>
    /// <exception cref="BoxException">No box answered at the start; there is no run then.</exception>
    public LogSummary Run()
    {
        try
        {
            _read = _options.Read with { Time = _time, Law = _keeper.Begin() };
            _read = _read with { Commissioned = _options.CommissionedOf?.Invoke(_keeper.Known!) ?? _read.Commissioned };
            _tracker = new Tracker(_read);
            _writer.Start(_options, _keeper.Known!);
            _startS = _writer.NowS;
            return RunToEnd();
        }
        finally
        {
            _keeper.Close();
        }
    }

    private LogSummary RunToEnd()
    {
        (RunStatus Status, string Reason) end;
        try
        {
            end = Loop();
        }
        catch (OperationCanceledException)
        {
            end = (RunStatus.Interrupted, "Interrupted by the user.");
        }
        catch (Exception error) when (error is not OutOfMemoryException)
        {
            TryStop(RunStatus.Fault, error.Message);
            throw;
        }

        return TryStop(end.Status, end.Reason)!;
    }

    private LogSummary? TryStop(RunStatus status, string reason)
    {
        try
        {
            FinishCoolDown();
            if (_state.Last is Reading last)
            {
                _settling = Judge(last);
            }

            UpdateState("done");
            RunStop stop = _writer.Stop(status, reason, _state);
            var summary = new LogSummary(stop, _state, _settling, _lastFieldEnd);
            _watch.Stopped(summary);
            return summary;
        }
        catch (Exception) when (status == RunStatus.Fault)
        {
            // The sink itself is what failed: the run stays without a stop, and is closed as interrupted later.
            return null;
        }
    }

    private (RunStatus Status, string Reason) Loop()
    {
        double nextS = _startS;
        while (true)
        {
            _cancel.ThrowIfCancellationRequested();
            if (RemainingS() <= LeastWaitS)
            {
                return _keeper.Session is null
                    ? (RunStatus.LinkLost, "The time was up while the box was lost.")
                    : (RunStatus.Completed, "The time was up.");
            }

            if (_options.UntilSettled && _settling?.State == SettledState.Settled)
            {
                return (RunStatus.Completed, $"f0 is settled: {_settling.Because}.");
            }

            try
            {
                if (_keeper.Session is not { } box)
                {
                    UpdateState("box lost, looking for it");
                    _watch.Waiting(_state);
                    if (_keeper.TryReconnect(_writer, _lostAt, TimeSpan.FromSeconds(Math.Max(0, RemainingS()))))
                    {
                        nextS = _writer.NowS;
                    }
                }
                else if (_pause is { } pause)
                {
                    UpdateState("paused: field present");
                    _watch.Waiting(_state);
                    if (pause.Look(box, _cancel))
                    {
                        EndPause(pause);
                        nextS = _writer.NowS;
                    }
                }
                else if (WaitUntil(box, nextS - LeadS) && NoField(box))
                {
                    TakeReading(box);
                    nextS = NextSlot(nextS);
                }
            }
            catch (LinkLostException error)
            {
                LoseLink(error.Message);
            }
            catch (BoxException error) when (error.FieldPresent)
            {
                BeginPause();
            }
            catch (BoxException error)
            {
                Recover(error);
                nextS = NextSlot(nextS);
            }
        }
    }

    // The box's own looks between sweeps are short, and an interrupted field is silent most of the time: where there is time
    // for it, a whole second is looked at before each reading.
    private double LeadS => _options.BetweenRuns || _options.Every.TotalSeconds >= LeastSpacingForLooksS ? LongLookMs * 1e-3 : 0;

    private bool NoField(BoxSession box)
    {
        if (RemainingS() <= LeastWaitS)
        {
            return false;
        }

        if (LeadS > 0 && FieldPause.Sees(box.Dark(LongLookMs, cancel: _cancel), _keeper.Limits, box))
        {
            BeginPause();
            return false;
        }

        return true;
    }

    // Slots stand a fixed time apart; those that a long reading or a break has covered are left out, not made up for.
    private double NextSlot(double slotS)
    {
        double everyS = _options.Every.TotalSeconds;
        double nowS = _writer.NowS;
        return everyS <= 0 ? nowS : slotS + (everyS * Math.Max(1, Math.Ceiling((nowS - slotS) / everyS)));
    }

    /// <summary>Waits for a slot; false where the time is up before it.</summary>
    private bool WaitUntil(BoxSession box, double slotS)
    {
        double endS = _options.For is TimeSpan most ? _startS + most.TotalSeconds : double.PositiveInfinity;
        double untilS = Math.Min(slotS, endS);
        for (double leftS = untilS - _writer.NowS; leftS > LeastWaitS; leftS = untilS - _writer.NowS)
        {
            _cancel.ThrowIfCancellationRequested();
            UpdateState("waiting");
            _watch.Waiting(_state);
            box.Pause(TimeSpan.FromSeconds(Math.Min(leftS, _slice.TotalSeconds)));
        }

        if (_writer.NowS - untilS > Math.Max(OversleptS, _options.Every.TotalSeconds))
        {
            _writer.OpenGap("this computer was asleep");
        }

        return slotS <= endS;
    }

    private void TakeReading(BoxSession box)
    {
        UpdateState("reading");
        bool fullIsOld = _writer.NowS - _lastFullS >= _options.FullEvery.TotalSeconds;
        if (_tracker.HasCurve && !_fullIsDue && !fullIsOld)
        {
            TrackStep step = _tracker.Step(box, _cancel);
            foreach (Reading reading in step.Readings)
            {
                Keep(reading);
            }

            if (step.SettingsChanged)
            {
                _writer.Keep(
                    RunEventKind.SettingsChanged,
                    FormattableString.Invariant($"Settings moved after the peak; the new ones read {step.SettingsDifferenceHz:+0.00;-0.00} Hz against the old ones."));
            }

            if (step.End == TrackEnd.None)
            {
                return;
            }

            _writer.Keep(RunEventKind.Note, $"Tracking ended: {Words(step.End)}. A full reading follows.");
            if (FieldPause.Sees(box.Dark(LongLookMs, cancel: _cancel), _keeper.Limits, box))
            {
                BeginPause();
                return;
            }
        }

        TakeFull(box);
    }

    private void TakeFull(BoxSession box)
    {
        long beganUs = box.BoardTimeUs;
        double near = _tracker.F0Hz;
        bool nearIsTracked = double.IsFinite(near);
        ReadOptions options = nearIsTracked ? _read with { NearHz = near } : _read;
        ReadOutcome outcome = new ReadProcedure(box, options, _watch, _cancel).Run();
        if (nearIsTracked && !double.IsFinite(outcome.Reading.F0Hz))
        {
            outcome = new ReadProcedure(box, _read with { NearHz = null }, _watch, _cancel).Run();
        }

        // Figures that are not to be trusted at all are no basis for readings without checks of their own.
        bool basis = _tracker.Begin(outcome);
        _lastFullS = _writer.NowS;
        _fullIsDue = false;
        if (!double.IsFinite(outcome.Reading.F0Hz))
        {
            Fail(string.Join(' ', outcome.Reading.Reasons.Select(reason => reason.Detail)));
            return;
        }

        _state.FullReadings++;
        double boardS = beganUs > 0 ? (box.BoardTimeUs - beganUs) * 1e-6 : outcome.Reading.BoardSeconds;
        Keep(outcome.Reading with { MonotonicS = _writer.NowS, BoardSeconds = boardS });
        if (!basis)
        {
            _fullIsDue = true;
        }
    }

    private void Keep(Reading reading)
    {
        _lastFailure = null;
        double timeS = reading.MonotonicS;
        double f0 = ReadingTerms.OwnF0Hz(reading);
        double q = reading.Q * ReadingTerms.OwnQRelative(reading);
        var point = new LogPoint(timeS, reading.F0Hz, reading.Q, f0 * f0, q * q);
        _state.History.Add(point);
        _writer.Keep(reading, _state);
        if (_coolDown is { } cooling && cooling.Add(reading, point))
        {
            TellCoolDown(cooling);
        }

        if (_options.UntilSettled && timeS - _lastJudgedS >= JudgeEveryS)
        {
            _lastJudgedS = timeS;
            _settling = Judge(reading);
        }
    }

    private Settling Judge(Reading last)
    {
        DriftSeries series = _state.History.F0();
        return Settling.Judge(
            series, series.Count >= Settling.FewestReadings ? WarmUpFit.Choose(series) : null, 2 * last.Budget.F0Hz(absolute: false),
            new DriftOptions().UseS);
    }

    private void Fail(string why)
    {
        _state.Failures++;
        _writer.OpenGap("readings failed");
        if (why != _lastFailure)
        {
            // The same failure every few seconds for hours would bury the record.
            _lastFailure = why;
            _writer.Keep(RunEventKind.ReadingFailed, why);
        }
    }

    private void LoseLink(string why)
    {
        _lostAt = _writer.Now;
        _writer.OpenGap("the link to the box was lost");
        _keeper.Drop();
        _writer.Keep(RunEventKind.LinkLost, why, _writer.LastUtc, _lostAt);
    }

    private void Recover(BoxException error)
    {
        if (error.Trouble == BoxTrouble.Fault && error.FaultCode is not (Protocol.FaultCode.PlanEmpty or Protocol.FaultCode.HostSilent))
        {
            Fail(error.Message);
        }
        else
        {
            _writer.OpenGap("the box fell silent or started anew");
        }

        DateTimeOffset noticed = _writer.Now;
        if (!_keeper.IdentifyAgain(_writer))
        {
            _lostAt = noticed;
            _writer.Keep(RunEventKind.LinkLost, error.Message, _writer.LastUtc, noticed);
        }
    }

    private void BeginPause()
    {
        FinishCoolDown();
        _coolDown = null;
        _state.Pauses++;
        DateTimeOffset now = _writer.Now;
        _pause = new FieldPause(now, _keeper.Limits, _options.LockOut);
        _writer.Keep(RunEventKind.PausedFieldPresent, "paused: field present. The box does not drive.", now);
    }

    private void EndPause(FieldPause pause)
    {
        _pause = null;
        double spanS = (pause.EndedBefore - pause.EndedAfter).TotalSeconds;
        DateTimeOffset stop = pause.EndedAfter + ((pause.EndedBefore - pause.EndedAfter) / 2);
        DateTimeOffset now = _writer.Now;
        _writer.Keep(
            RunEventKind.FieldEnded,
            FormattableString.Invariant($"The field ended {(now - stop).TotalSeconds:0.0} s ago, known to {spanS / 2:0.00} s."), pause.EndedAfter, pause.EndedBefore);
        _writer.Keep(
            RunEventKind.Resumed,
            FormattableString.Invariant($"No field for {_options.LockOut.TotalSeconds:0} s: reading goes on after {(now - pause.From).TotalSeconds:0} s."), pause.From, now);
        if (_options.BetweenRuns)
        {
            double stopS = _writer.NowS - (now - stop).TotalSeconds;
            _coolDown = new CoolDownWatch(stop, stopS, spanS / Math.Sqrt(12));
        }
    }

    private void FinishCoolDown()
    {
        if (_coolDown is { HasMore: true } cooling)
        {
            TellCoolDown(cooling);
        }
    }

    private void TellCoolDown(CoolDownWatch cooling)
    {
        if (cooling.Extrapolate() is not { } end)
        {
            return;
        }

        _lastFieldEnd = end;
        string q = end.Q is null ? "Q not determinable" : FormattableString.Invariant($"Q {end.Q.AtStop:0.00} +- {2 * end.QStandard:0.00}");
        _writer.Keep(
            RunEventKind.AtFieldEnd,
            FormattableString.Invariant($"At the end of the field f0 was {end.F0.AtStop:0.00} +- {2 * end.F0StandardHz:0.00} Hz, {q} (95 %), from {end.Readings} readings since."),
            end.Utc, end.Utc);
        _watch.CoolDown(end);
    }

    private double RemainingS() => _options.For is TimeSpan most ? _startS + most.TotalSeconds - _writer.NowS : double.PositiveInfinity;

    private void UpdateState(string doing)
    {
        _state.Doing = doing;
        _state.ElapsedS = _writer.NowS - _startS;
        _state.RemainingS = _options.For is null ? double.NaN : Math.Max(0, RemainingS());
        _state.Lines = _keeper.Lines;
    }

    private static string Words(TrackEnd end) => end switch
    {
        TrackEnd.PeakLeft => "the peak has left the settings",
        TrackEnd.OtherCurve => "the points do not lie on the last full reading's curve",
        TrackEnd.FarFromCurve => "amplitude or Q is far from the last full reading's",
        TrackEnd.DarkMoved => "the level with the drive off has moved",
        TrackEnd.Saturated => "samples reach the converter's upper end",
        TrackEnd.Disturbed => "single samples stray far beyond their scatter",
        TrackEnd.PointsMissing => "points were lost on the line",
        _ => "there is no curve to track on",
    };
}
