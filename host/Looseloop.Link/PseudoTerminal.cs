using Microsoft.Win32.SafeHandles;

namespace Looseloop.Link;

/// <summary>
/// A serial line without hardware (Linux): this object is the box's end, <see cref="SlavePath"/> the port that a host opens.
/// Hosts may come and go; disposing of it is pulling the plug. A pseudo-terminal keeps no baud rate.
/// </summary>
public sealed class PseudoTerminal : IByteDuplex
{
    /// <summary>A host that takes nothing for this long has stopped reading; what it does not take is dropped.</summary>
    private static readonly TimeSpan _writePatience = TimeSpan.FromSeconds(1);

    /// <summary>How often to look for a host while none is there: poll cannot wait for one to come.</summary>
    private static readonly TimeSpan _absenceLook = TimeSpan.FromMilliseconds(5);

    private readonly SafeFileHandle _master;
    private readonly SafeFileHandle _wakeReader;
    private readonly SafeFileHandle _wakeWriter;
    private long _droppedBytes;
    private bool _hostHasStopped;
    private int _closed;

    /// <summary>Makes a raw pseudo-terminal that no host has opened yet.</summary>
    /// <exception cref="PlatformNotSupportedException">This is not Linux; see <see cref="IsSupported"/>.</exception>
    /// <exception cref="IOException">The system has no more of them.</exception>
    public PseudoTerminal()
    {
        if (!IsSupported)
        {
            throw new PlatformNotSupportedException("A pseudo-terminal needs Linux.");
        }

        _master = Posix.OpenMaster();
        SlavePath = Posix.MakeRaw(_master);
        (_wakeReader, _wakeWriter) = Posix.MakePipe();
    }

    public static bool IsSupported => OperatingSystem.IsLinux();

    /// <summary>The port that a host opens.</summary>
    public string SlavePath { get; }

    /// <summary>Bytes written that no host took.</summary>
    public long DroppedBytes => Interlocked.Read(ref _droppedBytes);

    public int Read(Span<byte> buffer, TimeSpan timeout)
    {
        long started = TimeProvider.System.GetTimestamp();
        while (true)
        {
            TimeSpan left = timeout - TimeProvider.System.GetElapsedTime(started);
            int events = WaitFor(Posix.Readable, left);
            if ((events & Posix.Readable) != 0)
            {
                int count = Posix.Read(_master, buffer);
                if (count > 0)
                {
                    return count;
                }
            }

            if (left <= TimeSpan.Zero)
            {
                return 0;
            }

            if ((events & Posix.HungUp) != 0)
            {
                WaitFor(0, left < _absenceLook ? left : _absenceLook);
            }
        }
    }

    public void Write(ReadOnlySpan<byte> bytes)
    {
        long lastTaken = TimeProvider.System.GetTimestamp();
        while (!bytes.IsEmpty)
        {
            TimeSpan left = _hostHasStopped ? TimeSpan.Zero : _writePatience - TimeProvider.System.GetElapsedTime(lastTaken);
            int events = WaitFor(Posix.Writable, left);
            if ((events & Posix.HungUp) != 0 || (events == 0 && left <= TimeSpan.Zero))
            {
                // Once is enough to wait: a box must not stand still at each line for a host that has stopped reading.
                _hostHasStopped = (events & Posix.HungUp) == 0;
                Interlocked.Add(ref _droppedBytes, bytes.Length);
                return;
            }

            if ((events & Posix.Writable) != 0)
            {
                int count = Posix.Write(_master, bytes);
                if (count > 0)
                {
                    bytes = bytes[count..];
                    lastTaken = TimeProvider.System.GetTimestamp();
                    _hostHasStopped = false;
                }
            }
        }
    }

    /// <summary>Pulls the plug: the host's end fails, and a <see cref="Read"/> or <see cref="Write"/> in progress throws.</summary>
    public void Dispose()
    {
        if (Interlocked.Exchange(ref _closed, 1) != 0)
        {
            return;
        }

        // A handle in use by another thread is closed only when that call returns: wake it.
        _wakeWriter.Dispose();
        _master.Dispose();
        _wakeReader.Dispose();
    }

    private int WaitFor(short events, TimeSpan timeout)
    {
        ObjectDisposedException.ThrowIf(Volatile.Read(ref _closed) != 0, this);
        int happened = Posix.Poll(_master, events, _wakeReader, timeout);
        ObjectDisposedException.ThrowIf(Volatile.Read(ref _closed) != 0, this);
        return happened;
    }
}
