namespace Looseloop.Drift.Tests;

// The criterion is stated at Settling; the world is a warm-up of 120 Hz with 900 s, 3 Hz noise every 30 s.
public class SettlingTests
{
    private static Settling Judge(int seed, double minutes, double limitHz, double slopePerS = 0, double driftHz = 120)
    {
        Noise noise = new(seed);
        List<DriftPoint> points = [];
        for (double t = 0; t <= minutes * 60; t += 30)
        {
            points.Add(new DriftPoint(t, 250000 + (driftHz * Math.Exp(-t / 900)) + (slopePerS * t) + (3 * noise.Next()), 3));
        }

        DriftSeries series = DriftSeries.Of(points);
        return Settling.Judge(series, WarmUpFit.Choose(series), limitHz, 1800);
    }

    [Fact]
    public void Before_one_and_a_half_time_constants_nothing_is_said()
    {
        for (int seed = 0; seed < 100; seed++)
        {
            Settling judged = Judge(seed, 10, 6);
            Assert.NotEqual(SettledState.Settled, judged.State);
        }

        Assert.Equal(SettledState.NotDeterminable, Judge(1, 10, 6).State);
    }

    [Theory]
    [InlineData(30, SettledState.NotSettled)]
    [InlineData(90, SettledState.Settled)]
    public void Half_an_hour_is_too_early_and_six_time_constants_are_enough(double minutes, SettledState expected)
    {
        int agree = 0;
        for (int seed = 0; seed < 100; seed++)
        {
            agree += Judge(seed, minutes, 6).State == expected ? 1 : 0;
        }

        Assert.InRange(agree, 95, 100);
    }

    [Fact]
    public void Never_settled_while_more_than_the_limit_is_to_come()
    {
        // At 45 minutes 6.0 Hz are still to come: with a limit of 5 Hz, settled would be wrong.
        int wrong = 0;
        for (int seed = 0; seed < 200; seed++)
        {
            wrong += Judge(seed, 45, 5).State == SettledState.Settled ? 1 : 0;
        }

        Assert.Equal(0, wrong);
    }

    [Fact]
    public void A_steady_coil_is_settled_once_the_run_can_show_it()
    {
        Assert.Equal(SettledState.NotDeterminable, Judge(3, 5, 6, driftHz: 0).State);
        Assert.Equal(SettledState.Settled, Judge(3, 120, 6, driftHz: 0).State);
    }

    [Fact]
    public void A_steady_slope_is_never_settled()
    {
        for (int seed = 0; seed < 50; seed++)
        {
            Assert.NotEqual(SettledState.Settled, Judge(seed, 120, 6, slopePerS: 0.02, driftHz: 0).State);
        }
    }

    [Fact]
    public void Few_readings_tell_nothing()
    {
        DriftSeries series = DriftSeries.Of(Enumerable.Range(0, 7).Select(i => new DriftPoint(i, 1000, 1)));
        Assert.Equal(SettledState.NotDeterminable, Settling.Judge(series, WarmUpFit.Choose(series), 5, 60).State);
    }
}
