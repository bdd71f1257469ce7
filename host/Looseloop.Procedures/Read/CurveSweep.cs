using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>Sweeps over a resonance and the points that the fit takes from them.</summary>
public static class CurveSweep
{
    /// <summary>Longest dwell that a box takes, microseconds.</summary>
    private const int LongestDwellUs = Protocol.WireLimits.LongestDwellUs;

    /// <summary>Settled points in order: dwell over (ring time + detector time).</summary>
    public const double RingsInOrder = 7;

    /// <summary>Settings about a centre, <paramref name="stride"/> steps of the grid apart, ascending.</summary>
    public static IReadOnlyList<Setting> About(SettingGrid grid, double centreHz, int eachSide, int stride, double duty)
    {
        Setting centre = grid.Nearest(centreHz, duty);
        return [.. Enumerable.Range(-eachSide, (2 * eachSide) + 1).Select(i => SettingGrid.WithDuty(grid.Steps(centre, i * stride), duty))];
    }

    /// <summary>The dwell for points in order, microseconds.</summary>
    public static int DwellUs(Target target, DetectorLaw law, double rings = RingsInOrder) =>
        (int)Math.Min(1e6 * rings * (target.RingTimeS + law.TimeConstantS), LongestDwellUs);

    /// <summary>
    /// Raw points as the fit takes them, each with the variance that its own samples show. Drive weights come from the true
    /// duty, so amplitudes are those at duty 1/2 whatever the duty was.
    /// </summary>
    /// <param name="raw">The points.</param>
    /// <param name="maker">Law and zero.</param>
    /// <param name="harmonics">Which harmonic each setting uses; null for all fundamental.</param>
    public static FitPoint[] FitPoints(
        IEnumerable<RawPoint> raw, AmplitudeMaker maker, IReadOnlyDictionary<Setting, int>? harmonics = null) =>
        [.. PooledNoise.Make(raw, maker).Select(made => FitPointOf(made, harmonics?[made.Raw.Setting] ?? 1))];

    private static FitPoint FitPointOf(AmplitudePoint made, int harmonic)
    {
        Setting setting = made.Raw.Setting;
        return new FitPoint(
            harmonic * setting.FrequencyHz, made.Amplitude, made.Variance, harmonic / 2, DutyHarmonics.DriveWeight(harmonic, setting.Duty))
        {
            PowerVariance = made.PowerVariance,
        };
    }
}
