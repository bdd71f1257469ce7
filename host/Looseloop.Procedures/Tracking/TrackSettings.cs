using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tracking;

/// <summary>The few realisable settings of a tracked reading.</summary>
public static class TrackSettings
{
    /// <summary>How many settings.</summary>
    public const int Count = 5;

    // The top and the half-power points tell Q best, two steeper points between tell f0; fourfold symmetric about f0.
    private static readonly double[] _wantedBandwidths = [0, -0.5, 0.5, -0.9, 0.9];

    /// <summary>
    /// The settings nearest to f0, to the half-power points and a little beyond, ascending; where the grid is too coarse for
    /// different ones, the next settings outward.
    /// </summary>
    public static IReadOnlyList<Setting> About(SettingGrid grid, double f0Hz, double bandwidthHz, double duty, double lowestHz, double highestHz)
    {
        var chosen = new SortedDictionary<double, Setting>();
        foreach (double wanted in _wantedBandwidths)
        {
            Add(grid.Nearest(f0Hz + (wanted * bandwidthHz), duty));
        }

        Setting centre = grid.Nearest(f0Hz, duty);
        for (int steps = 1; chosen.Count < Count && steps < 2 * Count; steps++)
        {
            Setting down = grid.Steps(centre, -steps);
            Setting up = grid.Steps(centre, steps);
            bool downIsNearer = f0Hz - down.FrequencyHz < up.FrequencyHz - f0Hz;
            Add(downIsNearer ? down : up);
            if (chosen.Count < Count)
            {
                Add(downIsNearer ? up : down);
            }
        }

        return [.. chosen.Values];

        void Add(Setting setting)
        {
            if (setting.FrequencyHz >= lowestHz && setting.FrequencyHz <= highestHz)
            {
                chosen[setting.FrequencyHz] = SettingGrid.WithDuty(setting, duty);
            }
        }
    }

    /// <summary>
    /// True if f0 has left the middle of a set of settings so far that another should take over: by more than .6 of a step of
    /// the grid (so that the two sets do not take turns) and .15 bandwidths (within which the precision hardly falls).
    /// </summary>
    public static bool HasLeft(SettingGrid grid, IReadOnlyList<Setting> settings, double f0Hz, double bandwidthHz)
    {
        Setting middle = settings[settings.Count / 2];
        double step = grid.Steps(middle, 1).FrequencyHz - middle.FrequencyHz;
        return Math.Abs(f0Hz - middle.FrequencyHz) > Math.Max(0.15 * bandwidthHz, 0.6 * step);
    }
}
