namespace Looseloop.Terminal;

/// <summary>Something the user can put right. The message says what happened, what was kept and what to do.</summary>
internal sealed class UserError : Exception
{
    public UserError(string message, int exitCode = Terminal.ExitCode.Usage)
        : base(message) => ExitCode = exitCode;

    public int ExitCode { get; }
}
