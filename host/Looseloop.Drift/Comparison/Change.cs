using Looseloop.Statistics;

namespace Looseloop.Drift.Comparison;

/// <summary>
/// The change of one quantity between two readings. The verdict is <i>changed</i> where |difference| is above the coverage
/// factor (95 %) times its standard uncertainty: a false alarm in 5 % of comparisons without a change. It is <i>not changed</i>
/// where |difference| plus that expanded uncertainty is below the margin (equivalence). Otherwise: cannot tell.
/// </summary>
/// <param name="Difference">Second less first, in the quantity's unit.</param>
/// <param name="Standard">Its standard uncertainty, common terms cancelled (GUM 5.2.2).</param>
/// <param name="DegreesOfFreedom">Effective degrees of freedom (Welch-Satterthwaite, GUM G.4.1).</param>
/// <param name="Margin">The smallest change that matters.</param>
/// <param name="Detectable">A true change of this size is found with a probability of 95 %.</param>
/// <param name="Verdict">Changed, not changed, cannot tell.</param>
public sealed record Change(
    double Difference, double Standard, double DegreesOfFreedom, double Margin, double Detectable, ChangeVerdict Verdict)
{
    /// <summary>Coverage of the interval: one comparison without a change in twenty is called changed.</summary>
    public const double Coverage = 0.95;

    /// <summary>Expanded uncertainty of the difference at <see cref="Coverage"/>.</summary>
    public double Expanded => CoverageFactor.TwoSided(DegreesOfFreedom, Coverage) * Standard;

    /// <summary>Judges a difference.</summary>
    public static Change Judge(double difference, double standard, double degreesOfFreedom, double margin)
    {
        double freedom = Math.Max(1, degreesOfFreedom);
        double expanded = CoverageFactor.TwoSided(freedom, Coverage) * standard;

        // One-sided 95 % for the power: the two-sided factor of 90 %.
        double detectable = expanded + (CoverageFactor.TwoSided(freedom, 0.90) * standard);
        ChangeVerdict verdict = Math.Abs(difference) > expanded ? ChangeVerdict.Changed
            : Math.Abs(difference) + expanded < margin ? ChangeVerdict.NotChanged
            : ChangeVerdict.CannotTell;
        return new Change(difference, standard, freedom, margin, detectable, verdict);
    }
}
