using System.Globalization;
using Looseloop.Arguments;
using Looseloop.Procedures.Commissioning;
using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Boxes;

/// <summary>A person reads the instruments, and types what they show. An empty line leaves a thing out.</summary>
internal sealed class PromptAttendant(Shell shell, StatedAnswers counter, double digitHz, StatedAnswers means, double? supply, TimeSpan hold) : IAttendant
{
    private double? _supply = supply;

    public TimeSpan Hold => hold;

    public double CounterDigitHz => digitHz;

    public void Prepare(string instruction) => Ask($"{instruction} Then press Enter: ");

    public void Driving(Setting setting) =>
        shell.Say($"The drive is at {Hertz(setting.FrequencyHz)} Hz, {setting.DutyCount} of {1 << setting.DutyBits} counts high, for {hold.TotalSeconds:0} s: read the instrument.");

    public double? CounterHz(Setting setting) =>
        counter.Next() ?? Number($"The counter's reading at {Hertz(setting.FrequencyHz)} Hz (Enter: none): ", Quantity.TryHertz);

    public double? MeanShare(Setting setting)
    {
        if (means.Next() is double stated)
        {
            return stated / (_supply ?? 1);
        }

        _supply ??= Number("The driver's supply, volts (Enter: none): ", StatedAnswers.Number);
        return _supply is double volts
            ? Number($"The meter's reading at {setting.DutyCount} of {1 << setting.DutyBits} counts, volts (Enter: none): ", StatedAnswers.Number) / volts
            : null;
    }

    public bool Bring(ToneSource tone, double aboutHz)
    {
        string what = tone switch
        {
            ToneSource.Steady => $"Bring a signal generator at {Hertz(aboutHz)} Hz, on a few turns of wire, near the pickup. Type y when it sounds, Enter if there is none: ",
            ToneSource.Chopped => "Chop the tone: on for 1 ms in every 200 ms. Type y when it does so, Enter if it cannot: ",
            _ => "Switch the tone off and take it away. Type y when it is gone: ",
        };
        return Ask(what)?.Trim().StartsWith("y", StringComparison.OrdinalIgnoreCase) ?? false;
    }

    private double? Number(string question, StatedAnswers.TryRead read)
    {
        while (Ask(question)?.Trim() is { Length: > 0 } answer)
        {
            if (read(answer, out double value))
            {
                return value;
            }

            shell.Say($"'{answer}' is no number.");
        }

        return null;
    }

    /// <summary>What was typed, or null where the input has ended.</summary>
    private string? Ask(string question)
    {
        shell.ErrorText.Write(question);
        string? answer = shell.InText.ReadLine();
        shell.Cancel.ThrowIfCancellationRequested();
        return answer;
    }

    private static string Hertz(double hertz) => hertz.ToString("0.##", CultureInfo.InvariantCulture);
}
