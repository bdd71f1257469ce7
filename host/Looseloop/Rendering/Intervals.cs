using Looseloop.Readings;

namespace Looseloop.Rendering;

/// <summary>Half-widths of the intervals that a user sees: 95 %.</summary>
internal static class Intervals
{
    private const double Factor = 2;

    /// <summary>Of f0, hertz.</summary>
    public static double F0Hz(Reading reading, bool absolute) => double.IsFinite(reading.F0Hz) ? Factor * reading.Budget.F0Hz(absolute) : double.NaN;

    /// <summary>Of Q.</summary>
    public static double Q(Reading reading, bool absolute) => double.IsFinite(reading.Q) ? Factor * reading.Q * reading.Budget.QRelative(absolute) : double.NaN;
}
