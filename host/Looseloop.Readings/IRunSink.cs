namespace Looseloop.Readings;

/// <summary>
/// Where the documents of a run go: its start, then readings and events, then its stop. A call that returns has kept its
/// document: only then may it be shown as saved. A document that was kept before is not kept twice. Calls come one at a time.
/// </summary>
public interface IRunSink
{
    /// <summary>Opens a run.</summary>
    void Append(RunStart document);

    /// <summary>Keeps a reading of an open run, raw points and dark levels included.</summary>
    void Append(Guid runId, Reading reading);

    /// <summary>Keeps an event of an open run.</summary>
    void Append(RunEvent document);

    /// <summary>Ends a run; nothing is appended to it any more.</summary>
    void Append(RunStop document);
}
