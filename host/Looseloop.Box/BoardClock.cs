namespace Looseloop.Box;

/// <summary>Board time as the box reports it in one session, microseconds since the board started.</summary>
internal sealed class BoardClock
{
    private long _firstUs = long.MaxValue;

    /// <summary>The latest.</summary>
    public long LatestUs { get; private set; }

    /// <summary>From the first to the latest, seconds.</summary>
    public double Seconds => LatestUs > _firstUs ? (LatestUs - _firstUs) * 1e-6 : 0;

    public void See(long boardUs)
    {
        _firstUs = Math.Min(_firstUs, boardUs);
        LatestUs = Math.Max(LatestUs, boardUs);
    }
}
