using Looseloop.Readings;

namespace Looseloop.Drift.Comparison;

/// <summary>
/// How far a budget's terms are common to two readings. Repeatability terms are never common. Terms of the box (its clock, its
/// detector) are common to readings by the same box. Terms of the placing (loop, pickup, people, cable) are common where
/// nothing was moved between.
/// </summary>
public static class CommonTerms
{
    // Words in the names of terms that belong to the box, whatever stands where.
    private static readonly string[] _boxWords = ["clock", "detector", "zero", "ladder", "law", "adc", "converter", "duty"];

    /// <summary>Correlation of the same term in two readings, 0 or 1.</summary>
    /// <param name="line">The term.</param>
    /// <param name="sameBox">Both readings are by the same box.</param>
    /// <param name="untouched">Loop, pickup, cable and people stayed where they were.</param>
    public static double Correlation(BudgetLine line, bool sameBox, bool untouched)
    {
        if (line.Repeatability || !sameBox)
        {
            return 0;
        }

        bool ofTheBox = _boxWords.Any(word => line.Term.Contains(word, StringComparison.OrdinalIgnoreCase));
        return ofTheBox || untouched ? 1 : 0;
    }

    /// <summary>
    /// True where two readings are by the same box as far as they tell: the same kind of board on the same port, or the same
    /// boot.
    /// </summary>
    public static bool SameBox(BoxIdentity a, BoxIdentity b) =>
        a.Board == b.Board && a.MostDutyBits == b.MostDutyBits && (a.BootId == b.BootId || a.Port == b.Port);
}
