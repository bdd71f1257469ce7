using System.Globalization;
using System.Text;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests.Board;

/// <summary>A line from the box, taken apart by hand, without the code under test but for the checksum.</summary>
internal sealed record BoxLine(long TimeUs, int Number, int Request, string Word, string[] Fields)
{
    public static BoxLine Parse(long timeUs, string text)
    {
        Assert.True(text.Length + 1 <= 250, text);
        Assert.DoesNotContain(text, c => c < ' ' || c > '~');
        int tail = text.LastIndexOf(' ');
        byte[] body = Encoding.ASCII.GetBytes(text[..tail]);
        Assert.Equal(text[(tail + 1)..], Crc16.Of(body, 0, body.Length).ToString("X4", CultureInfo.InvariantCulture));
        Assert.Equal('<', text[0]);
        string[] fields = text[1..tail].Split(' ');
        Assert.DoesNotContain("", fields);
        return new BoxLine(timeUs, Int(fields[0]), Int(fields[1]), fields[2], fields[3..]);
    }

    public long this[int field] => long.Parse(Fields[field], NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);

    public override string ToString() => $"{TimeUs} <{Number} {Request} {Word} {string.Join(' ', Fields)}";

    private static int Int(string text) => int.Parse(text, NumberStyles.None, CultureInfo.InvariantCulture);
}
