using System.Runtime.InteropServices;

namespace Looseloop.Terminal;

/// <summary>Ctrl-C and TERM: the first asks the command to stop the drive and finish, the second leaves at once.</summary>
internal sealed class Interrupt : IDisposable
{
    private readonly CancellationTokenSource _source = new();
    private readonly PosixSignalRegistration _int;
    private readonly PosixSignalRegistration _term;

    public Interrupt()
    {
        _int = PosixSignalRegistration.Create(PosixSignal.SIGINT, context => Take(context, Terminal.ExitCode.Interrupted));
        _term = PosixSignalRegistration.Create(PosixSignal.SIGTERM, context => Take(context, Terminal.ExitCode.Terminated));
    }

    public CancellationToken Token => _source.Token;

    /// <summary>The exit code that belongs to the signal.</summary>
    public int ExitCode { get; private set; } = Terminal.ExitCode.Interrupted;

    public void Dispose()
    {
        _int.Dispose();
        _term.Dispose();
        _source.Dispose();
    }

    private void Take(PosixSignalContext context, int exitCode)
    {
        if (_source.IsCancellationRequested)
        {
            Environment.Exit(exitCode);
        }

        context.Cancel = true;
        ExitCode = exitCode;
        _source.Cancel();
    }
}
