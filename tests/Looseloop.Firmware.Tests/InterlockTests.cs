using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

/// <summary>The look before driving, PROTOCOL.md section 3.</summary>
public class InterlockTests
{
    private const string Sweep = "sweep 1000 4 0 0 0 0";
    private const string Ring = "ring 9 267 256 1000 0 0 4 1";
    private readonly TestHost _host = new();

    [Theory]
    [InlineData(Sweep)]
    [InlineData(Ring)]
    public void The_first_look_is_long_and_the_next_ones_are_short(string request)
    {
        _host.PlanRun(2);
        Assert.InRange(LookMs(request), 1000, 1005);
        Assert.InRange(LookMs(request), 6, 8);
        Assert.InRange(LookMs(request), 6, 8);
    }

    [Fact]
    public void A_long_look_is_due_after_identify_and_after_ten_seconds_without_driving()
    {
        _host.PlanRun(2);
        LookMs(Sweep);
        _host.Ok("identify");
        Assert.InRange(LookMs(Sweep), 1000, 1005);
        _host.RunFor(9000);
        Assert.InRange(LookMs(Sweep), 6, 8);
        _host.RunFor(10100);
        Assert.InRange(LookMs(Sweep), 1000, 1005);
        Assert.InRange(LookMs(Sweep), 6, 8);
    }

    [Fact]
    public void A_long_dark_of_the_detector_counts_as_the_long_look()
    {
        _host.PlanRun(2);
        _host.Ok("identify");
        _host.Ok("dark 999 0 0");
        Assert.InRange(LookMs(Sweep), 1000, 1005);
        _host.Ok("identify");
        _host.Ok("dark 1000 0 0");
        Assert.InRange(LookMs(Sweep), 6, 8);
        _host.Board.Inputs.Add(Channel.Direct);
        _host.Ok("identify");
        _host.Ok("dark 1000 0 1");
        Assert.InRange(LookMs(Sweep), 1000, 1005);
    }

    [Fact]
    public void A_long_dark_with_a_field_in_it_does_not_count()
    {
        _host.PlanRun(2);
        _host.Board.Level = (board, _) => board.Reads == 4000 ? 900 : 400;
        _host.Ok("dark 1000 0 0");
        Assert.True(_host.Board.Reads > 4000);
        Assert.InRange(LookMs(Sweep), 1000, 1005);
    }

    [Theory]
    [InlineData(Sweep)]
    [InlineData(Ring)]
    public void A_field_is_refused_and_the_look_after_it_is_long_again(string request)
    {
        _host.PlanRun(2);
        LookMs(request);
        int starts = _host.Board.Starts;
        _host.Board.Level = (board, _) => board.IsDriving ? 2000 : 585; // one count above 400 + 184
        List<BoxLine> lines = _host.Ask(request);
        Assert.Equal(["dark", "fault", "done"], lines.Where(line => line.Word != "alive").Select(line => line.Word));
        Assert.Equal(FaultCode.FieldPresent, lines[^2][0]);
        Assert.Equal([0, Ending.Faulted, FaultCode.FieldPresent], Enumerable.Range(0, 3).Select(field => lines[^1][field]));
        Assert.Equal(starts, _host.Board.Starts);
        _host.Board.Level = (_, _) => 584;
        Assert.InRange(LookMs(request), 1000, 1005);
    }

    [Fact]
    public void One_sample_of_a_coil_that_is_silent_most_of_the_time_is_enough()
    {
        // Bursts of 0.5 ms, twice a second, that begin 0.3 s from now.
        _host.PlanRun(2);
        long firstUs = _host.Board.TimeUs + 300000;
        _host.Board.Level = (board, _) => board.TimeUs > firstUs && (board.TimeUs - firstUs) % 500000 < 500 ? 3000 : 400;
        List<BoxLine> lines = _host.Ask(Sweep);
        Assert.Equal(FaultCode.FieldPresent, lines[^1][2]);
        Assert.Equal(0, _host.Board.Starts);
    }

    [Fact]
    public void A_pickup_that_reads_nothing_is_refused()
    {
        _host.PlanRun(2);
        _host.Board.Level = (_, _) => 0;
        List<BoxLine> lines = _host.Ask(Sweep);
        Assert.Equal((FaultCode.PickupBelowRange, FaultCode.PickupBelowRange), (lines[^2][0], lines[^1][2]));
        Assert.Equal(0, _host.Board.Starts);
    }

    [Fact]
    public void No_limits_hide_a_saturated_converter()
    {
        _host.PlanRun(2);
        _host.Ok("limits 8000 1000000 1500 4095");
        _host.Board.Level = (_, _) => 4094;
        LookMs(Sweep);
        _host.Board.Level = (_, _) => 4095;
        Assert.Equal(FaultCode.FieldPresent, _host.Ask(Sweep)[^1][2]);
    }

    [Fact]
    public void The_own_ring_is_waited_for_and_not_taken_for_a_field()
    {
        _host.Board.Level = (board, _) =>
            board.IsDriving ? 3000 : 400 + (int)(2600 * Math.Exp(-(board.TimeUs - board.StoppedUs) / 20000.0));
        _host.PlanRun(2);
        LookMs(Sweep);
        long stoppedUs = _host.Board.StoppedUs;
        List<BoxLine> lines = _host.Ask(Sweep);
        BoxLine look = lines.Single(line => line.Word == "dark");
        Assert.Equal(Ending.Complete, lines[^1][1]);

        // 2600 counts fall to 184 in 20 ms * ln(2600 / 184) = 53 ms.
        Assert.InRange(look[6] - stoppedUs, 52000, 55000);
        Assert.InRange(look[5], 500, 584);
    }

    [Fact]
    public void What_does_not_die_in_200_ms_is_a_field()
    {
        _host.PlanRun(2);
        LookMs(Sweep);
        _host.Board.Level = (board, _) => board.IsDriving ? 3000 : 2000;
        long fromUs = _host.Board.TimeUs;
        List<BoxLine> lines = _host.Ask(Sweep);
        Assert.Equal(FaultCode.FieldPresent, lines[^1][2]);
        Assert.InRange(lines.Single(line => line.Word == "dark")[6] - fromUs, 200000, 210000);
    }

    [Fact]
    public void A_box_without_a_detector_never_drives()
    {
        _host.Board.Inputs.Clear();
        _host.Board.Inputs.Add(Channel.Direct);
        _host.PlanRun(2);
        Assert.Equal(FaultCode.NoSuchInput, _host.Fault("sweep 1000 4 0 0 0 1"));
        Assert.Equal(FaultCode.NoSuchInput, _host.Fault(Ring));
    }

    private double LookMs(string request)
    {
        BoxLine look = Assert.Single(_host.Ask(request), line => line.Word == "dark");
        return (look[7] - look[6]) / 1000.0;
    }
}
