using System.Globalization;
using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>The drive's frequency against a counter: the timer must do what its arithmetic says, and the crystal be a crystal.</summary>
public static class FrequencyStep
{
    /// <summary>What a board's crystal may be off, parts per million (common practice, no source).</summary>
    private const double MostPpm = 50;

    /// <summary>What the counter's own time base may wander between its readings, parts per million.</summary>
    private const double CounterPpm = 1;

    /// <summary>Three settings with three numbers of duty bits, hertz asked for.</summary>
    public static IReadOnlyList<double> AtHz { get; } = [40_000, 150_000, 300_000];

    /// <summary>The settings of a box.</summary>
    public static IReadOnlyList<Setting> Settings(SettingGrid grid) => [.. AtHz.Select(hertz => grid.Nearest(hertz, 0.5))];

    /// <summary>Judges readings.</summary>
    /// <param name="settings">What was driven.</param>
    /// <param name="countsHz">What the counter read at each, hertz.</param>
    /// <param name="digitHz">The counter's last digit, hertz.</param>
    public static StepFinding Judge(IReadOnlyList<Setting> settings, IReadOnlyList<double> countsHz, double digitHz)
    {
        double[] ppm = [.. settings.Select((setting, i) => 1e6 * ((countsHz[i] / setting.FrequencyHz) - 1))];
        double[] digit = [.. settings.Select(setting => 1e6 * digitHz / setting.FrequencyHz)];
        var figures = new Dictionary<string, double>();
        for (int i = 0; i < settings.Count; i++)
        {
            string at = $"at_{(AtHz[i] / 1000).ToString("0", CultureInfo.InvariantCulture)}k";
            figures[at + "_hz"] = countsHz[i];
            figures[at + "_ppm"] = ppm[i];
        }

        // The finest reading says most about what the three have in common.
        int finest = Array.IndexOf(digit, digit.Min());
        for (int i = 0; i < ppm.Length; i++)
        {
            if (Math.Abs(ppm[i] - ppm[finest]) > digit[i] + digit[finest] + CounterPpm)
            {
                return new StepFinding(
                    CommissioningStep.Frequency, StepResult.Failed,
                    FormattableString.Invariant($"Off by {ppm[i]:0} ppm at {settings[i].FrequencyHz:0.0} Hz and by {ppm[finest]:0} ppm at {settings[finest].FrequencyHz:0.0} Hz: the timer does not do what it should, or the counter read something else. Stop here: no f0 from this board is worth anything."),
                    figures);
            }
        }

        return Math.Abs(ppm[finest]) > MostPpm + digit[finest]
            ? new StepFinding(
                CommissioningStep.Frequency, StepResult.Failed,
                FormattableString.Invariant($"Off by {ppm[finest]:0} ppm at all three: more than a crystal is. Check the counter's time base against another; then the board's crystal is wrong."), figures)
            : new StepFinding(
                CommissioningStep.Frequency, StepResult.Passed,
                FormattableString.Invariant($"Off by {ppm[finest]:+0.0;-0.0;0.0} ppm (the counter's last digit is {digit[finest]:0.0}), the same at all three: the board's crystal. 'trim clock' takes it off."), figures);
    }
}
