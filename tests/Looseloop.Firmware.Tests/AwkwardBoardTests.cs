using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

/// <summary>
/// A second pair of eyes: the box on a board with the runtime's habits switched on. The loop sleeps 10 ms whenever it is idle, a
/// receive hands over a few bytes at a time, the ring holds 256 bytes and is flushed when it overflows, a line is written in
/// pieces of 128 bytes each of which returns a tick of the scheduler late, a change of frequency cuts a period of the drive, and
/// the converter is slow. That a division by zero throws, of doubles too, is seen to by <see cref="DivisionTests"/>; what reads
/// back of a frequency is the request, so that only the timer's own arithmetic says what is driven.
/// </summary>
public class AwkwardBoardTests
{
    private readonly TestHost _host = new() { IdleUs = 10000 };
    private long _changedUs;

    public AwkwardBoardTests()
    {
        _host.Board.MostPerReceive = 7;
        _host.Board.ReadCostUs = 450;
        _host.Board.SetCostUs = 3000;
        _host.Board.BytesPerPiece = 128;
        _host.Board.PieceLateUs = 10000;
        _host.Board.BeforeSet = board => _changedUs = board.TimeUs + board.SetCostUs;
        _host.Board.Level = (board, _) => !board.IsDriving || board.TimeUs - _changedUs < 1e6 / board.DriveHz ? 400 : Curve(board.DriveHz);
    }

    [Fact]
    public void The_whole_job_is_done_all_the_same()
    {
        Assert.Equal("box", _host.Ok("identify").Word);
        _host.PlanRun(60, 330);
        List<BoxLine> lines = _host.Ask("sweep 1000 8 0 2 0 0");
        List<BoxLine> points = lines.Where(line => line.Word == "point").ToList();
        Assert.Equal(120, points.Count);
        for (int i = 0; i < 60; i++)
        {
            int expected = Curve(FrequencyGrid.RequestHz(9, 330 - i));
            Assert.Equal((expected, expected), (points[i][7], points[i][8]));
            Assert.Equal((expected, expected), (points[119 - i][7], points[119 - i][8]));
        }

        for (int i = 1; i < lines.Count; i++)
        {
            Assert.InRange(lines[i].TimeUs - lines[i - 1].TimeUs, 0, 50000);
        }
    }

    [Fact]
    public void Two_of_the_longest_requests_at_once_do_not_overflow_the_ring()
    {
        string settings = string.Join(' ', Enumerable.Repeat("13 300 4096", 8));
        Assert.True(TestHost.WithChecksum(">65535 list " + settings).Length + 1 <= WireLimits.HostLineBytes);
        _host.Board.ByteUs = 1; // all of it between two looks
        _host.Type("list " + settings);
        _host.Type("list " + settings);
        _host.RunFor(3000);
        Assert.Equal([8, 16], _host.Take().Select(line => line[0]));
    }

    [Fact]
    public void A_line_at_full_speed_is_never_lost_in_mid_sweep()
    {
        _host.Board.MostPerReceive = int.MaxValue;
        _host.PlanRun(200, 500);
        int sweep = _host.Type("sweep 5000 16 0 0 12 0");
        _host.RunFor(1500);
        string line = TestHost.WithChecksum(">9 limits 8000 1000000 400 184");
        int sent = 0;
        for (; sent < 60; sent++)
        {
            _host.TypeRaw(line + "\n");
            _host.RunFor(30);
        }

        _host.Type("halt");
        _host.RunFor(300);
        List<BoxLine> lines = _host.Take();
        Assert.Equal(sent, lines.Count(said => said.Word == "fault" && said[0] == FaultCode.Busy));
        Assert.DoesNotContain(lines, said => said.Word == "fault" && said[0] != FaultCode.Busy);
        Assert.Contains(lines, said => said.Word == "done" && said.Request == sweep);
    }

    [Theory]
    [InlineData(FrequencyGrid.Esp32DutyBits)]
    [InlineData(13)]
    public void What_the_timer_makes_of_each_request_is_the_setting_that_is_reported(int mostBits)
    {
        var host = new TestHost(profile: new BoxProfile("test-board", 77, mostBits));
        foreach ((int bits, int first, int count) in new[] { (11, 325, 68), (10, 512, 256), (9, 512, 256), (8, 512, 256), (7, 512, 247) })
        {
            foreach (int share in new[] { 2, 3, 5, 16 })
            {
                host.Ok("plan");
                host.Ok(string.Create(System.Globalization.CultureInfo.InvariantCulture, $"run {bits} {first} -1 {count} {(1 << bits) / share}"));
                host.Board.Settings.Clear();
                BoxLine[] points = [.. host.Ask("sweep 0 1 0 0 0 0").Where(line => line.Word == "point")];
                Assert.Equal(count, points.Length);
                Assert.Equal(
                    host.Board.Settings.Select(asked => RuntimeTimer.Of(asked.RequestHz, asked.Duty, mostBits)),
                    points.Select(point => new RuntimeTimer((int)point[1], point[2], point[3])));
            }
        }
    }

    [Fact]
    public void Lines_in_late_pieces_leave_no_gap_of_50_ms_on_the_wire()
    {
        // The drive stage's enable lives on these edges (hardware-notes/enable.md). Packs of 12 are the longest lines.
        _host.PlanRun(200, 500);
        _host.Board.PiecesGoneUs.Clear();
        List<BoxLine> lines = _host.Ask("sweep 60000 16 0 0 12 0", 60000);
        Assert.Contains(lines, line => line.Word == "pack" && string.Join(' ', line.Fields).Length > 128);
        long[] gone = [.. _host.Board.PiecesGoneUs];
        long[] gaps = [.. gone.Zip(gone.Skip(1), (a, b) => b - a)];
        Assert.InRange(gaps.Max(), 0, 50000);
    }

    [Fact]
    public void An_overflow_loses_lines_but_never_makes_another_of_two_halves()
    {
        // Each line asks for a duty of its own: an answer that belongs to none of them, or a plan that holds more than what
        // was answered, would come of two halves.
        // More arrives in a tick than the ring holds, and part of a line is taken before the rest is flushed.
        _host.Board.ByteUs = 20;
        _host.Board.MostPerReceive = 100;
        _host.Ok("plan");
        int first = _host.Request + 1;
        for (int i = 0; i < 100; i++)
        {
            _host.Type($"list 9 267 {100 + i} 9 300 {200 + i}");
        }

        int last = _host.Request;
        _host.RunFor(3000);
        Assert.True(_host.Board.Flushes > 0);
        List<BoxLine> lines = _host.Take();
        BoxLine[] planned = [.. lines.Where(line => line.Word == "planned")];
        Assert.All(planned, line => Assert.InRange(line.Request, first, last));
        Assert.True(planned.Length < last - first + 1);
        Assert.Equal(planned.Select((_, i) => 2L * (i + 1)), planned.Select(line => line[0]));
        Assert.All(lines.Except(planned), line => Assert.True(line.Word == "fault" && line[0] is FaultCode.UnreadableLine or FaultCode.LineTooLong));

        // The rest of a torn line may take one more with it; the host repeats what is not answered.
        _host.Type("identify");
        _host.RunFor(200);
        if (!_host.Take().Any(line => line.Word == "box"))
        {
            _host.Type("identify");
            _host.RunFor(200);
            Assert.Contains(_host.Take(), line => line.Word == "box");
        }

        _host.Board.Settings.Clear();
        BoxLine[] points = [.. _host.Ask("sweep 0 1 0 0 0 0").Where(line => line.Word == "point")];
        Assert.Equal(2 * planned.Length, points.Length);
        Assert.Equal(
            planned.SelectMany(line => new long[] { 100 + line.Request - first, 200 + line.Request - first }), points.Select(point => point[3]));
    }

    [Fact]
    public void An_idle_box_that_sleeps_in_ticks_answers_within_two_of_them()
    {
        _host.Board.MostPerReceive = int.MaxValue;
        foreach (string request in new[] { "identify", "limits", "plan", "run 9 300 -1 20 256", "halt" })
        {
            long typed = _host.Board.TimeUs;
            int length = TestHost.WithChecksum($">{_host.Request + 1} {request}").Length + 1;
            _host.Type(request);
            _host.RunFor(60);
            BoxLine answer = Assert.Single(_host.Take());
            double wireUs = (length + answer.ToString().Length + 20) * _host.Board.ByteUs;
            Assert.InRange(answer.TimeUs - typed, 0, wireUs + (2 * _host.IdleUs));
        }
    }

    private static int Curve(double hz)
    {
        double x = hz / 152300;
        return 400 + (int)(2400 / Math.Sqrt(1 + (180 * 180 * (x - (1 / x)) * (x - (1 / x)))));
    }
}
