using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>The pickup with the drive off: the pedestal must be there, stand still, and scatter enough to be averaged.</summary>
public static class DarkStep
{
    /// <summary>0.2 V on the board with the fewest counts a volt, 1250 (hardware-notes/pedestal.md).</summary>
    private const double LeastCounts = 250;

    /// <summary>Below half a count of scatter averaging no longer finds what lies between two counts (same page).</summary>
    private const double LeastScatter = 0.5;
    private const double MostScatter = 10;

    /// <summary>Judges some dark levels of a second each.</summary>
    public static StepFinding Judge(IReadOnlyList<DarkLevel> levels)
    {
        double mean = levels.Average(level => level.Mean);
        double scatter = Math.Sqrt(levels.Average(level => level.SampleVariance));
        double moved = levels.Max(level => level.Mean) - levels.Min(level => level.Mean);
        var figures = new Dictionary<string, double>
        {
            ["mean_counts"] = mean,
            ["scatter_counts"] = scatter,
            ["moved_counts"] = moved,
        };

        if (mean < LeastCounts)
        {
            return Finding(StepResult.Failed, $"The pedestal is at {mean:0} counts: {LeastCounts:0} at least are wanted, above the converter's dead zone. The interlock cannot see below it.");
        }

        if (mean > WireLimits.HighestPedestalCounts)
        {
            return Finding(StepResult.Failed, $"The pickup shows {mean:0} counts with the drive off: more than any pedestal. Something is live near it, or the pedestal is wrong.");
        }

        if (scatter < LeastScatter)
        {
            return Finding(StepResult.Failed, $"The samples scatter by {scatter:0.00} counts: less than half a count cannot be averaged. Is the pickup's amplifier connected?");
        }

        if (scatter > MostScatter || moved > scatter)
        {
            return Finding(StepResult.Failed, $"The samples scatter by {scatter:0.0} counts and their mean moved by {moved:0.0} between seconds: hum, bursts or a foreign signal. Find it first.");
        }

        return Finding(StepResult.Passed, $"Pedestal at {mean:0.0} counts, scatter {scatter:0.0}, the same three times.");

        StepFinding Finding(StepResult result, FormattableString detail) =>
            new(CommissioningStep.Dark, result, FormattableString.Invariant(detail), figures);
    }
}
