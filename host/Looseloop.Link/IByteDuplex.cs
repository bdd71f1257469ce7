namespace Looseloop.Link;

/// <summary>
/// The box's end of a line: what a served box reads from and writes to, as <see cref="IByteLink"/> is the host's end.
/// Like a board's UART it does not know whether anybody listens.
/// </summary>
public interface IByteDuplex : IDisposable
{
    /// <summary>Waits for bytes from the host.</summary>
    /// <returns>How many were read, or 0 when <paramref name="timeout"/> passed without any or nobody is connected.</returns>
    /// <exception cref="ObjectDisposedException">This end has been closed.</exception>
    int Read(Span<byte> buffer, TimeSpan timeout);

    /// <summary>Sends bytes to the host. Those that nobody takes are dropped, as on a wire.</summary>
    /// <exception cref="ObjectDisposedException">This end has been closed.</exception>
    void Write(ReadOnlySpan<byte> bytes);
}
