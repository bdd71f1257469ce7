using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>Whoever stands at the bench, reads the instruments and does what the box cannot.</summary>
public interface IAttendant
{
    /// <summary>For how long the box drives at one setting, so that an instrument can be read.</summary>
    TimeSpan Hold { get; }

    /// <summary>The counter's last digit, hertz.</summary>
    double CounterDigitHz { get; }

    /// <summary>Says what to connect or do before a step.</summary>
    void Prepare(string instruction);

    /// <summary>Says that the box is about to drive at a setting for <see cref="Hold"/>.</summary>
    void Driving(Setting setting);

    /// <summary>What the counter read on the setting that was held last, hertz; null where nobody read one.</summary>
    double? CounterHz(Setting setting);

    /// <summary>The mean of the driver's output at the setting held last, as a share of its supply; null where nobody measured it.</summary>
    double? MeanShare(Setting setting);

    /// <summary>Brings a tone source near the pickup, or takes it away.</summary>
    /// <param name="tone">How it is to sound.</param>
    /// <param name="aboutHz">At which frequency, hertz: the coil's.</param>
    /// <returns>False where nobody can.</returns>
    bool Bring(ToneSource tone, double aboutHz);
}
