using System.Diagnostics;

namespace Looseloop.Link;

/// <summary>Bytes between the thread that reads a port and the one that asks for them. Bounded: a full one holds up the reader.</summary>
internal sealed class ReceiveBuffer
{
    private readonly object _gate = new();
    private readonly byte[] _ring;
    private int _start;
    private int _count;
    private Exception? _end;
    private bool _closed;

    public ReceiveBuffer(int capacityBytes)
    {
        _ring = new byte[capacityBytes];
    }

    /// <summary>Why no more will come; null while the line lives.</summary>
    public Exception? End
    {
        get
        {
            lock (_gate)
            {
                return _end;
            }
        }
    }

    /// <summary>Adds bytes, waiting for room.</summary>
    /// <returns>False if the buffer was closed.</returns>
    public bool Add(ReadOnlySpan<byte> bytes)
    {
        lock (_gate)
        {
            while (!bytes.IsEmpty)
            {
                while (_count == _ring.Length && !_closed)
                {
                    Monitor.Wait(_gate);
                }

                if (_closed)
                {
                    return false;
                }

                int at = (_start + _count) % _ring.Length;
                int part = Math.Min(bytes.Length, Math.Min(_ring.Length - _count, _ring.Length - at));
                bytes[..part].CopyTo(_ring.AsSpan(at));
                _count += part;
                bytes = bytes[part..];
                Monitor.PulseAll(_gate);
            }

            return !_closed;
        }
    }

    /// <summary>Says that no more will come. The first reason stays.</summary>
    public void Finish(Exception reason)
    {
        lock (_gate)
        {
            _end ??= reason;
            Monitor.PulseAll(_gate);
        }
    }

    /// <summary>Lets both sides go at once; what is still in the buffer is forgotten.</summary>
    public void Close()
    {
        lock (_gate)
        {
            _closed = true;
            Monitor.PulseAll(_gate);
        }
    }

    /// <summary>Takes what is there, waiting for the first byte.</summary>
    /// <returns>How many bytes; 0 after the timeout; -1 if none is left and none will come.</returns>
    public int Take(Span<byte> buffer, TimeSpan timeout)
    {
        long started = Stopwatch.GetTimestamp();
        lock (_gate)
        {
            while (_count == 0)
            {
                if (_closed || _end is not null)
                {
                    return -1;
                }

                TimeSpan left = timeout - Stopwatch.GetElapsedTime(started);
                if (left <= TimeSpan.Zero)
                {
                    return 0;
                }

                // Rounded up: a rest of less than a millisecond must not become a busy loop.
                Monitor.Wait(_gate, (int)Math.Min(int.MaxValue, Math.Ceiling(left.TotalMilliseconds)));
            }

            int taken = Math.Min(buffer.Length, _count);
            int first = Math.Min(taken, _ring.Length - _start);
            _ring.AsSpan(_start, first).CopyTo(buffer);
            _ring.AsSpan(0, taken - first).CopyTo(buffer[first..]);
            _start = (_start + taken) % _ring.Length;
            _count -= taken;
            Monitor.PulseAll(_gate);
            return taken;
        }
    }
}
