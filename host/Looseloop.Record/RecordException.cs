namespace Looseloop.Record;

/// <summary>
/// A record that cannot be used as asked. The message says what happened, what was kept and what to do; nothing in the file
/// was destroyed.
/// </summary>
public sealed class RecordException : Exception
{
    public RecordException(RecordProblem problem, string message, Exception? inner = null)
        : base(message, inner) => Problem = problem;

    /// <summary>What is wrong.</summary>
    public RecordProblem Problem { get; }
}
