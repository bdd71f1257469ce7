using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>Someone who follows a commissioning step by step.</summary>
public interface ICommissioningWatch : IWatch
{
    /// <summary>A step begins.</summary>
    void BeginStep(CommissioningStep which);

    /// <summary>A step has ended.</summary>
    void Ended(StepFinding finding);
}
