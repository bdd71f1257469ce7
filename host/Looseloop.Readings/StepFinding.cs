namespace Looseloop.Readings;

/// <summary>One step of a commissioning.</summary>
/// <param name="Step">Which.</param>
/// <param name="Result">What came of it.</param>
/// <param name="Detail">That in a sentence; why, where it did not pass.</param>
/// <param name="Figures">What was measured, by names that carry their units.</param>
public sealed record StepFinding(CommissioningStep Step, StepResult Result, string Detail, IReadOnlyDictionary<string, double> Figures)
{
    private static readonly Dictionary<string, double> _none = [];

    /// <summary>A step without figures.</summary>
    public StepFinding(CommissioningStep step, StepResult result, string detail)
        : this(step, result, detail, _none)
    {
    }
}
