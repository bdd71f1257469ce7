using Looseloop.Link;
using Looseloop.Protocol;

namespace Looseloop.Box;

/// <summary>Lines to and from a box: numbers requests, checks what comes back, keeps the box awake, counts what went wrong.</summary>
internal sealed class LineChannel(IByteLink link)
{
    private static readonly TimeSpan _keepAfter = TimeSpan.FromMilliseconds(500);
    private static readonly TimeSpan _slice = TimeSpan.FromMilliseconds(100);

    private readonly LineWriter _writer = new(WireLimits.HostLineBytes);
    private readonly LineCollector _collector = new(WireLimits.BoxLineBytes);
    private readonly BoxLineParser _parser = new();
    private readonly byte[] _received = new byte[1024];
    private int _receivedCount;
    private int _receivedNext;
    private int _request;
    private int _expectedLine = -1;
    private long _lastSent;

    public IByteLink Link => link;

    public BoxLineCounters Counters { get; } = new();

    /// <summary>The number of the request begun last.</summary>
    public int Request => _request;

    public long Now => link.Time.GetTimestamp();

    /// <summary>Since this side's last line.</summary>
    public TimeSpan SinceSent => Since(_lastSent);

    public TimeSpan Since(long timestamp) => link.Time.GetElapsedTime(timestamp);

    /// <summary>Sends a request under a new number.</summary>
    public void Send(string verb, params ReadOnlySpan<long> fields)
    {
        _request = _request >= WireLimits.LastRequestNumber ? 1 : _request + 1;
        Compose(_request, verb, fields);
        Resend();
    }

    /// <summary>Sends the request begun last once more, under the same number.</summary>
    public void Resend()
    {
        link.Write(_writer.Buffer.AsSpan(0, _writer.Length));
        _lastSent = Now;
    }

    /// <summary>Sends <c>keep</c> if the box has heard nothing for a while. It has a number of its own and no answer.</summary>
    public void KeepAwake()
    {
        if (Since(_lastSent) >= _keepAfter)
        {
            Compose(_request, Verb.Keep, []);
            Resend();
        }
    }

    /// <summary>Waits for the next message of the box that answers the request begun last, or none in particular.</summary>
    /// <returns>The message, or null when the time was up.</returns>
    public BoxMessage? Receive(TimeSpan timeout, bool keepAwake = false)
    {
        long begun = Now;
        while (true)
        {
            while (_receivedNext < _receivedCount)
            {
                if (_collector.Add(_received[_receivedNext++]) && Take() is BoxMessage message)
                {
                    return message;
                }
            }

            TimeSpan left = timeout - Since(begun);
            if (left <= TimeSpan.Zero)
            {
                return null;
            }

            if (keepAwake)
            {
                KeepAwake();
            }

            _receivedCount = link.Read(_received, left < _slice ? left : _slice);
            _receivedNext = 0;
        }
    }

    /// <summary>Forgets whatever has arrived, after a break in the conversation.</summary>
    public void Clear()
    {
        while (link.Read(_received, TimeSpan.Zero) > 0)
        {
        }

        _receivedCount = 0;
        _receivedNext = 0;
        _collector.Clear();
        _expectedLine = -1;
    }

    private BoxMessage? Take()
    {
        Counters.Lines++;
        BoxMessage? message = _parser.Parse(_collector.Line, _collector.Count, out int line, out int request);
        if (message is null || _collector.WasTooLong)
        {
            Counters.Damaged++;
            return null;
        }

        if (_expectedLine >= 0 && line != _expectedLine)
        {
            Counters.Missing += (line - _expectedLine + WireLimits.LastLineNumber + 1) % (WireLimits.LastLineNumber + 1);
        }

        _expectedLine = line == WireLimits.LastLineNumber ? 0 : line + 1;
        if (request != 0 && request != _request)
        {
            Counters.Late++; // an answer to a request that was given up
            return null;
        }

        return message;
    }

    private void Compose(int number, string verb, ReadOnlySpan<long> fields)
    {
        _writer.BeginHost(number);
        _writer.Word(verb);
        foreach (long field in fields)
        {
            _writer.Number(field);
        }

        if (_writer.End() == 0)
        {
            throw new InvalidOperationException($"the request {verb} is longer than a line may be");
        }
    }
}
