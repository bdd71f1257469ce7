using Looseloop.Procedures.Commissioning;
using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>A commissioning as it goes on, on the error stream.</summary>
internal sealed class CommissioningView(Shell shell, bool quiet) : ICommissioningWatch
{
    private readonly ProgressLine _progress = new(shell, quiet);

    public void Begin(string task, double boardSeconds) => _progress.Begin(task, boardSeconds);

    public void Progress(double share) => _progress.Progress(share);

    public void BeginStep(CommissioningStep which)
    {
        if (!quiet)
        {
            _progress.End();
            shell.Say($"{(int)which + 1}. {CommissioningText.Name(which)}");
        }
    }

    public void Ended(StepFinding finding)
    {
        _progress.End();
        if (!quiet)
        {
            shell.Say($"   {CommissioningText.Result(finding.Result)}: {finding.Detail}");
        }
    }
}
