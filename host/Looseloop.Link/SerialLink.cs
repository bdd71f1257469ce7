using System.IO.Ports;

namespace Looseloop.Link;

/// <summary>
/// A box at a serial port, 115200 baud, 8 data bits, no parity, one stop bit, no handshake. One thread reads the port for as
/// long as it lives; writes and closing share a lock. The first error of the port is final: make a new link after it.
/// </summary>
public sealed class SerialLink : IByteLink
{
    public const int Baud = 115200;

    /// <summary>A line of 120 bytes takes 10 ms; a port that takes none for this long is as good as gone.</summary>
    private const int WriteTimeoutMs = 2000;

    private const int ReceiveBufferBytes = 1 << 18;

    private readonly object _gate = new();
    private readonly Stream _stream;
    private readonly PortLock _lock;
    private readonly ReceiveBuffer _received = new(ReceiveBufferBytes);
    private bool _isClosed;

    private SerialLink(string name, SerialPort port, PortLock portLock)
    {
        Name = name;
        _stream = port.BaseStream;
        _lock = portLock;
        new Thread(ReadUntilTheEnd) { IsBackground = true, Name = "read " + name }.Start();
    }

    public string Name { get; }

    public TimeProvider Time => TimeProvider.System;

    /// <summary>Opens a port. This may reset the board behind it: wait for its identification.</summary>
    /// <param name="portName">A path on Linux and macOS, such as one below /dev/serial/by-id; COM3 on Windows.</param>
    /// <exception cref="LinkOpenException">It could not be opened; its kind says why.</exception>
    public static SerialLink Open(string portName) => Open(portName, PortLock.DefaultFolder);

    internal static SerialLink Open(string portName, string lockFolder)
    {
        PortCheck.ThrowIfNoPort(portName);
        PortLock portLock = TakeLock(portName, lockFolder);
        try
        {
            return new SerialLink(portName, OpenPort(portName), portLock);
        }
        catch
        {
            portLock.Dispose();
            throw;
        }
    }

    public void Write(ReadOnlySpan<byte> bytes)
    {
        lock (_gate)
        {
            ObjectDisposedException.ThrowIf(_isClosed, this);
            if (_received.End is Exception earlier)
            {
                throw Lost(earlier);
            }

            try
            {
                // One call for all of it: each costs about a millisecond.
                _stream.Write(bytes);
            }
            catch (Exception e) when (IsPortError(e))
            {
                _received.Finish(e);
                throw Lost(e);
            }
        }
    }

    public int Read(Span<byte> buffer, TimeSpan timeout)
    {
        int count = _received.Take(buffer, timeout);
        if (count >= 0)
        {
            return count;
        }

        ObjectDisposedException.ThrowIf(Volatile.Read(ref _isClosed), this);
        throw Lost(_received.End!);
    }

    public void Pause(TimeSpan duration) => Thread.Sleep(duration);

    public void Dispose()
    {
        lock (_gate)
        {
            if (_isClosed)
            {
                return;
            }

            Volatile.Write(ref _isClosed, true);
            _received.Close();

            // After an unplug Close and Dispose of the port itself hang for ever; its stream's Dispose returns at once.
            try
            {
                _stream.Dispose();
            }
            catch (Exception e) when (IsPortError(e))
            {
                // The port is gone already; there is nothing left to close.
            }

            _lock.Dispose();
        }
    }

    private static PortLock TakeLock(string portName, string lockFolder)
    {
        try
        {
            return PortLock.TryTake(portName, lockFolder, out int? holder)
                ?? throw LinkOpenException.Busy(portName, holder, inner: null);
        }
        catch (Exception e) when (e is UnauthorizedAccessException or IOException and not LinkOpenException)
        {
            throw LinkOpenException.NoLockFile(portName, e);
        }
    }

    private static SerialPort OpenPort(string portName)
    {
        try
        {
            // Opening raises both control lines. Left up together they neither reset a board through the usual pair of
            // transistors nor hold it in its loader.
            return OpenPort(portName, raiseControlLines: true);
        }
        catch (IOException)
        {
            // A pseudo-terminal has no control lines.
        }
        catch (Exception e) when (e is UnauthorizedAccessException or ArgumentException)
        {
            throw PortCheck.Explain(portName, e);
        }

        try
        {
            return OpenPort(portName, raiseControlLines: false);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException)
        {
            throw PortCheck.Explain(portName, e);
        }
    }

    private static SerialPort OpenPort(string portName, bool raiseControlLines)
    {
        var port = new SerialPort(portName, Baud, Parity.None, 8, StopBits.One)
        {
            Handshake = Handshake.None,
            ReadTimeout = SerialPort.InfiniteTimeout,
            WriteTimeout = WriteTimeoutMs,
            DtrEnable = raiseControlLines,
            RtsEnable = raiseControlLines,
        };
        port.Open();
        return port;
    }

    private static bool IsPortError(Exception e) =>
        e is IOException or ObjectDisposedException or InvalidOperationException or TimeoutException
            or UnauthorizedAccessException or OperationCanceledException;

    private LinkLostException Lost(Exception inner) =>
        new($"The box at {Name} is gone: unplugged, or without power. Plug it in again.", inner);

    private void ReadUntilTheEnd()
    {
        byte[] buffer = new byte[4096];
        try
        {
            while (true)
            {
                int count = _stream.Read(buffer, 0, buffer.Length);
                if (count == 0)
                {
                    throw new EndOfStreamException("The port reads no more.");
                }

                if (!_received.Add(buffer.AsSpan(0, count)))
                {
                    return;
                }
            }
        }
        catch (Exception e) when (IsPortError(e))
        {
            _received.Finish(e);
        }
    }
}
