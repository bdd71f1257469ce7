namespace Looseloop.Bench;

/// <summary>The bench's own time. It moves only when somebody moves it; timers on it are not supported.</summary>
public sealed class VirtualClock : TimeProvider
{
    private static readonly DateTimeOffset _begin = new(2026, 1, 1, 12, 0, 0, TimeSpan.Zero);

    private double _seconds;

    /// <summary>True time since the world's begin, seconds.</summary>
    public double Seconds => _seconds;

    public override long TimestampFrequency => 1_000_000_000;

    public override long GetTimestamp() => (long)(_seconds * 1e9);

    public override DateTimeOffset GetUtcNow() => _begin + TimeSpan.FromTicks((long)(_seconds * TimeSpan.TicksPerSecond));

    /// <summary>Moves on.</summary>
    public void Advance(double seconds) => _seconds += seconds;

    /// <summary>Moves on to a time, if it is not past already.</summary>
    public void AdvanceTo(double seconds) => _seconds = Math.Max(_seconds, seconds);
}
