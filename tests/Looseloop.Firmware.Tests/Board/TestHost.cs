using System.Globalization;
using System.Text;
using Looseloop.Firmware;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests.Board;

/// <summary>A host for tests: types requests at a <see cref="TestBoard"/>, steps its box and reads what it says.</summary>
internal sealed class TestHost
{
    private int _read;

    public TestHost(TestBoard? board = null, BoxProfile? profile = null)
    {
        Board = board ?? new TestBoard();
        Profile = profile ?? new BoxProfile("test-board", 77, FrequencyGrid.Esp32DutyBits);
        Loop = NewLoop();
    }

    public TestBoard Board { get; }

    public BoxProfile Profile { get; }

    public BoxLoop Loop { get; private set; }

    public int Request { get; private set; }

    /// <summary>How long the board's main loop sleeps when there is nothing to do, µs.</summary>
    public long IdleUs { get; set; } = 1000;

    public static string WithChecksum(string body)
    {
        byte[] bytes = Encoding.ASCII.GetBytes(body);
        return body + " " + Crc16.Of(bytes, 0, bytes.Length).ToString("X4", CultureInfo.InvariantCulture);
    }

    /// <summary>The board restarts, its wire and clock going on.</summary>
    public void Reset()
    {
        Loop = NewLoop();
    }

    /// <summary>Puts a request on the wire under the next number.</summary>
    public int Type(string request)
    {
        Request++;
        TypeRaw(WithChecksum($">{Request} {request}") + "\n");
        return Request;
    }

    public void TypeRaw(string text)
    {
        Board.Type(Encoding.Latin1.GetBytes(text));
    }

    /// <summary>Steps the box for a time.</summary>
    public void RunFor(double milliseconds)
    {
        long endUs = Board.TimeUs + (long)(milliseconds * 1000);
        while (Board.TimeUs < endUs)
        {
            StepOnce();
        }
    }

    public void StepOnce()
    {
        if (!Loop.Step())
        {
            Board.TimeUs += IdleUs;
        }
    }

    /// <summary>Types a request and returns what the box says until a line that is not `alive`, or until `done` after a sweep.</summary>
    public List<BoxLine> Ask(string request, double timeoutMs = 30000, bool keep = true)
    {
        bool untilDone = request.StartsWith("sweep", StringComparison.Ordinal) || request.StartsWith("ring", StringComparison.Ordinal);
        int number = Type(request);
        var lines = new List<BoxLine>();
        long endUs = Board.TimeUs + (long)(timeoutMs * 1000);
        long keepUs = Board.TimeUs + 500000;
        while (Board.TimeUs < endUs)
        {
            StepOnce();
            if (keep && Board.TimeUs > keepUs)
            {
                TypeRaw(WithChecksum(">9 keep") + "\n");
                keepUs = Board.TimeUs + 500000;
            }

            foreach (BoxLine line in Take())
            {
                lines.Add(line);
                bool last = untilDone
                    ? line.Word == "done" || (line.Word == "fault" && line.Fields[0] is not ("7" or "8" or "9" or "10" or "13" or "15"))
                    : line.Word != "alive";
                if (last && line.Request == number)
                {
                    return lines;
                }
            }
        }

        Assert.Fail("no end of the answer to: " + request + "\n" + string.Join('\n', lines));
        return lines;
    }

    /// <summary>The last line of an answer, which is not a fault.</summary>
    public BoxLine Ok(string request)
    {
        BoxLine last = Ask(request)[^1];
        Assert.NotEqual("fault", last.Word);
        return last;
    }

    /// <summary>The code of the fault that answers a request.</summary>
    public int Fault(string request)
    {
        BoxLine last = Ask(request)[^1];
        Assert.Equal("fault", last.Word);
        Assert.Equal(FaultCode.Text((int)last[0]), last.Fields[1]);
        return (int)last[0];
    }

    /// <summary>What the box has said since the last call.</summary>
    public List<BoxLine> Take()
    {
        var lines = new List<BoxLine>();
        for (; _read < Board.Sent.Count; _read++)
        {
            BoxLine line = BoxLine.Parse(Board.Sent[_read].TimeUs, Board.Sent[_read].Text);
            lines.Add(line);
        }

        return lines;
    }

    /// <summary>A survey's worth of settings around 150 kHz: 9 bits, duty one half.</summary>
    public void PlanRun(int count = 20, int divider = 287, int stride = -1)
    {
        Ok("plan");
        Ok(string.Create(CultureInfo.InvariantCulture, $"run 9 {divider} {stride} {count} 256"));
    }

    private BoxLoop NewLoop() => new(Profile, Board, Board, Board, Board);
}
