using System.Globalization;
using System.Text;
using CsCheck;
using Looseloop.Protocol;

namespace Looseloop.Protocol.Tests;

public class LineTests
{
    // The runtime's own formatting is the second opinion.
    [Fact]
    public void Numbers_are_written_and_read_as_the_runtime_does()
    {
        Gen.Long[-999_999_999_999_999_999, 999_999_999_999_999_999].Sample(value =>
        {
            string expected = value.ToString(CultureInfo.InvariantCulture);
            int digits = AsciiNumber.Digits(value);
            byte[] buffer = new byte[24];
            AsciiNumber.Write(value, buffer, 2, digits);
            Assert.Equal(expected, Encoding.ASCII.GetString(buffer, 2, digits));
            Assert.True(AsciiNumber.TryRead(buffer, 2, digits, out long back));
            Assert.Equal(value, back);
        });
    }

    [Theory]
    [InlineData("")]
    [InlineData("-")]
    [InlineData("01")]
    [InlineData("-0")]
    [InlineData("1a")]
    [InlineData("+1")]
    [InlineData("1.0")]
    [InlineData("1234567890123456789")]
    public void What_is_not_a_plain_number_is_refused(string text)
    {
        byte[] bytes = Encoding.ASCII.GetBytes(text);
        Assert.False(AsciiNumber.TryRead(bytes, 0, bytes.Length, out _));
    }

    [Fact]
    public void What_is_written_is_read_behind_any_noise()
    {
        Gen<byte[]> noise = Gen.Byte.Where(b => b != (byte)'\n').Array[0, 20];
        Gen.Select(noise, Gen.Int[0, 65535], Gen.Long[0, 999_999_999_999], Gen.Int[1, 30]).Sample((before, number, value, count) =>
        {
            var writer = new LineWriter(WireLimits.BoxLineBytes);
            writer.BeginBox(number, 7);
            writer.Word(Answer.Decay);
            int fitted = 0;
            while (fitted < count && writer.Room > 14)
            {
                writer.Number(value);
                fitted++;
            }

            int length = writer.End();
            Assert.True(length is > 0 and <= WireLimits.BoxLineBytes);
            byte[] line = [.. before, .. writer.Buffer.AsSpan(0, length - 1)];
            var reader = new LineReader();
            Assert.True(reader.Open(line, line.Length, LineWriter.BoxMark));
            Assert.True(reader.TryNumber(0, 65535, out long readNumber) && readNumber == number);
            Assert.True(reader.TryNumber(7, 7, out _));
            Assert.True(reader.TryWord() && reader.WordIs(Answer.Decay) && !reader.WordIs("deca") && !reader.WordIs("decays"));
            for (int i = 0; i < fitted; i++)
            {
                Assert.True(reader.TryNumber(0, long.MaxValue, out long back) && back == value);
            }

            Assert.False(reader.More);
        });
    }

    [Fact]
    public void A_line_that_would_not_fit_is_not_sent_short()
    {
        var writer = new LineWriter(20);
        writer.BeginHost(1);
        writer.Word("identify");
        writer.Number(123456789);
        Assert.Equal(0, writer.End());
    }

    [Fact]
    public void The_collector_parts_lines_and_marks_what_was_too_long()
    {
        var collector = new LineCollector(8);
        var lines = new List<(string Text, bool TooLong)>();
        foreach (byte b in Encoding.ASCII.GetBytes("abc\n\n1234567890\nok\nhalf"))
        {
            if (collector.Add(b))
            {
                lines.Add((Encoding.ASCII.GetString(collector.Line, 0, collector.Count), collector.WasTooLong));
            }
        }

        Assert.Equal([("abc", false), ("12345678", true), ("ok", false)], lines);
        collector.Clear();
        Assert.True(!collector.Add((byte)'x') && collector.Add((byte)'\n') && collector.Count == 1);
    }

    [Theory]
    [InlineData("<1 0 alive 5", true)]
    [InlineData("<1 0 alive", false)]
    [InlineData("<1 0 alive 5 6", false)]
    [InlineData("<1 0 alive -5", false)]
    [InlineData("<1 0 arrive 5", false)]
    [InlineData("<70000 0 alive 5", false)]
    [InlineData("<1 2 pack 0 4 100 200 10 1 3 20 4 6", true)]
    [InlineData("<1 2 pack 0 4 100 200 10 1 3 20 4", false)]
    [InlineData("<1  2 alive 5", false)]
    public void A_box_line_parses_to_the_last_field_or_not_at_all(string body, bool good)
    {
        byte[] bytes = Encoding.ASCII.GetBytes(body);
        byte[] line = Encoding.ASCII.GetBytes($"{body} {Crc16.Of(bytes, 0, bytes.Length):X4}");
        Assert.Equal(good, new BoxLineParser().Parse(line, line.Length, out _, out _) is not null);
    }
}
