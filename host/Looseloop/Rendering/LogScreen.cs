using Looseloop.Procedures.Logging;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>Shows a log as it runs: live on a terminal, as plain lines without one, as JSON lines on demand.</summary>
internal static class LogScreen
{
    /// <summary>Runs a log with the view that suits the streams.</summary>
    public static LogSummary Run(Shell shell, bool json, bool quiet, LogOptions options, Func<ILogWatch, LogSummary> log)
    {
        if (json)
        {
            return log(new LogJson(shell));
        }

        if (!shell.OutIsTerminal || quiet)
        {
            return log(new LogLines(shell, quiet));
        }

        LogSummary? summary = null;
        var view = new LogView(shell, options);
        shell.Out.Live(view).AutoClear(false).Start(live => summary = log(view.On(live)));
        LogWords.WriteSummary(shell.OutText, summary!);
        return summary!;
    }
}
