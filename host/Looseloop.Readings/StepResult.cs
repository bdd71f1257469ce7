namespace Looseloop.Readings;

/// <summary>What came of one step.</summary>
public enum StepResult
{
    Passed,
    Failed,

    /// <summary>Asked for, and something that it takes was not there.</summary>
    Skipped,

    /// <summary>The box has nothing that the step could look at.</summary>
    NotApplicable,

    /// <summary>The procedure ended before it.</summary>
    NotDone,
}
