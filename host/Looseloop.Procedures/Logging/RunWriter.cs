using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>Writes the documents of one run into a sink and tells the watch what was kept.</summary>
internal sealed class RunWriter(IRunSink sink, ILogWatch watch, TimeProvider time)
{
    private DateTimeOffset? _gapFrom;
    private string _gapWhy = "";

    public Guid RunId { get; private set; }

    public DateTimeOffset Now => time.GetUtcNow();

    /// <summary>When the last reading was kept; the run's start before the first.</summary>
    public DateTimeOffset LastUtc { get; private set; }

    public double NowS => time.GetTimestamp() / (double)time.TimestampFrequency;

    public void Start(LogOptions options, BoxIdentity box)
    {
        DateTimeOffset now = Now;
        RunId = Guid.CreateVersion7(now);
        LastUtc = now;
        var start = new RunStart
        {
            Id = RunId,
            Utc = now,
            Procedure = "log",
            HostVersion = options.Read.HostVersion,
            Box = box,
            Coil = options.Read.Coil,
            Note = options.Read.Note,
            Options = options.Stated,
        };
        sink.Append(start);
        watch.Started(start);
    }

    /// <summary>From the last reading until the next one there is a gap.</summary>
    public void OpenGap(string why)
    {
        if (_gapFrom is null)
        {
            _gapFrom = LastUtc;
            _gapWhy = why;
        }
    }

    public void Keep(Reading reading, LogState state)
    {
        if (_gapFrom is DateTimeOffset from)
        {
            _gapFrom = null;
            state.Gaps++;
            Keep(RunEventKind.Gap, $"No reading for {(reading.Utc - from).TotalSeconds:0.0} s: {_gapWhy}.", from, reading.Utc);
        }

        sink.Append(RunId, reading);
        LastUtc = reading.Utc;
        state.Readings++;
        state.Last = reading;
        watch.Kept(reading, state);
    }

    public void Keep(RunEventKind kind, string detail, DateTimeOffset? from = null, DateTimeOffset? to = null)
    {
        DateTimeOffset now = Now;
        var document = new RunEvent
        {
            Id = Guid.CreateVersion7(now),
            RunId = RunId,
            Utc = now,
            MonotonicS = NowS,
            Kind = kind,
            From = from,
            To = to,
            Detail = detail,
        };
        sink.Append(document);
        watch.Kept(document);
    }

    /// <summary>Ends the run; a gap that is still open is kept as far as it goes.</summary>
    public RunStop Stop(RunStatus status, string reason, LogState state)
    {
        DateTimeOffset now = Now;
        if (_gapFrom is DateTimeOffset from)
        {
            _gapFrom = null;
            state.Gaps++;
            Keep(RunEventKind.Gap, $"No reading for the last {(now - from).TotalSeconds:0.0} s: {_gapWhy}.", from, now);
        }

        var stop = new RunStop(RunId, now, status, reason, state.Readings);
        sink.Append(stop);
        return stop;
    }
}
