namespace Looseloop.Readings;

/// <summary>
/// The uncertainty budget of a reading. Repeatability tells whether two readings of an untouched set-up agree; absolute
/// speaks of the coil as it stands with loop, pickup, box and people away, and contains the repeatability.
/// </summary>
public sealed record Budget(IReadOnlyList<BudgetLine> Lines)
{
    /// <summary>Combined standard uncertainty of f0, hertz.</summary>
    public double F0Hz(bool absolute) => Combine(absolute, line => line.F0Hz);

    /// <summary>Combined relative standard uncertainty of Q.</summary>
    public double QRelative(bool absolute) => Combine(absolute, line => line.QRelative);

    /// <summary>Effective degrees of freedom for f0 (Welch-Satterthwaite, GUM G.4.1).</summary>
    public double F0DegreesOfFreedom(bool absolute) => Effective(absolute, line => line.F0Hz);

    /// <summary>Effective degrees of freedom for Q (Welch-Satterthwaite, GUM G.4.1).</summary>
    public double QDegreesOfFreedom(bool absolute) => Effective(absolute, line => line.QRelative);

    private double Combine(bool absolute, Func<BudgetLine, double> term) =>
        Math.Sqrt(Lines.Where(line => absolute || line.Repeatability).Sum(line => term(line) * term(line)));

    private double Effective(bool absolute, Func<BudgetLine, double> term)
    {
        double variance = 0;
        double denominator = 0;
        foreach (BudgetLine line in Lines.Where(line => absolute || line.Repeatability))
        {
            double square = term(line) * term(line);
            variance += square;
            denominator += square * square / line.DegreesOfFreedom;
        }

        return denominator > 0 ? variance * variance / denominator : double.PositiveInfinity;
    }
}
