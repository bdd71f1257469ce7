using Looseloop.Bench.Physics;
using Looseloop.Firmware;
using Looseloop.Link;

namespace Looseloop.Bench;

/// <summary>
/// A whole box inside this process: the firmware's own loop on the board of a world, in virtual time. It runs only while
/// somebody reads or pauses, on that thread, and is the same to the last count for the same world and seed.
/// </summary>
public sealed class VirtualBox : IByteLink
{
    // A board with nothing to do sleeps this long between looks at its port.
    private const double IdleS = 0.001;

    private readonly NoiseSource _boots;
    private readonly string _boardName;
    private BoxLoop _loop;
    private string? _lost;

    /// <param name="world">The world.</param>
    /// <param name="seed">Seed of noise, jitter and boot numbers.</param>
    /// <param name="startS">How far the world has run before the board starts, seconds: a coil that has warmed up.</param>
    public VirtualBox(World world, ulong seed = 1, double startS = 0)
    {
        Clock.Advance(startS);
        Board = new VirtualBoard(world, seed, Clock);
        _boots = new NoiseSource(seed ^ 0xB007);
        _boardName = world.Board.MostDutyBits > 13 ? "bench-esp32" : "bench-esp32s3";
        _loop = Boot();
    }

    public string Name => $"bench:{Board.World.Name}";

    /// <summary>The virtual clock that the box, its link and every time-out on it go by.</summary>
    public TimeProvider Time => Clock;

    public VirtualClock Clock { get; } = new();

    /// <summary>The board, for tests that look at the pin or the timer.</summary>
    public VirtualBoard Board { get; }

    /// <summary>Number of the present boot, as the box tells it.</summary>
    public int BootId { get; private set; }

    public void Write(ReadOnlySpan<byte> bytes)
    {
        ThrowIfLost();
        Board.FromHost.Send(bytes, Clock.Seconds);
    }

    public int Read(Span<byte> buffer, TimeSpan timeout)
    {
        double untilS = Clock.Seconds + Math.Max(timeout.TotalSeconds, 0);
        while (true)
        {
            ThrowIfLost();
            int taken = Board.ToHost.Take(buffer, Clock.Seconds);
            if (taken > 0)
            {
                return taken;
            }

            if (Clock.Seconds >= untilS)
            {
                return 0;
            }

            Run(untilS);
        }
    }

    public void Pause(TimeSpan duration)
    {
        double untilS = Clock.Seconds + duration.TotalSeconds;
        while (Clock.Seconds < untilS)
        {
            ThrowIfLost();
            Run(untilS);
        }
    }

    /// <summary>Resets the board, as a reset button or a brown-out does: it starts anew with another boot number.</summary>
    public void Reset()
    {
        Board.Restart();
        _loop = Boot();
    }

    /// <summary>Pulls the plug: from now on every use of this link fails as a vanished port does.</summary>
    public void Unplug()
    {
        Board.Restart();
        _lost = "The virtual box was unplugged.";
    }

    public void Dispose()
    {
        Board.Restart();
        _lost ??= "The virtual box was closed.";
    }

    // One step of the firmware. Idle, it sleeps, but not past the next byte from the host nor past the caller's time.
    private void Run(double untilS)
    {
        if (!_loop.Step())
        {
            // With nothing on either wire an idle board would only look at its port until the caller's time: hours pass at once.
            bool nothingComes = Board.FromHost.Count == 0 && Board.ToHost.Count == 0;
            double next = nothingComes ? untilS : Math.Min(Clock.Seconds + IdleS, Math.Min(untilS, Board.ToHost.NextArrivalS));
            Clock.AdvanceTo(next);
        }
    }

    private BoxLoop Boot()
    {
        BootId = 1 + (int)(_boots.Bits() % 1_000_000_000);
        return new BoxLoop(new BoxProfile(_boardName, BootId, Board.World.Board.MostDutyBits), Board, Board, Board, Board);
    }

    private void ThrowIfLost()
    {
        if (_lost is not null)
        {
            throw new LinkLostException(_lost);
        }
    }
}
