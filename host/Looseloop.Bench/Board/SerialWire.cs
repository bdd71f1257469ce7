namespace Looseloop.Bench.Board;

/// <summary>One direction of the serial line in virtual time: each byte arrives when its ten bits have passed.</summary>
internal sealed class SerialWire
{
    private readonly double _byteS;
    private byte[] _bytes = new byte[1024];
    private double[] _arrival = new double[1024];
    private int _first;
    private int _count;
    private double _busyUntilS;

    public SerialWire(int baud) => _byteS = 10.0 / baud;

    /// <summary>Bytes on the wire or waiting to be taken.</summary>
    public int Count => _count;

    /// <summary>When the last byte given to the wire will have passed, seconds.</summary>
    public double BusyUntilS => _busyUntilS;

    /// <summary>The time that one byte takes, seconds.</summary>
    public double ByteS => _byteS;

    /// <summary>When the first byte arrives, or infinity if there is none.</summary>
    public double NextArrivalS => _count == 0 ? double.PositiveInfinity : _arrival[_first];

    public void Send(ReadOnlySpan<byte> bytes, double nowS)
    {
        Grow(_count + bytes.Length);
        foreach (byte value in bytes)
        {
            _busyUntilS = Math.Max(_busyUntilS, nowS) + _byteS;
            int at = (_first + _count++) % _bytes.Length;
            _bytes[at] = value;
            _arrival[at] = _busyUntilS;
        }
    }

    /// <summary>Takes what has arrived by a time.</summary>
    public int Take(Span<byte> buffer, double nowS)
    {
        int taken = 0;
        while (taken < buffer.Length && _count > 0 && _arrival[_first] <= nowS)
        {
            buffer[taken++] = _bytes[_first];
            _first = (_first + 1) % _bytes.Length;
            _count--;
        }

        return taken;
    }

    /// <summary>How many bytes have arrived by a time and were not taken.</summary>
    public int Arrived(double nowS)
    {
        int arrived = 0;
        while (arrived < _count && _arrival[(_first + arrived) % _bytes.Length] <= nowS)
        {
            arrived++;
        }

        return arrived;
    }

    public void Clear()
    {
        _count = 0;
        _busyUntilS = 0;
    }

    /// <summary>Drops what has arrived by a time.</summary>
    public void Drop(int count)
    {
        _first = (_first + count) % _bytes.Length;
        _count -= count;
    }

    private void Grow(int needed)
    {
        if (needed <= _bytes.Length)
        {
            return;
        }

        int size = Math.Max(needed, 2 * _bytes.Length);
        var bytes = new byte[size];
        var arrival = new double[size];
        for (int i = 0; i < _count; i++)
        {
            bytes[i] = _bytes[(_first + i) % _bytes.Length];
            arrival[i] = _arrival[(_first + i) % _bytes.Length];
        }

        _bytes = bytes;
        _arrival = arrival;
        _first = 0;
    }
}
