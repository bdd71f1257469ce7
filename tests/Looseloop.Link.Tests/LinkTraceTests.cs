using System.Text;
using Microsoft.Extensions.Time.Testing;

namespace Looseloop.Link.Tests;

public sealed class LinkTraceTests : IDisposable
{
    private readonly StringWriter _text = new() { NewLine = "\n" };
    private readonly ScriptedLink _link = new();

    public void Dispose()
    {
        _text.Dispose();
        _link.Dispose();
    }

    [Fact]
    public void Whole_lines_stand_with_time_and_direction()
    {
        using var trace = new LinkTrace(_link, _text);
        _link.Pause(TimeSpan.FromSeconds(1.25));
        trace.Write(">1 identify ABCD\n"u8);
        Receive(trace, "<0 1 bo");
        _link.Pause(TimeSpan.FromSeconds(0.5));
        Receive(trace, "x 1\n<1 1 al");
        trace.Dispose();

        Assert.Equal(
            [
                "# scripted, time 0 is 2026-01-02T03:04:05.000000Z",
                "1.250000 > >1 identify ABCD",
                "1.750000 < <0 1 box 1",
                "1.750000 < <1 1 al (no newline)",
            ],
            Lines());
        Assert.True(_link.IsDisposed);
    }

    [Fact]
    public void Noise_is_shown_byte_by_byte_and_does_not_grow_without_end()
    {
        using var trace = new LinkTrace(_link, _text);
        Receive(trace, "\r\0\x7f\n");
        for (int i = 0; i < 100; i++)
        {
            Receive(trace, new string('z', 100));
        }

        Assert.Equal("0.000000 < \\x0D\\x00\\x7F", Lines()[1]);
        Assert.All(Lines(), line => Assert.InRange(line.Length, 1, 700));
        Assert.Contains(Lines(), line => line.EndsWith("(broken here)", StringComparison.Ordinal));
    }

    [Fact]
    public void The_loss_of_the_link_is_in_the_trace()
    {
        using var trace = new LinkTrace(_link, _text);
        _link.IsLost = true;
        Assert.Throws<LinkLostException>(() => trace.Read(new byte[4], TimeSpan.Zero));
        Assert.Throws<LinkLostException>(() => trace.Write("x"u8));
        Assert.Equal(2, Lines().Count(line => line.EndsWith("! gone", StringComparison.Ordinal)));
    }

    [Fact]
    public void A_trace_that_cannot_be_written_leaves_the_link_alone()
    {
        using var trace = new LinkTrace(_link, new FullDisk());
        trace.Write("a\n"u8);
        Receive(trace, "b\n");
        Assert.IsType<IOException>(trace.Failure);
        Assert.Equal("a\n", _link.Sent.ToString());
    }

    private void Receive(LinkTrace trace, string text)
    {
        _link.Next = Encoding.Latin1.GetBytes(text);
        byte[] buffer = new byte[256];
        Assert.Equal(text.Length, trace.Read(buffer, TimeSpan.Zero));
    }

    private string[] Lines() => _text.ToString().Split('\n', StringSplitOptions.RemoveEmptyEntries);

    private sealed class FullDisk : TextWriter
    {
        public override Encoding Encoding => Encoding.UTF8;

        public override void Write(char value) => throw new IOException("No space left on device");
    }

    private sealed class ScriptedLink : IByteLink
    {
        private readonly FakeTimeProvider _time = new(new DateTimeOffset(2026, 1, 2, 3, 4, 5, TimeSpan.Zero));

        public string Name => "scripted";

        public TimeProvider Time => _time;

        public byte[] Next { get; set; } = [];

        public bool IsLost { get; set; }

        public bool IsDisposed { get; private set; }

        public StringBuilder Sent { get; } = new();

        public void Write(ReadOnlySpan<byte> bytes)
        {
            ThrowIfLost();
            Sent.Append(Encoding.Latin1.GetString(bytes));
        }

        public int Read(Span<byte> buffer, TimeSpan timeout)
        {
            ThrowIfLost();
            Next.CopyTo(buffer);
            return Next.Length;
        }

        public void Pause(TimeSpan duration) => _time.Advance(duration);

        public void Dispose() => IsDisposed = true;

        private void ThrowIfLost()
        {
            if (IsLost)
            {
                throw new LinkLostException("gone");
            }
        }
    }
}
