using Looseloop.Link;

namespace Looseloop.Box.Tests;

/// <summary>A link that damages a byte now and then, in either direction, by a seeded draw.</summary>
internal sealed class DamagedLink(IByteLink inner, double fromBox, double toBox) : IByteLink
{
    private readonly Random _random = new(5);

    public string Name => inner.Name;

    public TimeProvider Time => inner.Time;

    public int Damaged { get; private set; }

    public void Write(ReadOnlySpan<byte> bytes)
    {
        byte[] copy = bytes.ToArray();
        Damage(copy, toBox);
        inner.Write(copy);
    }

    public int Read(Span<byte> buffer, TimeSpan timeout)
    {
        int count = inner.Read(buffer, timeout);
        Damage(buffer[..count], fromBox);
        return count;
    }

    public void Pause(TimeSpan duration) => inner.Pause(duration);

    public void Dispose() => inner.Dispose();

    private void Damage(Span<byte> bytes, double probability)
    {
        for (int i = 0; i < bytes.Length; i++)
        {
            if (_random.NextDouble() < probability)
            {
                bytes[i] ^= (byte)(1 << _random.Next(7));
                Damaged++;
            }
        }
    }
}
