using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

/// <summary>
/// A second pair of eyes: the box on a board with the runtime's habits switched on. The loop sleeps 10 ms whenever it is idle, a
/// receive hands over a few bytes at a time, the ring holds 256 bytes and is flushed when it overflows, a change of frequency
/// cuts a period of the drive, and the converter is slow.
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

    private static int Curve(double hz)
    {
        double x = hz / 152300;
        return 400 + (int)(2400 / Math.Sqrt(1 + (180 * 180 * (x - (1 / x)) * (x - (1 / x)))));
    }
}
