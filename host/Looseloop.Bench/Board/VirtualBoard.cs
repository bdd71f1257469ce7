using Looseloop.Bench.Board;
using Looseloop.Bench.Physics;
using Looseloop.Firmware;

namespace Looseloop.Bench;

/// <summary>
/// The board of a world: everything behind the firmware's interfaces, in virtual time. Each call costs what it costs on
/// the real one, so that minutes pass in milliseconds and a busy loop still gets somewhere. Without randomness of its own
/// beyond the seed.
/// </summary>
public sealed class VirtualBoard : IExcitation, IPickup, IClock, ILink
{
    /// <summary>Bytes that the port holds before a write has to wait, and before unread input is thrown away.</summary>
    private const int RingBytes = 256;

    private const int Detector = 0;
    private const int Direct = 1;
    private const int Thermistor = 2;

    private readonly BoardParameters _costs;
    private readonly VirtualClock _clock;
    private readonly Scene _scene;
    private readonly NoiseSource _jitter;
    private readonly double _rate;
    private double _startedS;
    private LedcTimer _timer;
    private bool _isSet;

    /// <param name="world">The world.</param>
    /// <param name="seed">The same seed gives the same readings, to the count.</param>
    /// <param name="clock">The clock that the board moves.</param>
    public VirtualBoard(World world, ulong seed, VirtualClock clock)
    {
        World = world;
        _costs = world.Board;
        _clock = clock;
        _rate = 1 + (_costs.ClockPpm * 1e-6);
        _scene = new Scene(world, seed);
        _jitter = new NoiseSource(seed ^ 0x5DEECE66D);
        ToHost = new SerialWire(_costs.Baud);
        FromHost = new SerialWire(_costs.Baud);
        _startedS = clock.Seconds;
    }

    public World World { get; }

    /// <summary>Whether the drive pin moves.</summary>
    public bool IsDriving { get; private set; }

    /// <summary>The true frequency of the drive, the clock's error included, hertz; of a drive that is off, the last one.</summary>
    public double DriveHz => _timer.NominalHz * _rate;

    /// <summary>The timer's duty, in counts of 2^<see cref="DutyBits"/>.</summary>
    public long DutyCount => _timer.HighCounts;

    public int DutyBits => _timer.Bits;

    /// <summary>The timer's divider, 1/256.</summary>
    public long Divider => _timer.PartsPerCount;

    internal SerialWire ToHost { get; }

    internal SerialWire FromHost { get; }

    internal Scene Scene => _scene;

    /// <summary>Somebody brings a tone source near the pickup (its begin and end do not count), or takes it away.</summary>
    public void Bring(Carrier? source) => _scene.Bring(_clock.Seconds, source);

    public long NowUs()
    {
        Spend(_costs.NowUs);
        return BoardUs();
    }

    public void WaitUntilUs(long timeUs)
    {
        double wait = (timeUs - BoardUs()) / _rate;
        if (wait > 0)
        {
            Spend(wait);
        }

        Spend(_costs.NowUs + (_costs.WaitLateUs * _jitter.Uniform()));
    }

    public void Set(int requestHz, double askedDuty)
    {
        Spend(_costs.SetUs);
        _timer = LedcTimer.Request(requestHz, askedDuty, _costs.MostDutyBits);
        _isSet = true;
        if (IsDriving)
        {
            Drive();
        }
    }

    public void Start()
    {
        Spend(_costs.StartStopUs);
        if (!_isSet)
        {
            throw new InvalidOperationException("The timer was started before it was set.");
        }

        IsDriving = true;
        Drive();
    }

    public void Stop()
    {
        Spend(_costs.StartStopUs);
        if (IsDriving)
        {
            IsDriving = false;
            _scene.Stop(_clock.Seconds);
        }
    }

    public bool Has(int channel) => channel switch
    {
        Detector => true,
        Direct => _costs.HasDirect,
        Thermistor => _costs.HasThermistor,
        _ => false,
    };

    public int Read(int channel)
    {
        // The conversion sits in the middle of the call.
        double half = 0.5 * (_costs.ReadUs + (_costs.ReadJitterUs * ((2 * _jitter.Uniform()) - 1)));
        Spend(half);
        int counts = channel switch
        {
            Detector => _scene.ReadDetector(_clock.Seconds),
            Direct when _costs.HasDirect => _scene.ReadDirect(_clock.Seconds),
            Thermistor when _costs.HasThermistor => _scene.ReadThermistor(),
            _ => throw new ArgumentException("The board has no such input."),
        };
        Spend(half);
        return counts;
    }

    public int Receive(byte[] buffer)
    {
        Spend(_costs.PollUs);
        int waiting = FromHost.Arrived(_clock.Seconds);
        if (waiting > RingBytes)
        {
            // As the port does: an overflow throws all of it away.
            FromHost.Drop(waiting);
            return 0;
        }

        int taken = FromHost.Take(buffer, _clock.Seconds);
        Spend(taken * _costs.ReceiveUsPerByte);
        return taken;
    }

    public void Send(byte[] buffer, int count)
    {
        Spend(count * _costs.SendUsPerByte);

        // The port takes bytes while its ring has room; a longer queue is waited for.
        double queueS = ToHost.BusyUntilS + ((count - RingBytes) * ToHost.ByteS);
        _clock.AdvanceTo(queueS);
        ToHost.Send(buffer.AsSpan(0, count), _clock.Seconds);
    }

    /// <summary>Power comes back: board time starts anew, the pin rests, what was on the wire is lost.</summary>
    internal void Restart()
    {
        if (IsDriving)
        {
            IsDriving = false;
            _scene.Stop(_clock.Seconds);
        }

        _isSet = false;
        _startedS = _clock.Seconds;
        ToHost.Clear();
        FromHost.Clear();
    }

    private void Drive() => _scene.Drive(_clock.Seconds, DriveHz, _timer.Duty);

    private long BoardUs() => (long)((_clock.Seconds - _startedS) * 1e6 * _rate);

    private void Spend(double microseconds) => _clock.Advance(microseconds * 1e-6);
}
