using Looseloop.Procedures.Tracking;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>
/// A reading's repeatability in two parts: what is new in each reading, and what tracked readings on the same curve have in
/// common. A fit over time may average the first, never the second.
/// </summary>
internal static class ReadingTerms
{
    private const string Noise = "noise";

    public static double OwnF0Hz(Reading reading) => Own(reading, line => line.F0Hz);

    public static double OwnQRelative(Reading reading) => Own(reading, line => line.QRelative);

    public static double CommonF0Hz(Reading reading) => Common(reading, line => line.F0Hz);

    public static double CommonQRelative(Reading reading) => Common(reading, line => line.QRelative);

    private static double Own(Reading reading, Func<BudgetLine, double> term)
    {
        bool tracked = TrackedReading.Is(reading);
        return Root(reading.Budget.Lines.Where(line => line.Repeatability && (!tracked || line.Term == Noise)), term);
    }

    private static double Common(Reading reading, Func<BudgetLine, double> term)
    {
        bool tracked = TrackedReading.Is(reading);
        return Root(reading.Budget.Lines.Where(line => line.Repeatability && tracked && line.Term != Noise), term);
    }

    private static double Root(IEnumerable<BudgetLine> lines, Func<BudgetLine, double> term) =>
        Math.Sqrt(lines.Sum(line => term(line) * term(line)));
}
