using Looseloop.Resonance;
using Xunit.Abstractions;

namespace Looseloop.Resonance.Tests;

/// <summary>A square-law output has its noise in power; points far out may then have negative power, and are used as they are.</summary>
public sealed class PowerNoiseTests(ITestOutputHelper output)
{
    [Theory]
    [InlineData(0.003)]
    [InlineData(0.02)]
    public void Fits_in_power_reach_the_bound(double sigma)
    {
        // Out to 5 bandwidths, where the power is a hundredth of the peak's.
        double[] grid = TestCurves.Grid(61, 5);
        double Model(double f, double[] p)
        {
            double x = 2 * TestCurves.NarrowQ * p[1] * ((f / TestCurves.F0) - 1 - (p[0] / TestCurves.NarrowQ));
            return p[2] / (1 + (x * x));
        }

        (double cF0, double cQ) = NumericalBound.Of(grid, Model, [0, 1, 1], _ => 1);
        var random = new Random(31);
        var fitter = new ResonanceFitter(61);
        double f0 = 0, q = 0, qMean = 0;
        int covered = 0, negative = 0;
        const int trials = 1500;
        for (int t = 0; t < trials; t++)
        {
            FitPoint[] points = [.. grid.Select(f => FitPoint.FromPower(
                f, Math.Pow(TestCurves.Amplitude(f, TestCurves.F0, TestCurves.NarrowQ, 1), 2) + (sigma * TestCurves.Gaussian(random)),
                sigma * sigma))];
            negative += points.Count(p => p.Amplitude < 0);
            ResonanceFit fit = fitter.Fit(points, new FitOptions { Background = BackgroundModel.None });
            f0 += Math.Pow((fit.F0Hz - TestCurves.F0) / (TestCurves.F0 / TestCurves.NarrowQ), 2);
            q += Math.Pow((fit.Q / TestCurves.NarrowQ) - 1, 2);
            qMean += ((fit.Q / TestCurves.NarrowQ) - 1) / trials;
            covered += Math.Abs(fit.Q - TestCurves.NarrowQ) < 1.96 * fit.Stated.Q ? 1 : 0;
        }

        double unit = Math.Sqrt(61) / sigma;
        output.WriteLine($"c_f0 {Math.Sqrt(f0 / trials) * unit:F4}, c_Q {Math.Sqrt(q / trials) * unit:F4}, Q bias {qMean:P3}, "
            + $"covered {(double)covered / trials:P1}, {negative} negative powers");
        Assert.Equal(cF0, Math.Sqrt(f0 / trials) * unit, 0.05 * cF0);
        Assert.Equal(cQ, Math.Sqrt(q / trials) * unit, 0.05 * cQ);
        Assert.True(sigma < 0.01 || negative > 1000);
        Assert.InRange((double)covered / trials, 0.93, 0.97);
        Assert.True(Math.Abs(qMean) < 0.1 * Math.Sqrt(q / trials));
    }
}
