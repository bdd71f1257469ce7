using Looseloop.Link;

namespace Looseloop.Bench;

/// <summary>
/// Serves a virtual box on a line in real time, so that a host can use it as it would use a board. The box's clock follows
/// the machine's; where the machine could not keep up, the box loses that time and does not race after it.
/// </summary>
public sealed class BenchServer
{
    private static readonly TimeSpan _look = TimeSpan.FromMilliseconds(1);
    private static readonly TimeSpan _longestLag = TimeSpan.FromMilliseconds(250);

    private readonly VirtualBox _box;
    private readonly IByteDuplex _line;
    private readonly TimeProvider _time;

    /// <param name="box">The box; nothing else may use it meanwhile.</param>
    /// <param name="line">The box's end of the line.</param>
    /// <param name="time">The clock to follow; the machine's if null.</param>
    public BenchServer(VirtualBox box, IByteDuplex line, TimeProvider? time = null)
    {
        _box = box;
        _line = line;
        _time = time ?? TimeProvider.System;
    }

    /// <summary>How much time the box has lost because the machine was busy.</summary>
    public TimeSpan Lost { get; private set; }

    /// <summary>Serves until told to stop.</summary>
    /// <exception cref="ObjectDisposedException">The line was closed.</exception>
    public void Run(CancellationToken stop)
    {
        var fromHost = new byte[512];
        var toHost = new byte[512];
        long begun = _time.GetTimestamp();
        double beginS = _box.Clock.Seconds;
        while (!stop.IsCancellationRequested)
        {
            int heard = _line.Read(fromHost, _look);
            if (heard > 0)
            {
                _box.Write(fromHost.AsSpan(0, heard));
            }

            TimeSpan behind = Behind(begun, beginS);
            if (behind > _longestLag)
            {
                Lost += behind - _longestLag;
                beginS -= (behind - _longestLag).TotalSeconds;
            }

            while ((behind = Behind(begun, beginS)) > TimeSpan.Zero && !stop.IsCancellationRequested)
            {
                int said = _box.Read(toHost, behind);
                if (said > 0)
                {
                    _line.Write(toHost.AsSpan(0, said));
                }
            }
        }
    }

    private TimeSpan Behind(long begun, double beginS) =>
        _time.GetElapsedTime(begun) - TimeSpan.FromSeconds(_box.Clock.Seconds - beginS);
}
