using Looseloop.Readings;

namespace Looseloop.Procedures.Clock;

/// <summary>A clock's error from what a frequency counter reads on the drive.</summary>
public static class CounterTrim
{
    /// <summary>Beyond this a counter reads something else than the drive: a harmonic, noise, a wrong range.</summary>
    private const double MostPpm = 1000;

    /// <summary>The clock's error, or null where the counter cannot have read this drive.</summary>
    /// <param name="setting">What was driven.</param>
    /// <param name="counterHz">What the counter read, hertz.</param>
    /// <param name="resolutionHz">Its last digit, hertz.</param>
    /// <param name="counterPpm">Standard uncertainty of the counter's own time base, parts per million.</param>
    /// <param name="utc">When.</param>
    public static ClockTrim? Of(Setting setting, double counterHz, double resolutionHz, double counterPpm, DateTimeOffset utc)
    {
        double ppm = 1e6 * ((counterHz / setting.FrequencyHz) - 1);
        double rounding = 1e6 * resolutionHz / Math.Sqrt(12) / setting.FrequencyHz;
        return Math.Abs(ppm) <= MostPpm ? new ClockTrim(ppm, double.Hypot(rounding, counterPpm), utc) : null;
    }
}
