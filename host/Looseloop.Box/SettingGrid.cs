using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>The settings of a box's timer as documents.</summary>
public sealed class SettingGrid(int mostDutyBits)
{
    /// <summary>Duty bits of the timer's finest period: 19 or 13.</summary>
    public int MostDutyBits => mostDutyBits;

    /// <summary>The setting nearest to a frequency in hertz, with the duty count nearest to a duty of 0..1.</summary>
    public Setting Nearest(double frequencyHz, double duty)
    {
        FrequencyGrid.Nearest(frequencyHz, mostDutyBits, out int bits, out int divider);
        return At(bits, divider, duty);
    }

    /// <summary>Every setting from one frequency to another, hertz, ascending.</summary>
    public IReadOnlyList<Setting> Between(double lowHz, double highHz, double duty)
    {
        var settings = new List<Setting>();
        FrequencyGrid.Nearest(lowHz, mostDutyBits, out int bits, out int divider);
        if (FrequencyGrid.FrequencyHz(bits, divider) < lowHz)
        {
            FrequencyGrid.StepUp(ref bits, ref divider, mostDutyBits);
        }

        while (FrequencyGrid.FrequencyHz(bits, divider) <= highHz)
        {
            settings.Add(At(bits, divider, duty));
            FrequencyGrid.StepUp(ref bits, ref divider, mostDutyBits);
        }

        return settings;
    }

    /// <summary>The setting this many steps up (or down, if negative) from another, at its duty.</summary>
    public Setting Steps(Setting from, int steps)
    {
        int bits = from.DutyBits;
        int divider = from.Divider;
        for (; steps > 0; steps--)
        {
            FrequencyGrid.StepUp(ref bits, ref divider, mostDutyBits);
        }

        for (; steps < 0; steps++)
        {
            FrequencyGrid.StepDown(ref bits, ref divider, mostDutyBits);
        }

        return At(bits, divider, from.Duty);
    }

    /// <summary>The same frequency at another duty, 0..1, as near as its period allows.</summary>
    public static Setting WithDuty(Setting setting, double duty) =>
        setting with { DutyCount = FrequencyGrid.DutyCount(duty, setting.DutyBits) };

    private static Setting At(int bits, int divider, double duty) =>
        new(bits, divider, FrequencyGrid.DutyCount(duty, bits), FrequencyGrid.FrequencyHz(bits, divider));
}
