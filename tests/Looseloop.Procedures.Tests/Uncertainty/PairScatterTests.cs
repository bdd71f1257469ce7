using Looseloop.Bench;
using Looseloop.Campaign;
using Looseloop.Procedures.Uncertainty;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Tests.Uncertainty;

public class PairScatterTests
{
    // Written here from the formula of a single resonance, with a bump that no single resonance has: the same on both ways.
    private const double F0Hz = 150_000;
    private const double Q = 200;

    [Theory]
    [InlineData(1, 0)]
    [InlineData(1, 0.02)]
    [InlineData(2, 0)]
    [InlineData(2, 0.02)]
    public void Scatter_between_the_ways_is_found_whatever_the_curve_lacks(double noise, double bump)
    {
        const int Trials = 400;
        var random = new Random(4);
        double f0 = 0;
        double q = 0;
        var fitter = new ResonanceFitter();
        for (int trial = 0; trial < Trials; trial++)
        {
            FitPoint[] there = [.. Enumerable.Range(-12, 25).Select(i => Point(random, i, noise, bump))];
            FitPoint[] points = [.. there, .. Enumerable.Range(-12, 25).Reverse().Select(i => Point(random, i, noise, bump))];
            ResonanceFit fit = fitter.Fit(points, new FitOptions());
            ResonanceFit way = fitter.Fit(there, new FitOptions());
            double[] residuals = fitter.NormalizedResiduals.ToArray();
            fitter.Fit(points.AsSpan(25), new FitOptions());
            PairScatter scatter = PairScatter.Of(points, [.. residuals, .. fitter.NormalizedResiduals], fit, 25 - way.DegreesOfFreedom);
            f0 += scatter.F0.Variance / Trials;
            q += scatter.Q.Variance / Trials;
            Assert.InRange(scatter.F0.DegreesOfFreedom, 3, 21);
        }

        // The mean of 400 such figures of some eight degrees of freedom is known to 2.5 %.
        Assert.InRange(f0 / (noise * noise), 0.9, 1.1);
        Assert.InRange(q / (noise * noise), 0.9, 1.1);
    }

    // A neighbour that is always there is no scatter: it widens the absolute figure alone. Starling's file says what stands there.
    [Fact]
    public void What_every_reading_lacks_alike_is_no_scatter()
    {
        Reading reading = BenchReading.Take(WorldShelf.Load("starling"), 3).Reading;
        BudgetLine misfit = reading.Budget.Lines.Single(line => line.Term == "misfit");
        BudgetLine noise = reading.Budget.Lines.Single(line => line.Term == "noise");
        Assert.False(misfit.Repeatability);
        Assert.True(misfit.F0Hz > noise.F0Hz);
        double[] again = [.. Enumerable.Range(10, 12).Select(seed => BenchReading.Take(WorldShelf.Load("starling"), (ulong)seed).Reading.F0Hz)];
        double mean = again.Average();
        double spread = Math.Sqrt(again.Sum(f0 => (f0 - mean) * (f0 - mean)) / (again.Length - 1));

        // Twelve readings know their spread to a fifth.
        Assert.InRange(spread / noise.F0Hz, 0.4, 1.7);
    }

    private static FitPoint Point(Random random, int step, double noise, double bump)
    {
        double hz = F0Hz + (step * 120);
        double x = Q * ((hz / F0Hz) - (F0Hz / hz));
        double level = (2000 / Math.Sqrt(1 + (x * x))) + (2000 * bump / (1 + (16 * (x - 1.2) * (x - 1.2))));
        double gauss = Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
        return new FitPoint(hz, level + (noise * gauss), 1, 0, 1);
    }
}
