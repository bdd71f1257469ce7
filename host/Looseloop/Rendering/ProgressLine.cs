using Looseloop.Procedures;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>
/// What a procedure is at, on the error stream: one line that is written over on a terminal, plain lines otherwise, and
/// nothing when the user wants quiet.
/// </summary>
internal sealed class ProgressLine(Shell shell, bool quiet) : IWatch
{
    private string _task = "";
    private int _shown = -1;

    public void Begin(string task, double boardSeconds)
    {
        _task = boardSeconds >= 1 ? $"{task}, about {boardSeconds:0} s" : task;
        _shown = -1;
        if (quiet)
        {
            return;
        }

        if (shell.ErrorIsTerminal)
        {
            Overwrite(_task);
        }
        else
        {
            shell.Say(_task);
        }
    }

    public void Progress(double share)
    {
        int percent = (int)(100 * share);
        if (!quiet && shell.ErrorIsTerminal && percent > _shown + 4)
        {
            _shown = percent;
            Overwrite($"{_task} {percent} %");
        }
    }

    /// <summary>Takes the line away.</summary>
    public void End()
    {
        if (!quiet && shell.ErrorIsTerminal)
        {
            Overwrite("");
        }
    }

    private void Overwrite(string text) => shell.ErrorText.Write($"\r{text}\u001b[K");
}
