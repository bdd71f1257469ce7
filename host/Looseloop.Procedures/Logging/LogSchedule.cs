using Looseloop.Box;

namespace Looseloop.Procedures.Logging;

/// <summary>When readings are due, and when the log ends. Slots stand a fixed time apart; all times are those of the source's clock.</summary>
internal sealed class LogSchedule(LogOptions options, RunWriter writer, CancellationToken cancel)
{
    private static readonly TimeSpan _slice = TimeSpan.FromMilliseconds(250);

    /// <summary>A shorter wait is none: it would round to nothing and never end.</summary>
    private const double LeastWaitS = 1e-3;

    /// <summary>Overslept by this much (and by more than a reading's spacing), the host was suspended.</summary>
    private const double OversleptS = 5;

    private double _startS;

    /// <summary>Since the start, seconds.</summary>
    public double ElapsedS => writer.NowS - _startS;

    /// <summary>Until the end that was asked for, seconds; infinite where none was.</summary>
    public double RemainingS => options.For is TimeSpan most ? _startS + most.TotalSeconds - writer.NowS : double.PositiveInfinity;

    /// <summary>True if the time is up.</summary>
    public bool IsOver => RemainingS <= LeastWaitS;

    /// <summary>The log begins now; so does its first slot.</summary>
    public double Begin() => _startS = writer.NowS;

    /// <summary>The next slot. Those that a long reading or a break has covered are left out, not made up for.</summary>
    public double Next(double slotS)
    {
        double everyS = options.Every.TotalSeconds;
        double nowS = writer.NowS;
        return everyS <= 0 ? nowS : slotS + (everyS * Math.Max(1, Math.Ceiling((nowS - slotS) / everyS)));
    }

    /// <summary>Waits for a slot, on the box's clock; false where the time is up before it.</summary>
    /// <param name="box">The box.</param>
    /// <param name="slotS">The slot.</param>
    /// <param name="waiting">Told before each slice of the wait.</param>
    public bool WaitUntil(BoxSession box, double slotS, Action waiting)
    {
        double endS = options.For is TimeSpan most ? _startS + most.TotalSeconds : double.PositiveInfinity;
        double untilS = Math.Min(slotS, endS);
        for (double leftS = untilS - writer.NowS; leftS > LeastWaitS; leftS = untilS - writer.NowS)
        {
            cancel.ThrowIfCancellationRequested();
            waiting();
            box.Pause(TimeSpan.FromSeconds(Math.Min(leftS, _slice.TotalSeconds)));
        }

        if (writer.NowS - untilS > Math.Max(OversleptS, options.Every.TotalSeconds))
        {
            writer.OpenGap("this computer was asleep");
        }

        return slotS <= endS;
    }
}
