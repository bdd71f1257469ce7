namespace Looseloop.Drift.Tests;

public class TemperatureCoefficientTests
{
    [Fact]
    public void The_coefficient_comes_back_within_its_interval()
    {
        int covered = 0;
        for (int seed = 0; seed < 200; seed++)
        {
            Noise noise = new(seed);
            List<DriftPoint> points = [];
            for (int i = 0; i < 100; i++)
            {
                double celsius = 20 + (4 * Math.Sin(i / 15.0));
                points.Add(new DriftPoint(30.0 * i, 250000 - (20 * (celsius - 20)) + (3 * noise.Next()), 3, celsius));
            }

            TemperatureCoefficient found = TemperatureCoefficient.Fit(DriftSeries.Of(points))!;
            covered += Math.Abs(found.PerK + 20) < 1.98 * found.StandardPerK ? 1 : 0;
            Assert.Equal(-80, found.PpmPerK, 3.0);
        }

        Assert.InRange(covered, 178, 200);
    }

    [Fact]
    public void Half_a_kelvin_or_no_column_gives_none()
    {
        Assert.Null(TemperatureCoefficient.Fit(DriftSeries.Of(
            Enumerable.Range(0, 50).Select(i => new DriftPoint(i, 250000, 3, 20 + (0.002 * i))))));
        Assert.Null(TemperatureCoefficient.Fit(DriftSeries.Of(Enumerable.Range(0, 50).Select(i => new DriftPoint(i, 250000, 3)))));
    }
}
