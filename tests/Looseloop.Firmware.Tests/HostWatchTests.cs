using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

/// <summary>The drive is off, and said to be, within two seconds of the last valid line, PROTOCOL.md section 2.</summary>
public class HostWatchTests
{
    private readonly TestHost _host = new();

    [Theory]
    [InlineData("sweep 100000 64 0 0 0 0")]
    [InlineData("sweep 2000000 1 0 0 0 0")]
    [InlineData("sweep 0 16384 0 0 0 0")]
    [InlineData("sweep 0 4 1000000 0 0 0")]
    [InlineData("sweep 100 2 0 0 12 0")]
    [InlineData("ring 9 267 256 2000000 0 0 64 9")]
    [InlineData("ring 9 267 256 1000 1000000 0 64 9")]
    public void A_silent_host_stops_the_drive_in_time(string request)
    {
        _host.PlanRun(200, 500);
        _host.Ok("dark 1000 0 0"); // so that the look is short and the drive begins at once
        if (request.StartsWith("sweep 100 ", StringComparison.Ordinal))
        {
            _host.Board.ReadCostUs = 5000; // a sweep that would take long enough
        }

        int number = _host.Type(request);
        _host.RunFor(20 + 60);
        long heardUs = _host.Board.TimeUs;
        _host.TypeRaw(TestHost.WithChecksum($">{number} keep") + "\n");
        _host.RunFor(3000);
        Assert.False(_host.Board.IsDriving);
        Assert.InRange(_host.Board.StoppedUs - heardUs, -80000, 2000000);
        List<BoxLine> lines = _host.Take();
        Assert.Equal(["fault", "done"], lines.TakeLast(2).Select(line => line.Word));
        Assert.Equal((number, (long)FaultCode.HostSilent), (lines[^2].Request, lines[^2][0]));
        Assert.InRange(lines[^2].TimeUs - heardUs, 1500000, 2000000);
        Assert.Equal([Ending.Faulted, FaultCode.HostSilent], [lines[^1][1], lines[^1][2]]);
        Assert.Equal("halted", _host.Ok("halt").Word);
    }

    [Fact]
    public void The_look_is_watched_too()
    {
        _host.PlanRun(4);
        _host.Type("sweep 500000 1 0 0 0 0");
        _host.RunFor(4000);
        Assert.Equal(FaultCode.HostSilent, _host.Take()[^1][2]);
        Assert.Equal(1, _host.Board.Starts);
    }

    [Fact]
    public void Lines_with_a_wrong_checksum_keep_nothing_awake()
    {
        _host.PlanRun(200, 500);
        _host.Type("sweep 100000 8 0 0 0 0");
        for (int i = 0; i < 30; i++)
        {
            _host.RunFor(100);
            _host.TypeRaw(">9 keep 0000\n");
        }

        Assert.False(_host.Board.IsDriving);
        Assert.Contains(_host.Take(), line => line.Word == "fault" && line[0] == FaultCode.HostSilent);
    }

    [Theory]
    [InlineData("keep")]
    [InlineData("no-such-verb")]
    [InlineData("identify")]
    public void Any_line_with_a_right_checksum_keeps_it_awake(string request)
    {
        _host.PlanRun(40, 500);
        _host.Type("sweep 100000 8 0 0 0 0");
        for (int i = 0; i < 7; i++)
        {
            _host.RunFor(1000);
            _host.Type(request);
        }

        Assert.Contains(_host.Take(), line => line.Word == "done" && line[1] == Ending.Complete && line[0] == 40);
    }

    [Fact]
    public void A_dark_needs_no_host()
    {
        Assert.Equal("dark", _host.Ask("dark 5000 0 0", keep: false)[^1].Word);
    }
}
