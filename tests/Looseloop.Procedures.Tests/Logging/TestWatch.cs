using Looseloop.Procedures.Logging;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Logging;

/// <summary>Counts what a log tells, and lets a test step in while it waits.</summary>
internal sealed class TestWatch : ILogWatch
{
    public List<Guid> Told { get; } = [];

    public FieldEnd? FieldEnd { get; private set; }

    public LogSummary? Summary { get; private set; }

    public Action<LogState>? OnWaiting { get; init; }

    public Action<Reading>? OnKept { get; init; }

    public void Begin(string task, double boardSeconds)
    {
    }

    public void Progress(double share)
    {
    }

    public void Started(RunStart start)
    {
    }

    public void Kept(Reading reading, LogState state)
    {
        Told.Add(reading.Id);
        OnKept?.Invoke(reading);
    }

    public void Kept(RunEvent document)
    {
    }

    public void CoolDown(FieldEnd fieldEnd) => FieldEnd = fieldEnd;

    public void Waiting(LogState state) => OnWaiting?.Invoke(state);

    public void Stopped(LogSummary summary) => Summary = summary;
}
