using System.Text;
using Looseloop.Link;
using Looseloop.Protocol;

namespace Looseloop.Bench.Tests;

/// <summary>The box on a line, in real time.</summary>
public class BenchServerTests
{
    [Fact]
    public async Task AServedBoxAnswersInRealTime()
    {
        using var line = new Wire();
        using var box = new VirtualBox(new World());
        using var stop = new CancellationTokenSource();
        var server = new BenchServer(box, line);
        Task serving = Task.Run(() => server.Run(stop.Token));
        line.ToBox(Line("identify"));
        string answer = line.FromBox(TimeSpan.FromSeconds(20));
        await stop.CancelAsync();
        await serving.WaitAsync(TimeSpan.FromSeconds(20));
        Assert.Contains($" box 1 ", answer, StringComparison.Ordinal);
        Assert.Contains($" {box.BootId} ", answer, StringComparison.Ordinal);
    }

    [Fact]
    public async Task ALineThatIsClosedEndsTheServer()
    {
        var line = new Wire();
        using var box = new VirtualBox(new World());
        var server = new BenchServer(box, line);
        Task serving = Task.Run(() => server.Run(CancellationToken.None));
        line.Dispose();
        await Assert.ThrowsAsync<ObjectDisposedException>(() => serving.WaitAsync(TimeSpan.FromSeconds(20)));
    }

    private static byte[] Line(string verb)
    {
        var writer = new LineWriter(WireLimits.HostLineBytes);
        writer.BeginHost(1);
        writer.Word(verb);
        int count = writer.End();
        return writer.Buffer[..count];
    }

    // A line inside the process: what the host wrote waits here, and what the box said.
    private sealed class Wire : IByteDuplex
    {
        private readonly object _gate = new();
        private readonly Queue<byte> _toBox = new();
        private readonly StringBuilder _fromBox = new();
        private bool _closed;

        public void ToBox(byte[] bytes)
        {
            lock (_gate)
            {
                foreach (byte value in bytes)
                {
                    _toBox.Enqueue(value);
                }
            }
        }

        public string FromBox(TimeSpan patience)
        {
            for (DateTime end = DateTime.UtcNow + patience; DateTime.UtcNow < end; Thread.Sleep(2))
            {
                lock (_gate)
                {
                    string text = _fromBox.ToString();
                    if (text.Contains('\n', StringComparison.Ordinal))
                    {
                        return text;
                    }
                }
            }

            return "";
        }

        public int Read(Span<byte> buffer, TimeSpan timeout)
        {
            Thread.Sleep(timeout);
            lock (_gate)
            {
                ObjectDisposedException.ThrowIf(_closed, this);
                int count = Math.Min(buffer.Length, _toBox.Count);
                for (int i = 0; i < count; i++)
                {
                    buffer[i] = _toBox.Dequeue();
                }

                return count;
            }
        }

        public void Write(ReadOnlySpan<byte> bytes)
        {
            lock (_gate)
            {
                ObjectDisposedException.ThrowIf(_closed, this);
                _fromBox.Append(Encoding.ASCII.GetString(bytes));
            }
        }

        public void Dispose()
        {
            lock (_gate)
            {
                _closed = true;
            }
        }
    }
}
