using Looseloop.Procedures.Logging;
using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>A log as plain lines: readings on the output, everything else on the error stream.</summary>
internal sealed class LogLines(Shell shell, bool quiet) : ILogWatch
{
    public void Begin(string task, double boardSeconds)
    {
    }

    public void Progress(double share)
    {
    }

    public void Started(RunStart start) => Say($"{LogWords.Time(shell, start.Utc)}  log begun on {start.Box?.Port}");

    public void Kept(Reading reading, LogState state) =>
        shell.OutText.WriteLine($"{LogWords.Time(shell, reading.Utc)}  {LogWords.Figures(reading)}");

    public void Kept(RunEvent document) => Say($"{LogWords.Time(shell, document.Utc)}  {LogWords.Kind(document.Kind)}: {document.Detail}");

    public void CoolDown(FieldEnd fieldEnd)
    {
        // Its event has said it.
    }

    public void Waiting(LogState state)
    {
    }

    public void Stopped(LogSummary summary)
    {
        if (!quiet)
        {
            LogWords.WriteSummary(shell.ErrorText, summary);
        }
    }

    private void Say(string line)
    {
        if (!quiet)
        {
            shell.Say(line);
        }
    }
}
