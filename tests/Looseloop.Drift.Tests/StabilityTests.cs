namespace Looseloop.Drift.Tests;

public class StabilityTests
{
    [Fact]
    public void White_noise_falls_with_the_root_of_the_averaging_time()
    {
        // White frequency noise: sigma_y(tau) = sigma / sqrt(m) (SP 1065, section 3).
        Noise noise = new(1);
        DriftSeries series = DriftSeries.Of(
            Enumerable.Range(0, 20000).Select(i => new DriftPoint(2.0 * i, 250000 + (3 * noise.Next()), 3)));
        Stability stability = Stability.Of(series, null);
        Assert.Equal(2, stability.SpacingS, 1e-9);
        foreach (StabilityPoint point in stability.Points.Where(p => p.Factor <= 256))
        {
            double expected = 3 / 250000.0 / Math.Sqrt(point.Factor);
            Assert.Equal(1, point.Overlapping / expected, Math.Max(0.05, 4 * point.RelativeStandard));
        }
    }

    [Fact]
    public void Only_the_longest_even_stretch_is_used()
    {
        List<DriftPoint> points = [];
        for (int i = 0; i < 300; i++)
        {
            points.Add(new DriftPoint((10.0 * i) + (i >= 100 ? 500 : 0), 1000 + (i % 2), 1));
        }

        Assert.Equal(200, Stability.Of(DriftSeries.Of(points), null).Used);
    }
}
