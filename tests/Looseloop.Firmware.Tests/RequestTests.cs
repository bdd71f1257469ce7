using Looseloop.Firmware.Tests.Board;

namespace Looseloop.Firmware.Tests;

/// <summary>Each request of PROTOCOL.md section 5, answered, and its bad forms refused.</summary>
public class RequestTests
{
    private readonly TestHost _host = new();

    [Fact]
    public void Identify_tells_what_the_box_is()
    {
        BoxLine box = _host.Ok("identify");
        Assert.Equal("box", box.Word);
        Assert.Equal("1 0 1 0 test-board 77 80000000 19 8000 1000000 320 4096 16384 4095 1", string.Join(' ', box.Fields));
    }

    [Fact]
    public void Inputs_are_summed()
    {
        _host.Board.Inputs.Add(1);
        _host.Board.Inputs.Add(2);
        Assert.Equal(7, _host.Ok("identify")[14]);
    }

    [Fact]
    public void Limits_hold_what_was_set()
    {
        Assert.Equal("8000 1000000 400 184", string.Join(' ', _host.Ok("limits").Fields));
        Assert.Equal("30000 600000 310 90", string.Join(' ', _host.Ok("limits 30000 600000 310 90").Fields));
        Assert.Equal("30000 600000 310 90", string.Join(' ', _host.Ok("limits").Fields));
    }

    [Theory]
    [InlineData("identify 1", 3)]
    [InlineData("limits 8000", 3)]
    [InlineData("limits 7999 600000 400 100", 3)]
    [InlineData("limits 8000 1000001 400 100", 3)]
    [InlineData("limits 50000 40000 400 100", 3)]
    [InlineData("limits 8000 600000 1501 100", 3)]
    [InlineData("limits 8000 600000 400 0", 3)]
    [InlineData("limits 8000 600000 400 100 1", 3)]
    [InlineData("dark 0 0 0", 3)]
    [InlineData("dark 60001 0 0", 3)]
    [InlineData("dark 10 1000001 0", 3)]
    [InlineData("dark 10 0", 3)]
    [InlineData("dark 10 0 1", 14)]
    [InlineData("dark 10 0 3", 14)]
    [InlineData("plan 1", 3)]
    [InlineData("run 9 267 -1 20", 3)]
    [InlineData("run 9 287 -1 20 256 1", 3)]
    [InlineData("run 9 267 -1 0 256", 3)]
    [InlineData("run 09 267 -1 20 256", 3)]
    [InlineData("run 9 267 -1 4097 256", 3)]
    [InlineData("run 9 267 -1 20 0", 3)]
    [InlineData("run 9 267 -1 20 512", 4)]
    [InlineData("run 9 256 1 20 256", 4)] // divider 256 is made with 8 bits
    [InlineData("run 9 267 -20 2 256", 4)]
    [InlineData("run 14 300 1 1 256", 4)] // 4166.7 Hz
    [InlineData("list", 3)]
    [InlineData("list 9 267", 3)]
    [InlineData("list 9 267 256 9 268", 3)]
    [InlineData("list 9 267 256 9 255 256", 4)]
    [InlineData("sweep 0 1 0 0 0 0", 6)]
    [InlineData("sweep 2000001 1 0 0 0 0", 3)]
    [InlineData("sweep 0 0 0 0 0 0", 3)]
    [InlineData("sweep 0 16385 0 0 0 0", 3)]
    [InlineData("sweep 0 1 0 3 0 0", 3)]
    [InlineData("sweep 0 1 0 0 1 0", 3)]
    [InlineData("sweep 0 1 0 0 13 0", 3)]
    [InlineData("sweep 0 1 0 0 0", 3)]
    [InlineData("sweep 0 1 0 0 0 0 0", 3)]
    [InlineData("ring 9 267 256 1000 0 0 65 1", 3)]
    [InlineData("ring 9 267 256 1000 0 0 64 1001", 3)]
    [InlineData("ring 9 267 256 1000 500000 1000 4 502", 3)] // 500000 + 501 * 1000 is more than a second
    [InlineData("ring 9 256 256 1000 0 0 4 1", 4)]
    [InlineData("halt 1", 3)]
    [InlineData("keep 1", 3)]
    [InlineData("survey", 2)]
    [InlineData("Identify", 2)]
    public void A_bad_request_is_refused_with_its_code(string request, int code)
    {
        Assert.Equal(code, _host.Fault(request));
        Assert.Equal(0, _host.Board.Starts);
    }

    [Fact]
    public void A_request_number_out_of_bounds_is_a_fault_that_answers_none()
    {
        foreach (string line in new[] { ">0 identify", ">65536 identify", ">x identify", ">-1 identify" })
        {
            _host.TypeRaw(TestHost.WithChecksum(line) + "\n");
            _host.RunFor(50);
            BoxLine fault = Assert.Single(_host.Take());
            Assert.Equal((0, "fault", 3L), (fault.Request, fault.Word, fault[0]));
        }
    }

    [Fact]
    public void Lines_are_counted_without_a_gap()
    {
        for (int i = 0; i < 5; i++)
        {
            Assert.Equal(i, _host.Ok("halt").Number);
        }
    }

    [Fact]
    public void A_plan_fills_up_and_is_emptied()
    {
        for (int i = 1; i <= 320; i++)
        {
            Assert.Equal(i, _host.Ok("run 9 267 0 1 256")[0]);
        }

        Assert.Equal(5, _host.Fault("list 9 267 256"));
        Assert.Equal(0, _host.Ok("plan")[0]);
        Assert.Equal(4000, _host.Ok("run 9 267 0 4000 256")[0]);
        Assert.Equal(5, _host.Fault("run 9 267 0 97 256"));
        Assert.Equal(4096, _host.Ok("run 9 267 0 96 256")[0]);
        Assert.Equal(5, _host.Fault("sweep 0 1 0 2 0 0"));
    }

    [Fact]
    public void A_list_is_taken_whole_or_not_at_all()
    {
        Assert.Equal(2, _host.Ok("list 9 267 256 8 300 128")[0]);
        Assert.Equal(4, _host.Fault("list 9 267 256 9 268 256 9 256 256"));
        Assert.Equal(3, _host.Fault("list 9 267 256 9 268 256 9 269"));
        Assert.Equal(10, _host.Ok("list 9 267 1 9 267 2 9 267 3 9 267 4 9 267 5 9 267 6 9 267 7 9 267 8")[0]);
        Assert.Equal(3, _host.Fault("list 9 267 1 9 267 2 9 267 3 9 267 4 9 267 5 9 267 6 9 267 7 9 267 8 9 267 9"));
        Assert.Equal(11, _host.Ok("list 9 267 256")[0]);
    }

    [Fact]
    public void Limits_narrowed_after_the_plan_refuse_its_sweep()
    {
        _host.PlanRun();
        _host.Ok("limits 8000 145000 400 184");
        Assert.Equal(4, _host.Fault("sweep 0 1 0 0 0 0"));
    }

    [Theory]
    [InlineData("run 9 287 -1 20 256")]
    [InlineData("list 9 267 256 9 268 256")]
    public void A_repeated_number_is_answered_but_not_done_twice(string request)
    {
        BoxLine first = _host.Ok(request);
        string again = TestHost.WithChecksum($">{first.Request} {request}") + "\n";
        for (int i = 0; i < 3; i++)
        {
            _host.TypeRaw(again);
            _host.RunFor(50);
            BoxLine second = Assert.Single(_host.Take());
            Assert.Equal((first.Request, "planned", first[0]), (second.Request, second.Word, second[0]));
        }

        _host.Ok("limits");
        _host.TypeRaw(again);
        _host.RunFor(50);
        Assert.Equal(2 * first[0], Assert.Single(_host.Take())[0]); // no longer the last request
    }
}
