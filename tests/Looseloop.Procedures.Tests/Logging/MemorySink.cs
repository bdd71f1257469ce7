using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Logging;

/// <summary>Keeps the documents of a run in memory, in the order they came, once the record behind it (if any) has them.</summary>
internal sealed class MemorySink(IRunSink? record = null) : IRunSink
{
    public RunStart? Start { get; private set; }

    public List<Reading> Readings { get; } = [];

    public List<RunEvent> Events { get; } = [];

    public RunStop? Stop { get; private set; }

    public void Append(RunStart document)
    {
        Assert.Null(Start);
        record?.Append(document);
        Start = document;
    }

    public void Append(Guid runId, Reading reading)
    {
        Assert.Equal(Start!.Id, runId);
        Assert.Null(Stop);
        record?.Append(runId, reading);
        Readings.Add(reading);
    }

    public void Append(RunEvent document)
    {
        Assert.Equal(Start!.Id, document.RunId);
        Assert.Null(Stop);
        record?.Append(document);
        Events.Add(document);
    }

    public void Append(RunStop document)
    {
        record?.Append(document);
        Stop = document;
    }

    public IEnumerable<RunEvent> Of(RunEventKind kind) => Events.Where(e => e.Kind == kind);
}
