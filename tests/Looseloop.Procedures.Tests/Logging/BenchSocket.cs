using Looseloop.Bench;
using Looseloop.Link;
using Looseloop.Procedures.Logging;

namespace Looseloop.Procedures.Tests.Logging;

/// <summary>What happens to the box at a time.</summary>
internal enum Mishap
{
    /// <summary>The plug is pulled: the board loses its power too.</summary>
    PowerOff,

    /// <summary>The port vanishes, the board runs on.</summary>
    PortGone,

    /// <summary>The reset button.</summary>
    Reset,
}

/// <summary>A mishap at a time of the world, seconds; the port comes back after <paramref name="AwayS"/>.</summary>
internal sealed record MishapAt(double TimeS, Mishap What, double AwayS);

/// <summary>
/// A socket with one virtual box: it opens links to it, and mishaps befall them at given times, in the middle of whatever is
/// going on. Time runs on while nothing is plugged in.
/// </summary>
internal sealed class BenchSocket(World world, ulong seed, IEnumerable<MishapAt>? mishaps = null) : IBoxSource, IDisposable
{
    private readonly Queue<MishapAt> _mishaps = new((mishaps ?? []).OrderBy(m => m.TimeS));
    private VirtualBox _box = new(world, seed);
    private ulong _seed = seed;
    private double _backS;
    private bool _isOff;

    public string Name => "socket";

    public TimeProvider Time => new SocketTime(this);

    public double Seconds => _box.Clock.Seconds;

    public VirtualBox Box => _box;

    /// <summary>When each mishap came to pass, and what it was.</summary>
    public List<(double TimeS, Mishap What)> Happened { get; } = [];

    public IByteLink Open()
    {
        if (Seconds < _backS)
        {
            throw new LinkLostException("nothing is plugged in");
        }

        if (_isOff)
        {
            _isOff = false;
            _box = new VirtualBox(world, ++_seed, Seconds);
        }

        return new SocketLink(this, _box);
    }

    public void Pause(TimeSpan duration, CancellationToken cancel)
    {
        cancel.ThrowIfCancellationRequested();
        if (_isOff)
        {
            _box.Clock.Advance(duration.TotalSeconds);
        }
        else
        {
            _box.Pause(duration);
        }
    }

    public void Dispose() => _box.Dispose();

    private void Check(SocketLink link)
    {
        if (_mishaps.Count == 0 || _mishaps.Peek().TimeS > Seconds)
        {
            return;
        }

        MishapAt mishap = _mishaps.Dequeue();
        Happened.Add((Seconds, mishap.What));
        if (mishap.What == Mishap.Reset)
        {
            _box.Reset();
            return;
        }

        link.IsGone = true;
        _backS = Seconds + mishap.AwayS;
        if (mishap.What == Mishap.PowerOff)
        {
            _box.Unplug();
            _isOff = true;
        }
    }

    private sealed class SocketLink(BenchSocket socket, VirtualBox box) : IByteLink
    {
        public bool IsGone { get; set; }

        public string Name => socket.Name;

        public TimeProvider Time => socket.Time;

        public void Write(ReadOnlySpan<byte> bytes)
        {
            Check();
            box.Write(bytes);
        }

        public int Read(Span<byte> buffer, TimeSpan timeout)
        {
            Check();
            int read = box.Read(buffer, timeout);
            Check();
            return read;
        }

        public void Pause(TimeSpan duration)
        {
            Check();
            box.Pause(duration);
        }

        public void Dispose() => IsGone = true;

        private void Check()
        {
            if (!IsGone)
            {
                socket.Check(this);
            }

            if (IsGone)
            {
                throw new LinkLostException("the port is gone");
            }
        }
    }

    private sealed class SocketTime(BenchSocket socket) : TimeProvider
    {
        public override long TimestampFrequency => socket._box.Clock.TimestampFrequency;

        public override long GetTimestamp() => socket._box.Clock.GetTimestamp();

        public override DateTimeOffset GetUtcNow() => socket._box.Clock.GetUtcNow();
    }
}
