using System.Diagnostics;
using System.Globalization;
using System.Text;
using Looseloop.Link;
using Looseloop.Protocol;

namespace Looseloop.Interpreter.Tests;

/// <summary>A host that says exactly what the test wants, over the board's pseudo-terminal and System.IO.Ports.</summary>
internal sealed class WireClient : IDisposable
{
    private readonly SerialLink _link;
    private readonly LineCollector _lines = new(WireLimits.BoxLineBytes);
    private readonly BoxLineParser _parser = new();
    private readonly byte[] _buffer = new byte[4096];
    private int _count;
    private int _next;
    private int _expectedLine = -1;

    public WireClient(InterpretedBoard board) => _link = SerialLink.Open(board.Port);

    /// <summary>Lines that were damaged, or were missing before one that came.</summary>
    public int Lost { get; private set; }

    public long BytesReceived { get; private set; }

    public int LinesSent { get; private set; }

    /// <summary>The number of the last request.</summary>
    public int Request { get; private set; }

    /// <summary>When the last line was sent, Stopwatch ticks.</summary>
    public long SentTicks { get; private set; }

    public int Send(string request)
    {
        Request = Request == WireLimits.LastRequestNumber ? 1 : Request + 1;
        SendRaw(Line(Request, request));
        return Request;
    }

    public static string Line(int number, string request)
    {
        byte[] body = Encoding.ASCII.GetBytes(string.Create(CultureInfo.InvariantCulture, $">{number} {request}"));
        return $"{Encoding.ASCII.GetString(body)} {Crc16.Of(body, 0, body.Length):X4}\n";
    }

    public void SendRaw(string text)
    {
        _link.Write(Encoding.Latin1.GetBytes(text));
        SentTicks = Stopwatch.GetTimestamp();
        LinesSent++;
    }

    /// <summary>The next good line, or null when the time was up.</summary>
    public (int Request, BoxMessage Message)? Receive(double seconds)
    {
        var waited = Stopwatch.StartNew();
        while (true)
        {
            while (_next < _count)
            {
                if (!_lines.Add(_buffer[_next++]))
                {
                    continue;
                }

                BoxMessage? message = _parser.Parse(_lines.Line, _lines.Count, out int line, out int request);
                if (message is null)
                {
                    Lost++;
                    continue;
                }

                if (_expectedLine >= 0 && line != _expectedLine)
                {
                    Lost++;
                }

                _expectedLine = line == WireLimits.LastLineNumber ? 0 : line + 1;
                return (request, message);
            }

            TimeSpan left = TimeSpan.FromSeconds(seconds) - waited.Elapsed;
            if (left <= TimeSpan.Zero)
            {
                return null;
            }

            _next = 0;
            _count = _link.Read(_buffer, left);
            BytesReceived += _count;
        }
    }

    /// <summary>All messages up to the one that ends the answer; `keep` goes out meanwhile.</summary>
    public List<BoxMessage> Ask(string request, double seconds = 20)
    {
        int number = Send(request);
        var messages = new List<BoxMessage>();
        bool untilDone = request.StartsWith("sweep", StringComparison.Ordinal) || request.StartsWith("ring", StringComparison.Ordinal);
        var waited = Stopwatch.StartNew();
        while (waited.Elapsed.TotalSeconds < seconds)
        {
            if (Stopwatch.GetElapsedTime(SentTicks).TotalSeconds > 0.5)
            {
                SendRaw(Line(number, "keep"));
            }

            if (Receive(0.2) is not (int answered, BoxMessage message))
            {
                continue;
            }

            messages.Add(message);
            bool ends = untilDone ? message is DoneAnswer : message is not AliveAnswer;
            if (answered == number && ends)
            {
                return messages;
            }
        }

        Assert.Fail($"no end of the answer to {request}: {string.Join('\n', messages)}");
        return messages;
    }

    public T Ask<T>(string request)
        where T : BoxMessage => Assert.IsType<T>(Ask(request)[^1]);

    public void Dispose() => _link.Dispose();
}
