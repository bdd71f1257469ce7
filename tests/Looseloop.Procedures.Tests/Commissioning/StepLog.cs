using Looseloop.Procedures.Commissioning;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Commissioning;

/// <summary>Follows a commissioning, and may do something when a step has ended.</summary>
internal sealed class StepLog(Action<StepFinding>? ended = null) : ICommissioningWatch
{
    public void Begin(string task, double boardSeconds)
    {
    }

    public void Progress(double share)
    {
    }

    public void BeginStep(CommissioningStep which)
    {
    }

    public void Ended(StepFinding finding) => ended?.Invoke(finding);
}
