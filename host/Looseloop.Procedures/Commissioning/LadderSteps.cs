using Looseloop.Procedures.Ladder;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>What a ladder says of two steps: the law itself, and the law against true power.</summary>
public static class LadderSteps
{
    /// <summary>True if the outcome's law may be kept.</summary>
    public static bool IsGood(LadderOutcome outcome) => outcome.Law is not null && !outcome.Choice!.Contradicts;

    public static StepFinding Law(LadderOutcome outcome)
    {
        if (!IsGood(outcome))
        {
            return new StepFinding(CommissioningStep.Ladder, StepResult.Failed, Sentence(outcome.Reasons));
        }

        DetectorLaw law = outcome.Law!;
        var figures = new Dictionary<string, double>
        {
            ["frequency_hz"] = outcome.At!.Value.FrequencyHz,
            ["pedestal_counts"] = law.PedestalCounts,
            ["shape"] = law.Shape,
            ["bow_bound"] = law.BowBound,
            ["high_extra_ns"] = 1e9 * law.HighExtraS,
            ["high_extra_u_ns"] = 1e9 * law.HighExtraUncertaintyS,
        };
        return new StepFinding(
            CommissioningStep.Ladder, StepResult.Passed,
            FormattableString.Invariant($"{law.Kind}, pedestal {law.PedestalCounts:0.0} counts, bow at most {100 * law.BowBound:0.00} %, edges {1e9 * law.HighExtraS:+0.0;-0.0;0.0} ns."), figures);
    }

    /// <summary>The direct check; of a ladder that was taken.</summary>
    public static StepFinding Direct(LadderOutcome outcome)
    {
        if (outcome.Direct is not DirectCheck direct)
        {
            return new StepFinding(CommissioningStep.Direct, StepResult.Skipped, "The ladder found no law to hold against the waveform.");
        }

        var figures = new Dictionary<string, double>
        {
            ["ratio_by_direct"] = direct.ByDirect,
            ["ratio_by_law"] = direct.ByLaw,
            ["difference"] = direct.Difference,
            ["difference_u"] = direct.Uncertainty,
        };
        return new StepFinding(
            CommissioningStep.Direct, direct.Agrees ? StepResult.Passed : StepResult.Failed,
            FormattableString.Invariant($"Two levels differ by {direct.ByDirect:0.000} by the waveform's own power and by {direct.ByLaw:0.000} by the law: {(direct.Agrees ? "they agree." : "the detector is not what the ladder says, or the converter's sample-and-hold is too slow.")}"),
            figures);
    }

    private static string Sentence(IReadOnlyList<Reason> reasons) =>
        reasons.Count > 0 ? string.Join(" ", reasons.Select(reason => $"{reason.Detail} {reason.Advice}")) : "The ladder found no law.";
}
