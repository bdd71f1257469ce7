using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

public class SweepTests
{
    private readonly TestHost _host = new();

    [Fact]
    public void A_sweep_looks_then_reports_every_setting_and_ends()
    {
        _host.Board.Level = (board, _) => board.IsDriving ? 1000 + (int)(board.Reads % 7) : 400;
        _host.Ok("identify");
        _host.PlanRun(5);
        List<BoxLine> lines = _host.Ask("sweep 3000 10 0 0 0 0");
        Assert.Equal("dark", lines.First(line => line.Word != "alive").Word);
        List<BoxLine> points = lines.Where(line => line.Word == "point").ToList();
        Assert.Equal(5, points.Count);
        for (int i = 0; i < 5; i++)
        {
            BoxLine point = points[i];
            Assert.Equal([i, 9, 287 - i, 256, 10], Enumerable.Range(0, 5).Select(field => point[field]));
            Assert.InRange(point[5], 10000, 10060);
            Assert.InRange(point[6] - (point[5] * point[5] / 10.0), 0, 1000); // spread of the samples, from the sums
            Assert.InRange(point[7], 1000, 1006);
            Assert.InRange(point[8], 1000, 1006);
            Assert.True(i == 0 || point[9] > points[i - 1][9] + 3000);
        }

        Assert.Equal("5 0 0", string.Join(' ', lines[^1].Fields[..3]));
        Assert.False(_host.Board.IsDriving);
        Assert.Equal(
            Enumerable.Range(0, 5).Select(i => (FrequencyGrid.RequestHz(9, 287 - i), FrequencyGrid.AskedDuty(256, 9))),
            _host.Board.Settings);
        Assert.Equal(Enumerable.Range(lines[0].Number, lines.Count), lines.Select(line => line.Number));
    }

    [Theory]
    [InlineData(0, "267 266 265 320 300")]
    [InlineData(1, "300 320 265 266 267")]
    [InlineData(2, "267 266 265 320 300 300 320 265 266 267")]
    public void Orders(int order, string dividers)
    {
        _host.Ok("run 9 267 -1 3 256");
        _host.Ok("list 8 320 128 9 300 100");
        List<BoxLine> lines = _host.Ask($"sweep 0 1 0 {order} 0 0");
        Assert.Equal(dividers, string.Join(' ', lines.Where(line => line.Word == "point").Select(line => line[2])));
        Assert.Equal(dividers.Split(' ').Length, lines[^1][0]);
    }

    [Theory]
    [InlineData(2)]
    [InlineData(12)]
    public void Packs_hold_the_same_numbers_as_points(int pack)
    {
        _host.Board.Level = (board, _) => board.IsDriving ? (int)(board.DriveHz / 100) : 400;
        _host.PlanRun(50, 320);
        List<BoxLine> points = _host.Ask("sweep 500 16 0 0 0 0").Where(line => line.Word == "point").ToList();
        List<BoxLine> answer = _host.Ask($"sweep 500 16 0 0 {pack} 0");
        List<BoxLine> packs = answer.Where(line => line.Word == "pack").ToList();
        int index = 0;
        foreach (BoxLine line in packs)
        {
            Assert.Equal(index, line[0]);
            Assert.Equal(16, line[1]);
            int count = (line.Fields.Length - 4) / 3;
            Assert.InRange(count, 1, pack);
            Assert.True(line[3] > line[2] || count == 1);
            for (int i = 0; i < count; i++, index++)
            {
                Assert.Equal([points[index][5], points[index][7], points[index][8]], [line[4 + (3 * i)], line[5 + (3 * i)], line[6 + (3 * i)]]);
            }
        }

        Assert.Equal(50, index);
        Assert.Equal(50, answer[^1][0]);
        if (pack == 12)
        {
            Assert.True(packs.Count <= 5, "packs should be nearly full");
        }
    }

    [Fact]
    public void A_pack_of_long_numbers_stays_within_a_line()
    {
        _host.Board.TimeUs = 900_000_000_000_000_000;
        _host.Board.ReadCostUs = 1;
        _host.Board.Level = (board, _) => board.IsDriving ? 4095 : 400;
        _host.PlanRun(24);
        List<BoxLine> lines = _host.Ask("sweep 0 16384 0 0 12 0"); // every line's length is checked as it is parsed
        Assert.Equal(24, lines[^1][0]);
    }

    [Fact]
    public void Spacing_and_dwell_are_kept()
    {
        _host.PlanRun(3);
        List<BoxLine> points = _host.Ask("sweep 100000 5 30000 0 0 0").Where(line => line.Word == "point").ToList();
        for (int i = 1; i < 3; i++)
        {
            // dwell 100 ms, then 4 spacings of 30 ms, the cost of a change, and a sample that waits for a line of 3 ms
            Assert.InRange(points[i][9] - points[i - 1][9], 220000, 224000);
        }
    }

    // A beat of 300 counts at exactly the rate of the samples, in ten phases: even spacing would read each phase as a level, 212
    // counts (300 over root 2) root mean square; 100 independent samples leave 21.
    [Fact]
    public void A_beat_at_the_rate_of_the_samples_is_no_level()
    {
        _host.Board.ReadCostUs = 1;
        _host.PlanRun(1);
        double squares = 0;
        for (int phase = 0; phase < 10; phase++)
        {
            double angle = phase * 0.2 * Math.PI;
            _host.Board.Level = (board, _) => 400 + (int)Math.Round(board.IsDriving ? 300 * Math.Sin((2 * Math.PI * board.TimeUs / 200) + angle) : 0);
            BoxLine point = _host.Ask("sweep 1000 100 200 0 0 0").Single(line => line.Word == "point");
            double level = (point[5] / (double)point[4]) - 400;
            squares += level * level / 10;
            Assert.Equal(100, point[4]);
        }

        Assert.InRange(Math.Sqrt(squares), 0, 3 * 21);
    }

    [Theory]
    [InlineData("sweep 2000000 2 0 0 0 0")]
    [InlineData("sweep 0 16384 0 0 0 0")]
    [InlineData("sweep 0 3 1000000 0 0 0")]
    [InlineData("sweep 1000 4 0 0 12 0")]
    [InlineData("sweep 1000 4 0 2 0 0")]
    [InlineData("dark 3000 0 0")]
    [InlineData("dark 3000 700000 0")]
    [InlineData("ring 9 267 256 2000000 1000000 0 64 2")]
    [InlineData("ring 9 267 256 15000 0 10 64 20")]
    [InlineData("ring 9 267 256 9000 9000 0 64 20")]
    public void Some_line_goes_out_at_least_every_50_ms(string request)
    {
        _host.PlanRun(4);
        List<BoxLine> lines = _host.Ask(request);
        for (int i = 1; i < lines.Count; i++)
        {
            Assert.True(lines[i].TimeUs - lines[i - 1].TimeUs <= 50000, $"{lines[i - 1]}\n{lines[i]}");
        }
    }

    [Fact]
    public void The_first_line_is_out_before_the_drive_starts_and_the_drive_is_off_before_done()
    {
        long firstLine = 0;
        _host.PlanRun(4);
        int before = _host.Board.Sent.Count;
        _host.Board.BeforeStart = board => firstLine = board.Sent.Count;
        List<BoxLine> lines = _host.Ask("sweep 1000 4 0 0 0 0");
        Assert.True(firstLine > before);
        Assert.False(_host.Board.IsDriving);
        Assert.True(_host.Board.StoppedUs < lines[^2].TimeUs);
    }

    [Fact]
    public void Halt_ends_a_sweep_with_what_was_measured()
    {
        _host.PlanRun(20);
        int sweep = _host.Type("sweep 10000 4 0 0 12 0");
        _host.RunFor(1100);
        Assert.True(_host.Board.IsDriving);
        int halt = _host.Type("halt");
        _host.RunFor(100);
        Assert.False(_host.Board.IsDriving);
        List<BoxLine> lines = _host.Take();
        Assert.Equal(["done", "halted"], lines.TakeLast(2).Select(line => line.Word));
        Assert.Equal([sweep, halt], lines.TakeLast(2).Select(line => line.Request));
        long reported = lines.Where(line => line.Word == "pack").Sum(line => (line.Fields.Length - 4) / 3);
        Assert.InRange(reported, 1, 19);
        Assert.Equal([reported, Ending.Halted, 0], [lines[^2][0], lines[^2][1], lines[^2][2]]);
    }

    [Fact]
    public void Other_requests_find_the_box_busy_but_the_sweep_goes_on()
    {
        _host.PlanRun(20);
        _host.Type("sweep 20000 4 0 0 0 0");
        _host.RunFor(1200);
        Assert.Equal(12, _host.Fault("identify"));
        Assert.True(_host.Board.IsDriving);
        _host.RunFor(1000);
        Assert.Equal("20 0 0", string.Join(' ', _host.Take()[^1].Fields[..3]));
    }

    [Fact]
    public void A_second_try_of_the_sweep_in_progress_is_passed_over()
    {
        _host.PlanRun(5);
        int sweep = _host.Type("sweep 20000 4 0 0 0 0");
        _host.TypeRaw(TestHost.WithChecksum($">{sweep} sweep 20000 4 0 0 0 0") + "\n");
        _host.RunFor(2000);
        List<BoxLine> lines = _host.Take();
        Assert.DoesNotContain(lines, line => line.Word == "fault");
        Assert.Single(lines, line => line.Word == "done");
    }

    [Fact]
    public void A_dark_adds_up_its_samples()
    {
        _host.Board.Level = (board, _) => 400 + (board.Reads & 1);
        BoxLine dark = _host.Ok("dark 200 0 0");
        Assert.Equal(0, dark[0]);
        Assert.InRange(dark[1], 1200, 1700);
        Assert.InRange(dark[2] / (double)dark[1], 400.49, 400.51);
        Assert.InRange(((double)dark[3] / dark[1]) - Math.Pow((double)dark[2] / dark[1], 2), 0.24, 0.26);
        Assert.Equal([400, 401], [dark[4], dark[5]]);
        Assert.InRange(dark[7] - dark[6], 200000, 202000);
        Assert.Equal(3, _host.Ok("dark 200 90000 0")[1]);
    }
}
