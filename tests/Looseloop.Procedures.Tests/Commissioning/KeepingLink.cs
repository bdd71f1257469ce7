using System.Text;
using Looseloop.Link;
using Looseloop.Protocol;

namespace Looseloop.Procedures.Tests.Commissioning;

/// <summary>A link that says <c>keep</c> by itself whenever it is read: to its host, a box whose silence stop does not work.</summary>
internal sealed class KeepingLink(IByteLink inner) : IByteLink
{
    private static readonly TimeSpan _slice = TimeSpan.FromMilliseconds(50);
    private static readonly byte[] _keep = Keep();

    public string Name => inner.Name;

    public TimeProvider Time => inner.Time;

    public void Write(ReadOnlySpan<byte> bytes) => inner.Write(bytes);

    public int Read(Span<byte> buffer, TimeSpan timeout)
    {
        inner.Write(_keep);
        return inner.Read(buffer, timeout < _slice ? timeout : _slice);
    }

    public void Pause(TimeSpan duration) => inner.Pause(duration);

    public void Dispose() => inner.Dispose();

    private static byte[] Keep()
    {
        byte[] body = Encoding.ASCII.GetBytes(">9 keep");
        return Encoding.ASCII.GetBytes($">9 keep {Crc16.Of(body, 0, body.Length):X4}\n");
    }
}
