using System.Globalization;
using System.Text;

namespace Looseloop.Link;

/// <summary>
/// A link that writes every line that passes to a text, with its direction and the seconds since the trace began:
/// <c>12.345678 &lt; line</c> from the box, <c>&gt;</c> to it. Other bytes than printable ASCII stand as \x and two hex digits.
/// A trace that cannot be written ends; the link goes on.
/// </summary>
public sealed class LinkTrace : IByteLink
{
    /// <summary>Longer than any line of the protocol; noise without a newline is broken here.</summary>
    private const int LongestLineBytes = 512;

    private readonly object _gate = new();
    private readonly IByteLink _link;
    private readonly TextWriter _trace;
    private readonly long _started;
    private readonly StringBuilder _sending = new();
    private readonly StringBuilder _receiving = new();

    /// <param name="link">The link to follow; it is disposed of with the trace.</param>
    /// <param name="trace">Where the lines go; it stays open.</param>
    public LinkTrace(IByteLink link, TextWriter trace)
    {
        _link = link;
        _trace = trace;
        _started = link.Time.GetTimestamp();
        string at = link.Time.GetUtcNow().ToString("yyyy-MM-dd'T'HH:mm:ss.ffffff'Z'", CultureInfo.InvariantCulture);
        Put($"# {link.Name}, time 0 is {at}");
    }

    public string Name => _link.Name;

    public TimeProvider Time => _link.Time;

    /// <summary>What ended the trace early, such as a full disk; null if nothing did.</summary>
    public Exception? Failure { get; private set; }

    public void Write(ReadOnlySpan<byte> bytes)
    {
        try
        {
            _link.Write(bytes);
        }
        catch (LinkLostException e)
        {
            Note(e);
            throw;
        }

        lock (_gate)
        {
            Follow(_sending, '>', bytes);
        }
    }

    public int Read(Span<byte> buffer, TimeSpan timeout)
    {
        int count;
        try
        {
            count = _link.Read(buffer, timeout);
        }
        catch (LinkLostException e)
        {
            Note(e);
            throw;
        }

        lock (_gate)
        {
            Follow(_receiving, '<', buffer[..count]);
        }

        return count;
    }

    public void Pause(TimeSpan duration) => _link.Pause(duration);

    public void Dispose()
    {
        _link.Dispose();
        lock (_gate)
        {
            EndLine(_sending, '>', " (no newline)");
            EndLine(_receiving, '<', " (no newline)");
            Guard(_trace.Flush);
        }
    }

    private void Note(LinkLostException e)
    {
        lock (_gate)
        {
            EndLine(_receiving, '<', " (no newline)");
            Put(Stamp() + " ! " + e.Message);
        }
    }

    private void Follow(StringBuilder line, char direction, ReadOnlySpan<byte> bytes)
    {
        foreach (byte value in bytes)
        {
            if (value == '\n')
            {
                Put($"{Stamp()} {direction} {line}");
                line.Clear();
                continue;
            }

            if (value is >= 0x20 and < 0x7F)
            {
                line.Append((char)value);
            }
            else
            {
                line.Append("\\x").Append(value.ToString("X2", CultureInfo.InvariantCulture));
            }

            if (line.Length >= LongestLineBytes)
            {
                EndLine(line, direction, " (broken here)");
            }
        }
    }

    private void EndLine(StringBuilder line, char direction, string remark)
    {
        if (line.Length > 0)
        {
            Put($"{Stamp()} {direction} {line}{remark}");
            line.Clear();
        }
    }

    private string Stamp() =>
        Time.GetElapsedTime(_started).TotalSeconds.ToString("0.000000", CultureInfo.InvariantCulture);

    private void Put(string text) => Guard(() => _trace.WriteLine(text));

    private void Guard(Action write)
    {
        if (Failure is not null)
        {
            return;
        }

        try
        {
            write();
        }
        catch (Exception e) when (e is IOException or ObjectDisposedException or UnauthorizedAccessException)
        {
            Failure = e;
        }
    }
}
