using Looseloop.Procedures.Detector;
using Looseloop.Readings;

namespace Looseloop.Procedures.Read;

/// <summary>
/// Points with the variance that those like them show: a point alone knows its own to a seventh only (100 samples), and
/// weights that come out otherwise each time would turn what one resonance cannot explain into scatter.
/// </summary>
public static class PooledNoise
{
    /// <summary>Settings whose variances in counts lie within this of each other share one: the converter's noise.</summary>
    private const double AllAlikeWithin = 2;

    /// <summary>Visits to one setting whose variances differ by more were not alike: a burst fell into one of them.</summary>
    private const double VisitsAlikeWithin = 2.5;

    /// <summary>The points as amplitudes, in their order.</summary>
    public static IReadOnlyList<AmplitudePoint> Make(IEnumerable<RawPoint> points, AmplitudeMaker maker)
    {
        RawPoint[] raw = [.. points];
        if (raw.Any(point => !double.IsFinite(point.SampleVariance)))
        {
            return [.. raw.Select(point => maker.Make(point))];
        }

        var bySetting = raw.GroupBy(point => point.Setting).ToDictionary(
            visits => visits.Key, visits => (Mean: visits.Average(point => point.SampleVariance), Alike: AreAlike(visits)));
        double smallest = bySetting.Values.Min(setting => setting.Mean);
        double largest = bySetting.Values.Max(setting => setting.Mean);
        double? common = largest <= AllAlikeWithin * smallest && bySetting.Values.All(setting => setting.Alike)
            ? raw.Average(point => point.SampleVariance)
            : null;
        return
        [
            .. raw.Select(point => maker.Make(
                point, common ?? (bySetting[point.Setting].Alike ? bySetting[point.Setting].Mean : point.SampleVariance))),
        ];
    }

    private static bool AreAlike(IEnumerable<RawPoint> visits) =>
        visits.Max(point => point.SampleVariance) <= VisitsAlikeWithin * visits.Min(point => point.SampleVariance);
}
