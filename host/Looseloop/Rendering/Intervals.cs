using Looseloop.Readings;
using Looseloop.Statistics;

namespace Looseloop.Rendering;

/// <summary>Half-widths of the intervals that a user sees: 95 %, by Student's t for the effective degrees of freedom (GUM G.3, G.4).</summary>
internal static class Intervals
{
    private const double Probability = 0.95;

    /// <summary>Of f0, hertz.</summary>
    public static double F0Hz(Reading reading, bool absolute) => double.IsFinite(reading.F0Hz)
        ? CoverageFactor.TwoSided(reading.Budget.F0DegreesOfFreedom(absolute), Probability) * reading.Budget.F0Hz(absolute)
        : double.NaN;

    /// <summary>Of Q.</summary>
    public static double Q(Reading reading, bool absolute) => double.IsFinite(reading.Q)
        ? CoverageFactor.TwoSided(reading.Budget.QDegreesOfFreedom(absolute), Probability) * reading.Q * reading.Budget.QRelative(absolute)
        : double.NaN;
}
