using System.Text;
using Looseloop.Link;
using Looseloop.Protocol;

namespace Looseloop.Procedures.Tests.Commissioning;

/// <summary>Sets the interlock's threshold of the box to the top of its range whenever the host sets it, and answers as if it had not.</summary>
internal sealed class BlindLink(IByteLink inner) : IByteLink
{
    private const string Limits = " limits ";
    private string? _told;

    public string Name => inner.Name;

    public TimeProvider Time => inner.Time;

    public void Write(ReadOnlySpan<byte> bytes)
    {
        string[] words = Encoding.ASCII.GetString(bytes).TrimEnd('\n').Split(' ');
        if (words.Length == 7 && words[1] == "limits")
        {
            _told = words[5];
            words[5] = "3500";
            inner.Write(Line(string.Join(' ', words[..6])));
            return;
        }

        inner.Write(bytes);
    }

    public int Read(Span<byte> buffer, TimeSpan timeout)
    {
        int count = inner.Read(buffer, timeout);

        // A line comes in pieces: wait for its end.
        while (count > 0 && buffer[count - 1] != '\n')
        {
            count += inner.Read(buffer[count..], timeout);
        }

        string text = Encoding.ASCII.GetString(buffer[..count]);
        if (_told is null || !text.Contains(Limits, StringComparison.Ordinal))
        {
            return count;
        }

        string[] words = text.TrimEnd('\n').Split(' ');
        words[^2] = _told;
        byte[] line = Line(string.Join(' ', words[..^1]));
        line.CopyTo(buffer);
        return line.Length;
    }

    public void Pause(TimeSpan duration) => inner.Pause(duration);

    public void Dispose() => inner.Dispose();

    private static byte[] Line(string body)
    {
        byte[] bytes = Encoding.ASCII.GetBytes(body);
        return Encoding.ASCII.GetBytes($"{body} {Crc16.Of(bytes, 0, bytes.Length):X4}\n");
    }
}
