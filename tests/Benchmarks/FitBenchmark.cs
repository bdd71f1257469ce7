using BenchmarkDotNet.Attributes;
using Looseloop.Resonance;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.Optimization;

namespace Looseloop.Benchmarks;

/// <summary>
/// One fit of 60 points. The ratio to MathNet's minimiser on the same points, started at the truth, is what can be compared
/// between machines.
/// </summary>
[MemoryDiagnoser]
[ShortRunJob]
public class FitBenchmark
{
    private const double F0 = 150e3;
    private const double Q = 200;

    private readonly ResonanceFitter _fitter = new(60);
    private FitPoint[] _points = [];
    private FitPoint[] _sparks = [];
    private Vector<double> _frequencies = Vector<double>.Build.Dense(1);
    private Vector<double> _amplitudes = Vector<double>.Build.Dense(1);

    [GlobalSetup]
    public void Setup()
    {
        var random = new Random(7);
        _points = [.. Enumerable.Range(0, 60).Select(i =>
        {
            double f = F0 * (1 + (((6.0 * i / 59) - 2.9) / Q));
            var coil = 1 / new System.Numerics.Complex(1, Q * ((f / F0) - (F0 / f)));
            double noise = Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
            return new FitPoint(f, (coil + System.Numerics.Complex.FromPolarCoordinates(0.05, 1)).Magnitude + (0.003 * noise), 9e-6);
        })];
        _sparks = [.. _points];
        _sparks[20] = _sparks[20] with { Amplitude = 2 };
        _frequencies = Vector<double>.Build.DenseOfEnumerable(_points.Select(p => p.FrequencyHz));
        _amplitudes = Vector<double>.Build.DenseOfEnumerable(_points.Select(p => p.Amplitude));
    }

    [Benchmark(Baseline = true)]
    public double MathNetFromTheTruth()
    {
        Vector<double> Curve(Vector<double> p, Vector<double> at) => at.Map(hz =>
        {
            double centre = F0 * (1 + (p[0] / Q));
            double x = Q * p[1] * ((hz / centre) - (centre / hz));
            return Math.Sqrt(Math.Max((p[2] + (p[3] * x) + (p[4] * x * x)) / (1 + (x * x)), 1e-12));
        });
        IObjectiveModel objective = ObjectiveFunction.NonlinearModel(Curve, _frequencies, _amplitudes);
        return new LevenbergMarquardtMinimizer().FindMinimum(
            objective, Vector<double>.Build.DenseOfArray([0.01, 1, 1.05, -0.08, 0.0025])).MinimizingPoint[1];
    }

    [Benchmark]
    public double FeedThroughFit() => _fitter.Fit(_points, new FitOptions()).Q;

    [Benchmark]
    public double ThreeParameterFit() => _fitter.Fit(_points, new FitOptions { Background = BackgroundModel.None }).Q;

    [Benchmark]
    public double RobustFitWithSpark() => _fitter.Fit(_sparks, new FitOptions { Loss = RobustLoss.Cauchy }).Q;
}
