using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>Someone who follows a log. Documents are told after they were kept, never before.</summary>
public interface ILogWatch : IWatch
{
    /// <summary>The run has begun.</summary>
    void Started(RunStart start);

    /// <summary>A reading was kept.</summary>
    void Kept(Reading reading, LogState state);

    /// <summary>An event was kept.</summary>
    void Kept(RunEvent document);

    /// <summary>f0 and Q at the end of an energised run, by the cool-down so far.</summary>
    void CoolDown(FieldEnd fieldEnd);

    /// <summary>Waiting; told about four times a second.</summary>
    void Waiting(LogState state);

    /// <summary>The run has ended.</summary>
    void Stopped(LogSummary summary);
}
