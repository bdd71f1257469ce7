using System.Globalization;
using System.Text;
using Looseloop.Protocol;

namespace Looseloop.Protocol.Tests;

/// <summary>The host's reader and writer against shared-protocol/golden.</summary>
public class GoldenLineTests
{
    [Fact]
    public void A_host_accepts_the_good_lines_of_a_box_and_drops_the_others()
    {
        var verdicts = new HashSet<string>();
        foreach (string row in GoldenFile.Rows("box-lines.txt"))
        {
            (string verdict, string line) = GoldenFile.Split(row);
            byte[] bytes = GoldenFile.Bytes(line);
            bool accepted = new BoxLineParser().Parse(bytes, bytes.Length, out _, out _) is not null;
            Assert.True(accepted == (verdict == "ok"), row);
            verdicts.Add(verdict);
        }

        Assert.Equal(["no", "ok"], verdicts.Order());
    }

    [Fact]
    public void A_host_understands_every_line_of_the_conversation()
    {
        var parser = new BoxLineParser();
        int next = 0;
        var kinds = new HashSet<Type>();
        foreach (string line in GoldenFile.Rows("conversation.txt").Where(line => line[0] == '<'))
        {
            byte[] bytes = GoldenFile.Bytes(line);
            BoxMessage? message = parser.Parse(bytes, bytes.Length, out int number, out _);
            Assert.True(message is not null, line);
            Assert.Equal(next++, number);
            kinds.Add(message.GetType());
        }

        Assert.Equal(11, kinds.Count); // every answer of section 6 occurs
    }

    [Fact]
    public void The_writer_makes_the_good_lines_again()
    {
        IEnumerable<string> box = GoldenFile.Rows("box-lines.txt").Select(GoldenFile.Split)
            .Where(row => row.Verdict == "ok" && row.Line[0] == '<' && !row.Line.Contains('\\')).Select(row => row.Line);
        IEnumerable<string> both = box.Concat(GoldenFile.Rows("conversation.txt"));
        foreach (string line in both)
        {
            string[] fields = line[1..].Split(' ')[..^1];
            var writer = new LineWriter(WireLimits.BoxLineBytes);
            int number = int.Parse(fields[0], CultureInfo.InvariantCulture);
            int taken = 1;
            if (line[0] == '<')
            {
                writer.BeginBox(number, int.Parse(fields[1], CultureInfo.InvariantCulture));
                taken = 2;
            }
            else
            {
                writer.BeginHost(number);
            }

            foreach (string field in fields.Skip(taken))
            {
                if (long.TryParse(field, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out long value))
                {
                    writer.Number(value);
                }
                else
                {
                    writer.Word(field);
                }
            }

            int length = writer.End();
            Assert.Equal(line + "\n", Encoding.ASCII.GetString(writer.Buffer, 0, length));
        }
    }

    [Fact]
    public void A_line_that_does_not_fit_is_not_sent_short()
    {
        var writer = new LineWriter(30);
        writer.BeginHost(1);
        writer.Word("identify");
        writer.Number(1234567890123);
        Assert.Equal(0, writer.End());
    }

    [Fact]
    public void Fields_are_taken_only_if_whole()
    {
        foreach ((string text, bool good) in new[]
        {
            ("0", true), ("-1", true), ("999999999999999999", true), ("", false), ("-", false), ("-0", false), ("01", false),
            ("1000000000000000000", false), ("1.5", false), ("1e3", false), ("+1", false), (" 1", false),
        })
        {
            byte[] bytes = Encoding.ASCII.GetBytes(text);
            Assert.Equal(good, AsciiNumber.TryRead(bytes, 0, bytes.Length, out long value));
            if (good)
            {
                Assert.Equal(long.Parse(text, CultureInfo.InvariantCulture), value);
                Assert.Equal(text.Length, AsciiNumber.Digits(value));
            }
        }
    }
}
