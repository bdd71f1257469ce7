using Looseloop.Box;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>Takes a log's readings: a full one, tracked ones on its curve, a full one again where tracking ends or when it is due.</summary>
internal sealed class LogReadings(
    LogOptions options, ReadOptions read, LogPauses pauses, RunWriter writer, LogState state, ILogWatch watch, CancellationToken cancel)
{
    private readonly Tracker _tracker = new(read);
    private double _lastFullS = double.NegativeInfinity;
    private bool _fullIsDue;
    private string? _lastFailure;

    /// <summary>Told each reading as it is kept, after it was.</summary>
    public Action<Reading, LogPoint>? Taken { get; init; }

    /// <summary>Takes one; none where a field is seen, or where it gives no figures.</summary>
    public void Take(BoxSession box)
    {
        bool fullIsOld = writer.NowS - _lastFullS >= options.FullEvery.TotalSeconds;
        if (!_tracker.HasCurve || _fullIsDue || fullIsOld)
        {
            TakeFull(box);
            return;
        }

        TrackEnd end = Track(box);
        if (end == TrackEnd.None)
        {
            return;
        }

        writer.Keep(RunEventKind.Note, $"Tracking ended: {Words(end)}. A full reading follows.");
        if (!pauses.BeginIfSeen(box))
        {
            TakeFull(box);
        }
    }

    /// <summary>A reading was tried and gave none.</summary>
    public void Fail(string why)
    {
        state.Failures++;
        writer.OpenGap("readings failed");
        if (why != _lastFailure)
        {
            // The same failure every few seconds for hours would bury the record.
            _lastFailure = why;
            writer.Keep(RunEventKind.ReadingFailed, why);
        }
    }

    private TrackEnd Track(BoxSession box)
    {
        TrackStep step = _tracker.Step(box, cancel);
        foreach (Reading reading in step.Readings)
        {
            Keep(reading);
        }

        if (step.SettingsChanged)
        {
            writer.Keep(
                RunEventKind.SettingsChanged,
                FormattableString.Invariant($"Settings moved after the peak; the new ones read {step.SettingsDifferenceHz:+0.00;-0.00} Hz against the old ones."));
        }

        return step.End;
    }

    private void TakeFull(BoxSession box)
    {
        long beganUs = box.BoardTimeUs;
        double near = _tracker.F0Hz;
        bool nearIsTracked = double.IsFinite(near);
        ReadOptions first = nearIsTracked ? read with { NearHz = near } : read;
        ReadOutcome outcome = new ReadProcedure(box, first, watch, cancel).Run();
        if (nearIsTracked && !double.IsFinite(outcome.Reading.F0Hz))
        {
            outcome = new ReadProcedure(box, read with { NearHz = null }, watch, cancel).Run();
        }

        // Figures that are not to be trusted at all are no basis for readings without checks of their own.
        bool basis = _tracker.Begin(outcome);
        _lastFullS = writer.NowS;
        _fullIsDue = false;
        if (!double.IsFinite(outcome.Reading.F0Hz))
        {
            Fail(string.Join(' ', outcome.Reading.Reasons.Select(reason => reason.Detail)));
            return;
        }

        state.FullReadings++;
        double boardS = beganUs > 0 ? (box.BoardTimeUs - beganUs) * 1e-6 : outcome.Reading.BoardSeconds;
        Keep(outcome.Reading with { MonotonicS = writer.NowS, BoardSeconds = boardS });
        if (!basis)
        {
            _fullIsDue = true;
        }
    }

    private void Keep(Reading reading)
    {
        _lastFailure = null;
        double f0 = ReadingTerms.OwnF0Hz(reading);
        double q = reading.Q * ReadingTerms.OwnQRelative(reading);
        var point = new LogPoint(reading.MonotonicS, reading.F0Hz, reading.Q, f0 * f0, q * q);
        state.History.Add(point);
        writer.Keep(reading, state);
        Taken?.Invoke(reading, point);
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
