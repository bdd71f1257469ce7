using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

/// <summary>
/// The matrix of faults: whatever the board does, in whatever it is doing, the drive ends off, a reason is given, and the box
/// answers afterwards.
/// </summary>
public class MisbehavingBoardTests
{
    private const string Sweep = "sweep 5000 20 0 0 0 0";
    private const string Packed = "sweep 5000 20 0 0 12 0";
    private const string Ring = "ring 9 263 256 30000 0 0 20 20";

    public static TheoryData<string> Work => [Sweep, Packed, Ring];

    [Theory]
    [InlineData(Sweep, 3)]
    [InlineData(Sweep, 8000)]
    [InlineData(Packed, 8000)]
    [InlineData(Ring, 7800)]
    [InlineData("dark 5000 0 0", 2000)]
    public void The_converter_throws(string request, int atRead)
    {
        TestHost host = Prepared();
        int from = host.Board.Reads;
        host.Board.BeforeRead = board => Throw(board.Reads - from == atRead);
        List<BoxLine> lines = Finish(host, request);
        EndedWith(lines, request, FaultCode.PickupFailed);
        Recovered(host);
    }

    [Theory]
    [InlineData(4096)]
    [InlineData(-1)]
    [InlineData(int.MaxValue)]
    [InlineData(int.MinValue)]
    public void The_converter_gives_what_no_converter_gives(int level)
    {
        TestHost host = Prepared();
        host.Board.Level = (board, _) => board.IsDriving && board.Settings.Count > 3 ? level : 400;
        List<BoxLine> lines = Finish(host, Sweep);
        EndedWith(lines, Sweep, FaultCode.PickupFailed);
        Assert.Equal(lines.Count(line => line.Word == "point"), lines[^1][0]);
        Recovered(host);
    }

    [Theory]
    [InlineData(Sweep, 1)]
    [InlineData(Sweep, 4)]
    [InlineData(Packed, 4)]
    [InlineData(Ring, 1)]
    [InlineData(Ring, 3)]
    public void The_timer_refuses_a_setting(string request, int atSet)
    {
        TestHost host = Prepared();
        int sets = 0;
        host.Board.BeforeSet = _ => Throw(++sets == atSet);
        List<BoxLine> lines = Finish(host, request);
        EndedWith(lines, request, FaultCode.DriveFailed);
        Assert.Equal(atSet - 1, lines[^1][0]); // what was measured before it is not lost
        Recovered(host);
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void The_timer_throws_at_the_start_and_may_run(string request)
    {
        TestHost host = Prepared();
        host.Board.BeforeStart = board =>
        {
            host.Board.BeforeStart = null;
            board.Start(); // it runs, and the call fails all the same
            throw new InvalidOperationException();
        };
        EndedWith(Finish(host, request), request, FaultCode.DriveFailed);
        Recovered(host);
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void The_timer_does_not_stop_at_first(string request)
    {
        TestHost host = Prepared();
        int stops = 0;
        host.Board.BeforeStop = board => Throw(board.IsDriving && ++stops <= 25);
        EndedWith(Finish(host, request), request, FaultCode.DriveFailed);
        while (stops <= 25)
        {
            // It is tried again at every step, and nothing may start meanwhile.
            Assert.Equal(FaultCode.DriveFailed, host.Fault("sweep 0 1 0 0 0 0"));
        }

        Recovered(host);
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void The_line_throws_while_sending(string request)
    {
        TestHost host = Prepared();
        int sends = 0;
        host.Board.BeforeSend = board => Throw(board.IsDriving && ++sends == 2);
        List<BoxLine> lines = Finish(host, request);
        EndedWith(lines, request, FaultCode.Internal);
        Recovered(host);
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void The_line_throws_whenever_something_is_sent(string request)
    {
        TestHost host = Prepared();
        host.Type(request);
        host.RunFor(1100);
        host.Board.BeforeSend = _ => throw new InvalidOperationException();
        host.RunFor(500);
        Assert.False(host.Board.IsDriving);
        host.Board.BeforeSend = null;
        host.Take();
        Recovered(host); // the reason could not be said; the silence and the next answer say it
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void The_line_throws_while_receiving(string request)
    {
        TestHost host = Prepared();
        int sent = 0;
        host.Board.BeforeReceive = board => Throw(board.IsDriving && ++sent == 5);
        List<BoxLine> lines = Finish(host, request);
        EndedWith(lines, request, FaultCode.Internal);
        Recovered(host);
    }

    [Fact]
    public void A_receiver_that_always_throws_is_spoken_of_once_a_second()
    {
        TestHost host = Prepared();
        host.Board.BeforeReceive = _ => throw new InvalidOperationException();
        host.RunFor(5000);
        Assert.InRange(host.Take().Count(line => line.Word == "fault" && line[0] == FaultCode.Internal), 4, 6);
        host.Board.BeforeReceive = null;
        Recovered(host);
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void The_receive_ring_overflows_and_is_flushed(string request)
    {
        TestHost host = Prepared();
        host.Type(request);
        host.RunFor(1100);
        host.Board.ByteUs = 1; // a burst faster than the box can look
        host.TypeRaw(new string('z', 3000));
        host.RunFor(50);
        host.Board.ByteUs = 1e6 / 11520;
        host.TypeRaw("\n");
        int halt = host.Type("halt");
        host.RunFor(200);
        List<BoxLine> lines = host.Take();
        Assert.False(host.Board.IsDriving);
        Assert.Equal(("halted", halt), (lines[^1].Word, lines[^1].Request));
        Assert.Contains(lines, line => line.Word == "fault" && line[0] is FaultCode.LineTooLong or FaultCode.UnreadableLine);
        Recovered(host);
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void Garbage_keeps_coming(string request)
    {
        TestHost host = Prepared();
        host.Type(request);
        host.RunFor(1100);
        var random = new Random(3);
        for (int i = 0; i < 40; i++)
        {
            host.TypeRaw(string.Concat(Enumerable.Range(0, 600).Select(_ => (char)random.Next(1, 256))));
            host.RunFor(60);
        }

        // Silence of the host, as far as the box can tell, unless the work was over before.
        Assert.False(host.Board.IsDriving);
        List<BoxLine> lines = host.Take();
        BoxLine done = Assert.Single(lines, line => line.Word == "done");
        Assert.Contains(done[2], new long[] { FaultCode.None, FaultCode.HostSilent });
        host.TypeRaw("\n");
        host.RunFor(3000);
        host.Take();
        Recovered(host);
    }

    [Fact]
    public void Half_lines_are_told_from_whole_ones()
    {
        TestHost host = Prepared();
        string keep = TestHost.WithChecksum(">9 limits");
        for (int cut = 0; cut < keep.Length; cut++)
        {
            host.TypeRaw(keep[..cut]);
            host.RunFor(30);
            host.TypeRaw("\n" + keep[cut..] + "\n");
            host.RunFor(30);
            Assert.All(host.Take(), line => Assert.True(
                (line.Word == "fault" && line[0] == FaultCode.UnreadableLine) || (cut == 0 && line.Word == "limits"), line.ToString()));
        }

        // The end of one line lost, the next one whole: only the next one is done.
        host.TypeRaw(keep[..5] + keep + "\n");
        host.RunFor(30);
        Assert.Equal("limits", Assert.Single(host.Take()).Word);
    }

    [Theory]
    [MemberData(nameof(Work))]
    public void The_board_resets_in_mid_work(string request)
    {
        TestHost host = Prepared();
        host.Type(request);
        host.RunFor(1100);
        Assert.True(host.Board.IsDriving || request == Ring);
        host.Reset();
        Assert.False(host.Board.IsDriving);
        host.RunFor(1000);
        Assert.Equal(0, host.Board.Sent.Count(sent => sent.Text.Contains("done", StringComparison.Ordinal)));
        host.Take();
        Assert.Equal(FaultCode.PlanEmpty, host.Fault("sweep 0 1 0 0 0 0"));
    }

    [Theory]
    [InlineData(0, FaultCode.PickupBelowRange)]
    [InlineData(4095, FaultCode.FieldPresent)]
    [InlineData(1000, FaultCode.FieldPresent)]
    public void The_pickup_is_stuck(int level, int code)
    {
        foreach (string request in new[] { Sweep, Packed, Ring })
        {
            TestHost host = Prepared();
            host.Board.Level = (_, _) => level;
            EndedWith(Finish(host, request), request, code);
            Assert.Equal(0, host.Board.Starts);
        }
    }

    [Theory]
    [InlineData(Sweep, -3_600_000_000)]
    [InlineData(Sweep, -50_000)]
    [InlineData(Sweep, 3_600_000_000)]
    [InlineData(Ring, -3_600_000_000)]
    [InlineData(Ring, 3_600_000_000)]
    public void The_clock_jumps(string request, long byUs)
    {
        TestHost host = Prepared();
        int number = host.Type(request);
        host.RunFor(1100);
        long jumpUs = host.Board.TimeUs;
        host.Board.ClockErrorUs = byUs;
        host.RunFor(2500);
        Assert.False(host.Board.IsDriving);
        Assert.InRange(host.Board.StoppedUs - jumpUs, -100000, 2000000);
        BoxLine done = Assert.Single(host.Take(), line => line.Word == "done");
        Assert.Equal(number, done.Request);
        Assert.Contains(done[2], new long[] { FaultCode.None, FaultCode.HostSilent });
        Assert.Equal(byUs > 0 ? FaultCode.HostSilent : done[2], done[2]);
        Recovered(host);
    }

    [Fact]
    public void The_clock_that_fell_back_does_not_hold_up_the_host_watch()
    {
        TestHost host = Prepared();
        host.Type("sweep 100000 20 0 2 0 0");
        host.RunFor(1100);
        for (int i = 1; i <= 20; i++)
        {
            host.Board.ClockErrorUs = -i * 1_000_000; // back a second, every tenth of a second
            host.RunFor(100);
        }

        Assert.False(host.Board.IsDriving);
        Assert.Equal(FaultCode.HostSilent, host.Take()[^1][2]);
        long before = 0;
        foreach (string field in host.Board.Sent.Where(sent => sent.Text.Contains("alive", StringComparison.Ordinal)).Select(sent => sent.Text.Split(' ')[3]))
        {
            long now = long.Parse(field, System.Globalization.CultureInfo.InvariantCulture);
            Assert.True(now >= before); // board time never steps back on the wire
            before = now;
        }
    }

    private static TestHost Prepared()
    {
        var host = new TestHost();
        host.Board.Level = (board, _) => board.IsDriving ? 1500 : 400;
        host.Ok("identify");
        host.PlanRun(40, 320);
        return host;
    }

    private static List<BoxLine> Finish(TestHost host, string request)
    {
        int number = host.Type(request);
        host.RunFor(request.StartsWith("dark", StringComparison.Ordinal) ? 6000 : 2800);
        Assert.False(host.Board.IsDriving && !host.Loop.Step() && host.Board.IsDriving, "the drive is on");
        return host.Take().Where(line => line.Request == number).ToList();
    }

    private static void EndedWith(List<BoxLine> lines, string request, int code)
    {
        if (request.StartsWith("dark", StringComparison.Ordinal))
        {
            Assert.Equal(("fault", (long)code), (lines[^1].Word, lines[^1][0]));
            return;
        }

        Assert.Equal(("fault", (long)code), (lines[^2].Word, lines[^2][0]));
        Assert.Equal(("done", (long)Ending.Faulted, (long)code), (lines[^1].Word, lines[^1][1], lines[^1][2]));
        Assert.Single(lines, line => line.Word == "done");
    }

    private static void Recovered(TestHost host)
    {
        host.Board.BeforeRead = null;
        host.Board.BeforeReceive = null;
        host.Board.Level = (board, _) => board.IsDriving ? 1500 : 400;
        Assert.False(host.Board.IsDriving);
        Assert.Equal("box", host.Ok("identify").Word);
        host.PlanRun(2);
        List<BoxLine> lines = host.Ask("sweep 1000 4 0 0 0 0");
        Assert.Equal([2, Ending.Complete, 0], Enumerable.Range(0, 3).Select(field => lines[^1][field]));
        Assert.False(host.Board.IsDriving);
    }

    private static void Throw(bool now)
    {
        if (now)
        {
            throw new InvalidOperationException("as the test wants");
        }
    }
}
