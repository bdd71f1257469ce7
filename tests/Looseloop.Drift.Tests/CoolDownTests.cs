using Looseloop.Statistics;

namespace Looseloop.Drift.Tests;

public class CoolDownTests
{
    private sealed record World(double EndHz, double DropHz, double TauS, double FastHz, double FastTauS, double FirstS);

    private static World Draw(Noise noise, bool fast)
    {
        double drop = 50 + (400 * noise.Uniform());
        double tau = 400 + (1200 * noise.Uniform());
        return new World(
            150000 + (1000 * noise.Uniform()), -drop, tau, fast ? -0.4 * drop : 0, tau / (6 + (4 * noise.Uniform())),
            20 + (100 * noise.Uniform()));
    }

    private static CoolDown? Extrapolate(World world, Noise noise)
    {
        List<DriftPoint> points = [];
        for (double t = world.FirstS; t <= world.FirstS + 3600; t += 20)
        {
            double f = world.EndHz + (world.DropHz * Math.Exp(-t / world.TauS)) + (world.FastHz * Math.Exp(-t / world.FastTauS));
            points.Add(new DriftPoint(t, f + (2 * noise.Next()), 2));
        }

        return CoolDown.Extrapolate(DriftSeries.Of(points), 0, 0);
    }

    // Worlds drawn at random; the truth is the world's own formula at the stop.
    [Theory]
    [InlineData(false, 0.92)]
    [InlineData(true, 0.90)]
    public void The_value_at_the_stop_is_covered_at_the_stated_rate(bool fast, double least)
    {
        Noise noise = new(fast ? 31 : 30);
        int covered = 0;
        const int Worlds = 300;
        for (int i = 0; i < Worlds; i++)
        {
            World world = Draw(noise, fast);
            CoolDown cool = Extrapolate(world, noise)!;
            double k = CoverageFactor.TwoSided(cool.DegreesOfFreedom, 0.95);
            double truth = world.EndHz + world.DropHz + world.FastHz;
            covered += Math.Abs(cool.AtStop - truth) < k * cool.AtStopStandard ? 1 : 0;
        }

        Assert.True(covered >= least * Worlds, $"{covered} of {Worlds} covered");
    }

    [Fact]
    public void An_uncertain_stop_widens_the_answer_by_the_slope_there()
    {
        List<DriftPoint> points = [];
        for (double t = 60; t <= 5000; t += 20)
        {
            points.Add(new DriftPoint(t, 150000 - (200 * Math.Exp(-t / 800)), 0.001));
        }

        CoolDown sharp = CoolDown.Extrapolate(DriftSeries.Of(points), 0, 0)!;
        CoolDown vague = CoolDown.Extrapolate(DriftSeries.Of(points), 0, 5)!;
        Assert.Equal(149800, sharp.AtStop, 0.01);
        Assert.Equal(60, sharp.FirstReadingAfterS);

        // 200/800 Hz/s x 5 s.
        Assert.Equal(1.25, vague.AtStopStandard, 0.01);
    }

    [Fact]
    public void Readings_before_the_stop_and_too_few_readings_are_refused()
    {
        DriftSeries series = DriftSeries.Of(Enumerable.Range(0, 20).Select(i => new DriftPoint(i, 1000 + i, 1)));
        Assert.Throws<ArgumentException>(() => CoolDown.Extrapolate(series, 5, 0));
        Assert.Null(CoolDown.Extrapolate(DriftSeries.Of([new DriftPoint(0, 1, 1)]), 0, 0));
    }
}
