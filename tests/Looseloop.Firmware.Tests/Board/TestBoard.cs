using Looseloop.Firmware;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests.Board;

/// <summary>
/// A board in virtual time for tests of the box alone. Every call costs time as on the board; each way in which a board
/// can misbehave is a property.
/// </summary>
internal sealed class TestBoard : IExcitation, IPickup, IClock, ILink
{
    private readonly Queue<(long DueUs, byte Value)> _wire = new();
    private readonly Queue<byte> _ring = new();
    private readonly List<byte> _sentLine = [];
    private double _setHz;
    private double _setDuty;

    /// <summary>Virtual time since the start, µs.</summary>
    public long TimeUs { get; set; } = 1000;

    /// <summary>Added to what the clock shows: a clock that steps.</summary>
    public long ClockErrorUs { get; set; }

    public int ReadCostUs { get; set; } = 120;

    public int SetCostUs { get; set; } = 300;

    public int StopCostUs { get; set; } = 20;

    public int ClockCostUs { get; set; } = 2;

    /// <summary>Time a byte takes either way, µs; 0: none.</summary>
    public double ByteUs { get; set; } = 1e6 / 11520;

    /// <summary>Bytes that the receive ring holds; one more flushes it.</summary>
    public int RingBytes { get; set; } = 256;

    /// <summary>Most bytes handed over by one receive.</summary>
    public int MostPerReceive { get; set; } = int.MaxValue;

    /// <summary>Most bytes written at once: a longer line goes in pieces.</summary>
    public int BytesPerPiece { get; set; } = int.MaxValue;

    /// <summary>How long each piece's write returns after its last byte has gone, µs.</summary>
    public int PieceLateUs { get; set; }

    /// <summary>When the bytes of each piece were gone, µs.</summary>
    public List<long> PiecesGoneUs { get; } = [];

    /// <summary>How often the receive ring overflowed and was flushed.</summary>
    public int Flushes { get; private set; }

    /// <summary>The level of an input now, raw counts.</summary>
    public Func<TestBoard, int, int> Level { get; set; } = (_, _) => 400;

    public HashSet<int> Inputs { get; } = [Channel.Detector];

    public Action<TestBoard>? BeforeRead { get; set; }

    public Action<TestBoard>? BeforeSet { get; set; }

    public Action<TestBoard>? BeforeStart { get; set; }

    public Action<TestBoard>? BeforeStop { get; set; }

    public Action<TestBoard>? BeforeSend { get; set; }

    public Action<TestBoard>? BeforeReceive { get; set; }

    public bool IsDriving { get; private set; }

    /// <summary>When the drive last stopped, µs.</summary>
    public long StoppedUs { get; private set; } = long.MinValue / 2;

    public double DriveHz { get; private set; }

    public double DriveDuty { get; private set; }

    public int Reads { get; private set; }

    /// <summary>Conversions since the drive last stopped.</summary>
    public int ReadsSinceStop { get; private set; } = int.MaxValue / 2;

    public int Starts { get; private set; }

    public List<(int RequestHz, double Duty)> Settings { get; } = [];

    /// <summary>Lines that have left the board, with the time at which their last byte did.</summary>
    public List<(long TimeUs, string Text)> Sent { get; } = [];

    /// <summary>True: what is sent is counted but not kept, so that the test itself allocates nothing.</summary>
    public bool Forgetful { get; set; }

    public long SentBytes { get; private set; }

    public long SentLines { get; private set; }

    /// <summary>Puts bytes on the wire to the board, behind those already there.</summary>
    public void Type(ReadOnlySpan<byte> bytes)
    {
        double due = _wire.Count > 0 ? Math.Max(_wire.Last().DueUs, TimeUs) : TimeUs;
        foreach (byte value in bytes)
        {
            due += ByteUs;
            _wire.Enqueue(((long)due, value));
        }
    }

    public void Set(int requestHz, double askedDuty)
    {
        BeforeSet?.Invoke(this);
        TimeUs += SetCostUs;
        _setHz = requestHz;
        _setDuty = askedDuty;
        if (IsDriving)
        {
            DriveHz = _setHz;
            DriveDuty = _setDuty;
        }

        if (!Forgetful)
        {
            Settings.Add((requestHz, askedDuty));
        }
    }

    public void Start()
    {
        BeforeStart?.Invoke(this);
        TimeUs += SetCostUs;
        IsDriving = true;
        DriveHz = _setHz;
        DriveDuty = _setDuty;
        Starts++;
    }

    public void Stop()
    {
        BeforeStop?.Invoke(this);
        TimeUs += StopCostUs;
        if (IsDriving)
        {
            StoppedUs = TimeUs;
            ReadsSinceStop = 0;
        }

        IsDriving = false;
    }

    public bool Has(int channel)
    {
        return Inputs.Contains(channel);
    }

    public int Read(int channel)
    {
        BeforeRead?.Invoke(this);
        Reads++;
        ReadsSinceStop++;
        TimeUs += ReadCostUs;
        return Level(this, channel);
    }

    public long NowUs()
    {
        TimeUs += ClockCostUs;
        return TimeUs + ClockErrorUs;
    }

    public void WaitUntilUs(long timeUs)
    {
        TimeUs = Math.Max(TimeUs, timeUs - ClockErrorUs);
    }

    public int Receive(byte[] buffer)
    {
        BeforeReceive?.Invoke(this);
        while (_wire.TryPeek(out (long DueUs, byte Value) next) && next.DueUs <= TimeUs)
        {
            _wire.Dequeue();
            if (_ring.Count == RingBytes)
            {
                _ring.Clear();
                Flushes++;
            }

            _ring.Enqueue(next.Value);
        }

        int count = 0;
        while (count < buffer.Length && count < MostPerReceive && _ring.Count > 0)
        {
            buffer[count++] = _ring.Dequeue();
        }

        return count;
    }

    public void Send(byte[] buffer, int count)
    {
        BeforeSend?.Invoke(this);
        for (int sent = 0; sent < count; sent += BytesPerPiece)
        {
            int piece = Math.Min(BytesPerPiece, count - sent);
            TimeUs += (long)(piece * ByteUs);
            if (!Forgetful)
            {
                PiecesGoneUs.Add(TimeUs);
            }

            TimeUs += PieceLateUs;
            if (piece == count - sent)
            {
                break;
            }
        }

        SentBytes += count;
        SentLines++;
        for (int i = 0; i < count && !Forgetful; i++)
        {
            if (buffer[i] == (byte)'\n')
            {
                Sent.Add((TimeUs, System.Text.Encoding.ASCII.GetString([.. _sentLine])));
                _sentLine.Clear();
            }
            else
            {
                _sentLine.Add(buffer[i]);
            }
        }
    }
}
