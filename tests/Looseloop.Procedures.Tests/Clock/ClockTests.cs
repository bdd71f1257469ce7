using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Procedures.Clock;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Clock;

public class ClockTests
{
    private static readonly TimeSpan _duration = TimeSpan.FromSeconds(120);

    [Theory]
    [InlineData(0)]
    [InlineData(37)]
    [InlineData(-55)]
    public void A_boards_clock_error_is_found_over_the_wire(double ppm)
    {
        var world = new World { Board = new BoardParameters { ClockPpm = ppm } };
        using var link = new VirtualBox(world, 3);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        ClockRegression? line = new ClockProcedure(box, NoWatch.Instance, CancellationToken.None).Run(_duration);
        Assert.NotNull(line);
        ClockTrim trim = ClockProcedure.Trim(line, _duration, DateTimeOffset.UnixEpoch);
        Assert.InRange(Math.Abs(trim.Ppm - ppm), 0, 3 * trim.UncertaintyPpm);
        Assert.InRange(trim.UncertaintyPpm, 0.4, 5);
    }

    [Fact]
    public void Held_up_answers_do_not_move_the_line()
    {
        var random = new Random(5);
        var pairs = new List<ClockPair>();
        for (int i = 0; i < 300; i++)
        {
            // A quarter of the answers is held up by up to 80 ms, more of them late: unrejected, that is some 100 ppm.
            double t = 0.5 * i;
            double trip = 0.004 + (0.0005 * random.NextDouble()) + (random.NextDouble() < 0.1 + (0.3 * i / 300) ? 0.08 * random.NextDouble() : 0);
            pairs.Add(new ClockPair(t - (trip / 2), (t + 0.002) * (1 + 20e-6), trip));
        }

        ClockRegression? line = ClockRegression.Of(pairs);
        Assert.NotNull(line);
        Assert.InRange(Math.Abs(line.Ppm - 20), 0, 1);
        Assert.True(line.Left > 30);
    }

    [Fact]
    public void A_counter_gives_it_by_definition_and_another_frequency_is_refused()
    {
        var setting = new Setting(9, 267, 256, 149_812.5);
        ClockTrim? trim = CounterTrim.Of(setting, 149_812.5 * (1 + 25e-6), 0.1, 1, DateTimeOffset.UnixEpoch);
        Assert.NotNull(trim);
        Assert.Equal(25, trim.Ppm, 6);
        Assert.InRange(trim.UncertaintyPpm, 1, 1.1);
        Assert.Null(CounterTrim.Of(setting, 449_437.5, 0.1, 1, DateTimeOffset.UnixEpoch));
    }
}
