using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

public sealed class FitSpeedTests
{
    [Fact]
    public void A_fit_allocates_nothing()
    {
        var random = new Random(5);
        double[] grid = TestCurves.Grid(60, 4, 150e3, 200);
        FitPoint[] points = TestCurves.Points(grid, f => TestCurves.Amplitude(f, 150e3, 200, 1, 0.05, 70), 0.003, random);
        FitPoint[] sparks = [.. points];
        sparks[11] = sparks[11] with { Amplitude = 3 };
        var fitter = new ResonanceFitter(60);
        var robust = new FitOptions { Loss = RobustLoss.Cauchy };
        fitter.Fit(points, new FitOptions());
        fitter.Fit(sparks, robust);
        long before = GC.GetAllocatedBytesForCurrentThread();
        double sum = 0;
        for (int i = 0; i < 100; i++)
        {
            sum += fitter.Fit(points, new FitOptions()).Q + fitter.Fit(sparks, robust).Q;
        }

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
        Assert.InRange(sum / 200, 190, 210);
    }
}
