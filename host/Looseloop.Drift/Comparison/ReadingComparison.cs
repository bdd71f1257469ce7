using Looseloop.Readings;

namespace Looseloop.Drift.Comparison;

/// <summary>The change between two readings and what it means.</summary>
/// <param name="F0">Change of f0, hertz.</param>
/// <param name="Q">Relative change of Q (second over first, less one).</param>
/// <param name="Bandwidths">Change of f0 in half-power bandwidths of the first reading.</param>
/// <param name="CapacitanceRelative">Relative change of the effective capacitance if the inductance stayed: (f1/f2)^2 - 1.</param>
/// <param name="CapacitanceStandard">Its standard uncertainty: twice that of the relative change of f0.</param>
/// <param name="Winding">Whether the winding is suspect.</param>
/// <param name="SameBox">Both are by the same box, so that its terms cancel.</param>
/// <param name="SetUpDifferences">What was stated to stand differently, "key: first -> second".</param>
/// <param name="Cautions">Why the verdicts are held back, or what else to bear in mind; may be empty.</param>
public sealed record ReadingComparison(
    Change F0, Change Q, double Bandwidths, double CapacitanceRelative, double CapacitanceStandard, WindingState Winding,
    bool SameBox, IReadOnlyList<string> SetUpDifferences, IReadOnlyList<string> Cautions)
{
    /// <summary>Compares a reading with an earlier one.</summary>
    /// <returns>Null where either reading has no figures.</returns>
    public static ReadingComparison? Of(Reading first, Reading second, CompareOptions options)
    {
        if (!(first.F0Hz > 0 && first.Q > 0 && second.F0Hz > 0 && second.Q > 0)
            || first.Verdict == Verdict.None || second.Verdict == Verdict.None)
        {
            return null;
        }

        bool sameBox = CommonTerms.SameBox(first.Box, second.Box);
        double bandwidth = first.F0Hz / first.Q;
        (double f0Standard, double f0Freedom) = Combine(first, second, sameBox, options.Untouched, line => line.F0Hz);
        (double qStandard, double qFreedom) = Combine(first, second, sameBox, options.Untouched, line => line.QRelative);
        double ratio = second.Q / first.Q;
        Change f0 = Change.Judge(second.F0Hz - first.F0Hz, f0Standard, f0Freedom, options.MarginBandwidths * bandwidth);
        Change q = Change.Judge(ratio - 1, qStandard * ratio, qFreedom, options.MarginQ);

        List<string> cautions = [];
        Hold("first", first);
        Hold("second", second);
        bool held = cautions.Count > 0;
        if (held)
        {
            f0 = f0 with { Verdict = ChangeVerdict.CannotTell };
            q = q with { Verdict = ChangeVerdict.CannotTell };
        }

        if (!sameBox)
        {
            cautions.Add("The readings are not by the same box: its clock and detector do not cancel.");
        }

        if (first.Coil != second.Coil)
        {
            cautions.Add($"The readings name different coils: {first.Coil ?? "none"} and {second.Coil ?? "none"}.");
        }

        double c = first.F0Hz / second.F0Hz;
        return new ReadingComparison(
            f0, q, f0.Difference / bandwidth, (c * c) - 1, 2 * c * c * f0Standard / second.F0Hz,
            held ? WindingState.CannotTell : Judge(f0, q, options.SuspectQ), sameBox, Differences(first.SetUp, second.SetUp), cautions);

        void Hold(string which, Reading reading)
        {
            if (reading.Verdict == Verdict.Doubtful)
            {
                string why = string.Join(", ", reading.Reasons.Where(r => r.AtBest < Verdict.Sound).Select(r => r.Name));
                cautions.Add($"The {which} reading is doubtful ({why}): its figures cannot carry a verdict.");
            }
        }
    }

    // u^2 = sum over terms of u1^2 + u2^2 - 2 r u1 u2 (GUM 5.2.2 for a difference), and Welch-Satterthwaite over the terms that
    // do not cancel.
    private static (double Standard, double Freedom) Combine(
        Reading first, Reading second, bool sameBox, bool untouched, Func<BudgetLine, double> part)
    {
        double variance = 0;
        double denominator = 0;
        List<BudgetLine> rest = [.. second.Budget.Lines];
        foreach (BudgetLine line in first.Budget.Lines)
        {
            int at = rest.FindIndex(other => other.Term == line.Term && other.Repeatability == line.Repeatability);
            double r = at >= 0 ? CommonTerms.Correlation(line, sameBox, untouched) : 0;
            if (r > 0)
            {
                double residual = part(line) - part(rest[at]);
                Add(Math.Abs(residual), Math.Min(line.DegreesOfFreedom, rest[at].DegreesOfFreedom));
                rest.RemoveAt(at);
            }
            else
            {
                Add(part(line), line.DegreesOfFreedom);
            }
        }

        foreach (BudgetLine line in rest)
        {
            Add(part(line), line.DegreesOfFreedom);
        }

        double freedom = denominator > 0 ? variance * variance / denominator : double.PositiveInfinity;
        return (Math.Sqrt(variance), freedom);

        void Add(double standard, double degrees)
        {
            double square = standard * standard;
            variance += square;
            denominator += square * square / degrees;
        }
    }

    private static WindingState Judge(Change f0, Change q, double suspect)
    {
        // Suspect only where the whole interval lies beyond: Q also falls by a warm winding or a moved earth lead.
        if (q.Verdict != ChangeVerdict.Changed || q.Difference + q.Expanded > -suspect)
        {
            return q.Difference - q.Expanded < -suspect ? WindingState.CannotTell : WindingState.NotSuspect;
        }

        return f0.Verdict == ChangeVerdict.Changed && f0.Difference > 0 ? WindingState.ShortedTurn : WindingState.MoreLoss;
    }

    private static List<string> Differences(
        IReadOnlyDictionary<string, string> first, IReadOnlyDictionary<string, string> second)
    {
        List<string> differences = [];
        foreach (string key in first.Keys.Union(second.Keys).Order(StringComparer.Ordinal))
        {
            string a = first.GetValueOrDefault(key, "not stated");
            string b = second.GetValueOrDefault(key, "not stated");
            if (a != b)
            {
                differences.Add($"{key}: {a} -> {b}");
            }
        }

        return differences;
    }
}
