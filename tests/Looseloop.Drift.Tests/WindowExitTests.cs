namespace Looseloop.Drift.Tests;

public class WindowExitTests
{
    private static WarmUpModel Model(int seed, double noiseHz = 3)
    {
        Noise noise = new(seed);
        List<DriftPoint> points = [];
        for (double t = 0; t <= 5400; t += 30)
        {
            points.Add(new DriftPoint(t, 250000 - 200 + (200 * Math.Exp(-t / 900)) + (noiseHz * noise.Next()), noiseHz));
        }

        return WarmUpFit.Choose(DriftSeries.Of(points))!;
    }

    [Fact]
    public void The_crossing_is_where_the_exponential_says()
    {
        // 200 (1 - exp(-t/900)) = 100 at t = 900 ln 2.
        WindowExit exit = WindowExit.Find(Model(1, 1e-6), 250000, 100, 0);
        Assert.Equal(WindowExitKind.Leaves, exit.Kind);
        Assert.Equal(900 * Math.Log(2), exit.TimeS, 1e-3);
    }

    [Fact]
    public void The_crossing_scatters_as_stated()
    {
        int covered = 0;
        for (int seed = 0; seed < 200; seed++)
        {
            WindowExit exit = WindowExit.Find(Model(seed), 250000, 100, 0);
            covered += Math.Abs(exit.TimeS - (900 * Math.Log(2))) < 2 * exit.StandardS ? 1 : 0;
            Assert.InRange(exit.TimeS, exit.EarliestS, exit.LatestS);
        }

        // 95 % +- 4 x 1.5 %; the stated noise is a floor, so more is allowed.
        Assert.InRange(covered, 178, 200);
    }

    [Fact]
    public void A_wide_window_is_never_left()
    {
        WindowExit exit = WindowExit.Find(Model(2), 250000, 300, 0);
        Assert.Equal(WindowExitKind.Stays, exit.Kind);
        Assert.True(double.IsNaN(exit.TimeS));
    }

    [Fact]
    public void An_edge_at_the_end_value_is_called_uncertain() =>
        Assert.Equal(WindowExitKind.MayLeave, WindowExit.Find(Model(4), 250000, 200, 0).Kind);

    [Fact]
    public void A_value_outside_from_the_start_is_said_to_be_so() =>
        Assert.Equal(WindowExitKind.Outside, WindowExit.Find(Model(5), 250500, 100, 0).Kind);
}
