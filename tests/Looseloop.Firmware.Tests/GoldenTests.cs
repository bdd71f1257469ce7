using System.Globalization;
using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

/// <summary>The box's end of shared-protocol/golden.</summary>
public class GoldenTests
{
    [Fact]
    public void The_box_says_what_the_conversation_has_byte_for_byte()
    {
        TestHost host = GoldenBox();
        host.IdleUs = 0;
        var expected = new List<string>();
        foreach (string line in GoldenFile.Rows("conversation.txt"))
        {
            if (line[0] == '<')
            {
                expected.Add(line);
                continue;
            }

            StepUntilSaid(host, expected.Count);
            Assert.Equal(expected, host.Board.Sent.Select(sent => sent.Text));
            host.TypeRaw(line + "\n");
        }

        StepUntilSaid(host, expected.Count);
        for (int i = 0; i < 1000; i++)
        {
            host.StepOnce(); // and nothing more
        }

        Assert.Equal(expected, host.Board.Sent.Select(sent => sent.Text));
        Assert.Equal(58, expected.Count);
    }

    [Fact]
    public void Each_host_line_has_its_answer()
    {
        int lines = 0;
        foreach (string row in GoldenFile.Rows("host-lines.txt"))
        {
            (string code, string line) = GoldenFile.Split(row);
            TestHost host = GoldenBox();
            host.Ok("run 9 263 -1 3 256");
            host.Board.Type(GoldenFile.Bytes(line));
            host.TypeRaw("\n");
            host.RunFor(2000);
            BoxLine? answer = host.Take().FirstOrDefault(said => said.Word != "alive");
            string got = answer is null ? "-" : answer.Word == "fault" ? answer.Fields[0] : "0";
            Assert.True(code == got, $"{row}: {got}");
            if (answer is not null && code is not ("1" or "11"))
            {
                int mark = line.LastIndexOf('>');
                Assert.Equal(line[(mark + 1)..].Split(' ')[0], answer.Request.ToString(CultureInfo.InvariantCulture));
            }

            lines++;
        }

        Assert.True(lines > 30);
    }

    private static void StepUntilSaid(TestHost host, int lines)
    {
        for (int i = 0; i < 20000 && host.Board.Sent.Count < lines; i++)
        {
            host.StepOnce();
        }
    }

    private static TestHost GoldenBox()
    {
        var board = new TestBoard
        {
            TimeUs = 1000000,
            ReadCostUs = 100,
            SetCostUs = 0,
            StopCostUs = 0,
            ClockCostUs = 0,
            ByteUs = 0,
            Level = Level,
        };
        return new TestHost(board, new BoxProfile("golden", 4711, FrequencyGrid.Esp32DutyBits));
    }

    private static int Level(TestBoard board, int channel)
    {
        int level = !board.IsDriving ? Math.Max(400, 1300 - (100 * board.ReadsSinceStop))
            : board.DriveHz == 152091 ? 2310
            : board.DriveHz == 152672 ? 2204
            : 1105;
        return level + (board.Reads % 3);
    }
}
