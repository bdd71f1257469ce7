using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Procedures.Read;

/// <summary>Where a reading's points lie once f0 and Q are known about, and how each is sampled.</summary>
/// <param name="Settings">Ascending.</param>
/// <param name="DwellUs">Dwell before each, microseconds.</param>
/// <param name="Samples">Samples at each.</param>
/// <param name="SpacingUs">Microseconds from sample to sample; samples times spacing is a whole mains period.</param>
public sealed record MeasurePlan(IReadOnlyList<Setting> Settings, int DwellUs, int Samples, int SpacingUs)
{
    private const int SamplesAMainsPeriod = 100;

    /// <summary>Dense within this, bandwidths.</summary>
    private const double Dense = 1.6;

    /// <summary>Points within the dense part at most.</summary>
    private const int MostDense = 13;

    /// <summary>Detunings beyond the dense part that pin the feed-through, bandwidths.</summary>
    private static readonly double[] _far = [2.2, 3.2, 4.6, 6.5];

    /// <summary>Plans for a target.</summary>
    public static MeasurePlan For(BoxSession box, Target target, DetectorLaw law, double mainsHz)
    {
        SettingGrid grid = box.Grid;
        double stepHz = TargetSearch.StepHz(grid, target.F0Hz);
        double reachHz = Math.Max(Dense * target.BandwidthHz, 2.5 * stepHz);
        int stride = (int)Math.Max(1, Math.Round(2 * reachHz / (MostDense * stepHz)));
        int eachSide = (int)Math.Ceiling(reachHz / (stride * stepHz));
        var settings = CurveSweep.About(grid, target.F0Hz, eachSide, stride, target.Duty).ToDictionary(s => s.FrequencyHz);
        foreach (double far in _far)
        {
            foreach (int side in (int[])[-1, 1])
            {
                // By the exact detuning f/f0 - f0/f, so that a low Q does not reach below zero.
                double half = side * far / (2 * target.Q);
                Setting setting = grid.Nearest(target.F0Hz * (half + Math.Sqrt(1 + (half * half))), target.Duty);
                settings[setting.FrequencyHz] = setting;
            }
        }

        int spacingUs = (int)Math.Round(1e6 / mainsHz / SamplesAMainsPeriod);
        return new MeasurePlan(
            [.. settings.Values.Where(s => s.FrequencyHz >= box.Identity.LowestHz && s.FrequencyHz <= box.Identity.HighestHz).OrderBy(s => s.FrequencyHz)],
            CurveSweep.DwellUs(target, law), SamplesAMainsPeriod, spacingUs);
    }
}
