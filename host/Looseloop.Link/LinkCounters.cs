using Looseloop.Protocol;

namespace Looseloop.Link;

/// <summary>How a link has fared, for the live view, the record and the trace. Kept by whoever reads and writes its lines.</summary>
public sealed class LinkCounters
{
    private int _nextLine = -1;

    public long BytesSent { get; private set; }

    public long BytesReceived { get; private set; }

    public long LinesSent { get; private set; }

    /// <summary>Lines from the box whose checksum was right.</summary>
    public long LinesReceived { get; private set; }

    /// <summary>Lines dropped: no mark, a wrong checksum, or too long.</summary>
    public long BadLines { get; private set; }

    /// <summary>Lines that the box counted and the host never read, the bad ones among them.</summary>
    public long MissingLines { get; private set; }

    /// <summary>Requests sent again because no answer began.</summary>
    public long Retries { get; private set; }

    /// <summary>Times the box was found again after the link was lost.</summary>
    public long Reconnects { get; private set; }

    public void CountSent(int bytes, int lines)
    {
        BytesSent += bytes;
        LinesSent += lines;
    }

    public void CountReceivedBytes(int bytes) => BytesReceived += bytes;

    public void CountBadLine() => BadLines++;

    public void CountRetry() => Retries++;

    /// <summary>Counts a reconnect; the box's own line count is then taken up anew.</summary>
    public void CountReconnect()
    {
        Reconnects++;
        _nextLine = -1;
    }

    /// <summary>Forgets the box's line count, where it is known to have restarted.</summary>
    public void ExpectAnyLine() => _nextLine = -1;

    /// <summary>Counts a good line by its number, 0 to 65535 and round again.</summary>
    /// <returns>How many lines are missing before it.</returns>
    public int CountReceivedLine(int lineNumber)
    {
        const int Cycle = WireLimits.LastLineNumber + 1;
        LinesReceived++;
        int gap = _nextLine < 0 ? 0 : (lineNumber - _nextLine + Cycle) % Cycle;
        _nextLine = (lineNumber + 1) % Cycle;

        // More than half the cycle ahead is a step back: a board that started again, not thirty thousand lost lines.
        if (gap > Cycle / 2)
        {
            gap = 0;
        }

        MissingLines += gap;
        return gap;
    }
}
