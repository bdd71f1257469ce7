namespace Looseloop.Link;

/// <summary>Bytes to and from one box: a serial port, a pseudo-terminal or a box inside this process.</summary>
public interface IByteLink : IDisposable
{
    /// <summary>What the user would call this link, such as the port's path.</summary>
    string Name { get; }

    /// <summary>
    /// The clock that the box on this link lives by: the machine's for hardware, the bench's own for a virtual box.
    /// Every time-out and pause on the link goes by it.
    /// </summary>
    TimeProvider Time { get; }

    /// <summary>Sends bytes.</summary>
    /// <exception cref="LinkLostException">The port is gone. This object is then of no further use.</exception>
    void Write(ReadOnlySpan<byte> bytes);

    /// <summary>Waits for bytes.</summary>
    /// <returns>How many were read, or 0 when <paramref name="timeout"/> passed without any.</returns>
    /// <exception cref="LinkLostException">The port is gone. This object is then of no further use.</exception>
    int Read(Span<byte> buffer, TimeSpan timeout);

    /// <summary>Lets time pass on <see cref="Time"/>: waits at hardware, moves the virtual box's clock.</summary>
    void Pause(TimeSpan duration);
}
