namespace Looseloop.Readings;

/// <summary>
/// Where a box stands after all its commissionings: of each step what was last found out. A step that was skipped or not
/// reached leaves what stood before; another board or another firmware begins anew.
/// </summary>
public sealed class CommissioningStanding
{
    private readonly Dictionary<CommissioningStep, (DateTimeOffset Utc, StepFinding Finding)> _steps = [];

    private CommissioningStanding()
    {
    }

    /// <summary>True if every step has passed, or does not apply to this box.</summary>
    public bool IsComplete => Missing.Count == 0;

    /// <summary>The steps without which the box is not commissioned, in order.</summary>
    public IReadOnlyList<CommissioningStep> Missing =>
        [.. Enum.GetValues<CommissioningStep>().Where(step => Of(step)?.Finding.Result is not (StepResult.Passed or StepResult.NotApplicable))];

    /// <summary>From records, the oldest first.</summary>
    public static CommissioningStanding Of(IEnumerable<CommissioningRecord> records, string board, string firmwareVersion)
    {
        var standing = new CommissioningStanding();
        foreach (CommissioningRecord record in records.Where(record => record.Board == board && record.FirmwareVersion == firmwareVersion))
        {
            foreach (StepFinding finding in record.Steps.Where(one => one.Result is not (StepResult.Skipped or StepResult.NotDone)))
            {
                standing._steps[finding.Step] = (record.Utc, finding);
            }
        }

        return standing;
    }

    /// <summary>What was last found of a step and when, or null.</summary>
    public (DateTimeOffset Utc, StepFinding Finding)? Of(CommissioningStep step) =>
        _steps.TryGetValue(step, out (DateTimeOffset Utc, StepFinding Finding) last) ? last : null;
}
