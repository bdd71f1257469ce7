using Looseloop.Readings;

namespace Looseloop.Procedures.Tracking;

/// <summary>What came of one step of tracking.</summary>
/// <param name="Readings">The readings taken: one, or two where the settings changed, the old set's first; none if it ended.</param>
/// <param name="End">Why a full reading is needed now, or <see cref="TrackEnd.None"/>.</param>
/// <param name="SettingsDifferenceHz">f0 on the new settings less f0 on the old ones, hertz; NaN where they did not change.</param>
public sealed record TrackStep(IReadOnlyList<Reading> Readings, TrackEnd End, double SettingsDifferenceHz = double.NaN)
{
    internal static TrackStep Ended(TrackEnd why) => new([], why);

    /// <summary>True if the settings were moved after the peak.</summary>
    public bool SettingsChanged => double.IsFinite(SettingsDifferenceHz);
}
