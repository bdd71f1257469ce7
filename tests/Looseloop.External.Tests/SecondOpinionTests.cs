using Looseloop.Resonance;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.Optimization;

namespace Looseloop.External.Tests;

/// <summary>
/// The same noisy points given to MathNet.Numerics' own Levenberg-Marquardt, with the curve written as it stands in the textbook
/// and numerical derivatives. Both must end at the same minimum with the same standard errors.
/// </summary>
public sealed class SecondOpinionTests
{
    [Theory]
    [InlineData(1, 0.05, 70, 180, 61)]
    [InlineData(2, 0.15, 200, 400, 41)]
    [InlineData(3, 0.1, 0, 60, 31)]
    [InlineData(4, 0.25, 300, 200, 101)]
    public void MathNet_finds_the_same_minimum(int seed, double b, double phaseDeg, double q, int count)
    {
        const double f0 = 152.3e3;
        var random = new Random(seed);
        double[] f = [.. Enumerable.Range(0, count).Select(i => f0 * (1 + (((6.0 * i / (count - 1)) - 2.7) / q)))];
        double[] y = [.. f.Select(at =>
        {
            var coil = 1 / new System.Numerics.Complex(1, q * ((at / f0) - (f0 / at)));
            double noise = Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
            return (coil + System.Numerics.Complex.FromPolarCoordinates(b, phaseDeg * Math.PI / 180)).Magnitude + (0.003 * noise);
        })];

        ResonanceFit ours = ResonanceFitter.FitOnce([.. f.Zip(y, (at, value) => new FitPoint(at, value))], new FitOptions());

        // Parameters of MathNet: offset of f0 in bandwidths, Q over the true one, n0, n1, n2.
        Vector<double> Curve(Vector<double> p, Vector<double> at) => at.Map(hz =>
        {
            double centre = f0 * (1 + (p[0] / q));
            double x = q * p[1] * ((hz / centre) - (centre / hz));
            return Math.Sqrt(Math.Max((p[2] + (p[3] * x) + (p[4] * x * x)) / (1 + (x * x)), 1e-12));
        });
        IObjectiveModel objective = ObjectiveFunction.NonlinearModel(
            Curve, Vector<double>.Build.DenseOfArray(f), Vector<double>.Build.DenseOfArray(y), accuracyOrder: 6);
        var minimiser = new LevenbergMarquardtMinimizer(gradientTolerance: 1e-14, stepTolerance: 1e-14, functionTolerance: 1e-14);
        NonlinearMinimizationResult theirs = minimiser.FindMinimum(
            objective, Vector<double>.Build.DenseOfArray([0.02, 0.97, 1, 0.01, 0.01]));

        Assert.True(ours.IsFitted);
        double theirF0 = f0 * (1 + (theirs.MinimizingPoint[0] / q));
        double theirQ = q * theirs.MinimizingPoint[1];
        Assert.Equal(theirF0, ours.F0Hz, 1e-4 * ours.F0StandardHz);
        Assert.Equal(theirQ, ours.Q, 1e-4 * ours.Scatter.Q);
        Assert.Equal(theirs.StandardErrors[0] * f0 / q, ours.Scatter.F0Hz, 1e-3 * ours.Scatter.F0Hz);
        Assert.Equal(theirs.StandardErrors[1] * q, ours.Scatter.Q, 1e-3 * ours.Scatter.Q);
        Assert.Equal(theirs.ModelInfoAtMinimum.Value, ours.SumOfSquares, 1e-6 * ours.SumOfSquares);
    }
}
