using Looseloop.Box;
using Looseloop.Link;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>
/// A log: a full reading, tracked readings after it, a full one now and then. It outlives unplugging and resets, pauses
/// while a field is present, and keeps every document in the sink before anybody is told of it.
/// </summary>
public sealed class LogProcedure
{
    private readonly LogOptions _options;
    private readonly TimeProvider _time;
    private readonly ILogWatch _watch;
    private readonly CancellationToken _cancel;
    private readonly LogState _state = new();
    private readonly BoxKeeper _keeper;
    private readonly RunWriter _writer;
    private readonly LogSchedule _schedule;
    private readonly LogPauses _pauses;
    private readonly LogSettling _settling;
    private LogReadings _readings;
    private DateTimeOffset _lostAt;

    public LogProcedure(IBoxSource source, LogOptions options, IRunSink sink, ILogWatch watch, CancellationToken cancel)
    {
        _options = options;
        _time = source.Time;
        _watch = watch;
        _cancel = cancel;
        _keeper = new BoxKeeper(source, options, _state, cancel);
        _writer = new RunWriter(sink, watch, source.Time);
        _schedule = new LogSchedule(options, _writer, cancel);
        _pauses = new LogPauses(options, _keeper, _writer, _state, watch, cancel);
        _settling = new LogSettling(options, _state);
        _readings = ReadingsBy(options.Read with { Time = source.Time });
    }

    /// <summary>Logs until the time is up, f0 is settled, or the user interrupts.</summary>
    /// <returns>The summary; its stop document is kept.</returns>
    /// <exception cref="LinkOpenException">The port could not be opened at the start; there is no run then.</exception>
    /// <exception cref="BoxException">No box answered at the start; there is no run then.</exception>
    public LogSummary Run()
    {
        try
        {
            _readings = ReadingsBy(_keeper.Begin() with { Time = _time });
            _writer.Start(_options, _keeper.Known!);
            return RunToEnd(_schedule.Begin());
        }
        finally
        {
            _keeper.Close();
        }
    }

    private LogReadings ReadingsBy(ReadOptions read) => new(_options, read, _pauses, _writer, _state, _watch, _cancel)
    {
        Taken = (reading, point) =>
        {
            _pauses.Add(reading, point);
            _settling.Add(reading);
        },
    };

    private LogSummary RunToEnd(double firstSlotS)
    {
        (RunStatus Status, string Reason) end;
        try
        {
            end = Loop(firstSlotS);
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
            _pauses.FinishCoolDown();
            if (_state.Last is Reading last)
            {
                _settling.Judge(last);
            }

            UpdateState("done");
            RunStop stop = _writer.Stop(status, reason, _state);
            var summary = new LogSummary(stop, _state, _settling.Last, _pauses.LastFieldEnd);
            _watch.Stopped(summary);
            return summary;
        }
        catch (Exception) when (status == RunStatus.Fault)
        {
            // The sink itself is what failed: the run stays without a stop, and is closed as interrupted later.
            return null;
        }
    }

    private (RunStatus Status, string Reason) Loop(double firstSlotS)
    {
        double nextS = firstSlotS;
        while (true)
        {
            _cancel.ThrowIfCancellationRequested();
            if (_schedule.IsOver)
            {
                return _keeper.Session is null
                    ? (RunStatus.LinkLost, "The time was up while the box was lost.")
                    : (RunStatus.Completed, "The time was up.");
            }

            if (_settling.IsReached)
            {
                return (RunStatus.Completed, $"f0 is settled: {_settling.Last!.Because}.");
            }

            try
            {
                nextS = Go(nextS);
            }
            catch (LinkLostException error)
            {
                LoseLink(error.Message);
            }
            catch (BoxException error) when (error.FieldPresent)
            {
                _pauses.Begin();
            }
            catch (BoxException error)
            {
                Recover(error);
                nextS = _schedule.Next(nextS);
            }
        }
    }

    /// <summary>One step: looks for a lost box, sits out a field, or takes the reading that is due. Gives the next slot.</summary>
    private double Go(double slotS)
    {
        if (_keeper.Session is not { } box)
        {
            Wait("box lost, looking for it");
            bool back = _keeper.TryReconnect(_writer, _lostAt, TimeSpan.FromSeconds(Math.Max(0, _schedule.RemainingS)));
            return back ? _writer.NowS : slotS;
        }

        if (_pauses.IsPaused)
        {
            Wait("paused: field present");
            return _pauses.LookForItsEnd(box) ? _writer.NowS : slotS;
        }

        if (!_schedule.WaitUntil(box, slotS - _pauses.LeadS, () => Wait("waiting")) || !NoField(box))
        {
            return slotS;
        }

        UpdateState("reading");
        _readings.Take(box);
        return _schedule.Next(slotS);
    }

    private bool NoField(BoxSession box) => !_schedule.IsOver && (_pauses.LeadS <= 0 || !_pauses.BeginIfSeen(box));

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
            _readings.Fail(error.Message);
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

    private void Wait(string doing)
    {
        UpdateState(doing);
        _watch.Waiting(_state);
    }

    private void UpdateState(string doing)
    {
        _state.Doing = doing;
        _state.ElapsedS = _schedule.ElapsedS;
        _state.RemainingS = _options.For is null ? double.NaN : Math.Max(0, _schedule.RemainingS);
        _state.Lines = _keeper.Lines;
    }
}
