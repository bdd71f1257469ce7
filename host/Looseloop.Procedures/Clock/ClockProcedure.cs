using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Procedures.Clock;

/// <summary>Compares the board's microseconds with the host's clock over minutes.</summary>
public sealed class ClockProcedure(BoxSession box, IWatch watch, CancellationToken cancel)
{
    private static readonly TimeSpan _every = TimeSpan.FromMilliseconds(400);

    /// <summary>What one more byte costs at 115200 baud and in the board, seconds.</summary>
    private const double DigitS = 120e-6;

    /// <summary>A disciplined clock keeps its rate to about this, parts per million (common practice, no source).</summary>
    public const double HostPpm = 0.5;

    /// <summary>Compares. The drive stays off.</summary>
    /// <param name="duration">For how long; minutes.</param>
    /// <returns>The line, or null where the box answered too seldom.</returns>
    public ClockRegression? Run(TimeSpan duration)
    {
        watch.Begin("comparing the clocks", duration.TotalSeconds);
        TimeProvider time = box.Time;
        long begun = time.GetTimestamp();
        double Since(long stamp) => time.GetElapsedTime(begun, stamp).TotalSeconds;
        var pairs = new List<ClockPair>();
        while (time.GetElapsedTime(begun) < duration)
        {
            long asked = time.GetTimestamp();
            DarkLevel dark = box.Dark(1, cancel: cancel);
            long answered = time.GetTimestamp();
            pairs.Add(new ClockPair(Since(asked), dark.FromUs * 1e-6, Since(answered) - Since(asked)));
            watch.Progress(Math.Min(Since(answered) / duration.TotalSeconds, 1));
            box.Pause(_every);
        }

        return ClockRegression.Of(pairs);
    }

    /// <summary>The clock's error from a line, the host's own rate and a question that grows by a digit on the way included.</summary>
    public static ClockTrim Trim(ClockRegression line, TimeSpan duration, DateTimeOffset utc)
    {
        // A step of d in the middle of a line over T bends its slope by 1.5 d / T, and less anywhere else.
        double digit = 1e6 * 1.5 * DigitS / duration.TotalSeconds / Math.Sqrt(3);
        return new ClockTrim(line.Ppm, Math.Sqrt((line.UncertaintyPpm * line.UncertaintyPpm) + (digit * digit) + (HostPpm * HostPpm)), utc);
    }
}
