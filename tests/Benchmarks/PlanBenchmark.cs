using BenchmarkDotNet.Attributes;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Benchmarks;

/// <summary>One sweep design over the settings near 150 kHz, with those near f0/3 and f0/5 looked at.</summary>
[MemoryDiagnoser]
[ShortRunJob]
public class PlanBenchmark
{
    private PlanRequest? _request;

    [Params(200, 800)]
    public double Q { get; set; }

    [GlobalSetup]
    public void Setup() => _request = new PlanRequest
    {
        Estimate = new CurveEstimate(150.2e3, Q, -0.06, 0.0009),
        F0StandardHz = 50,
        QRelativeStandard = 0.1,
        Noise = NoiseLaw.ConstantInAmplitude(3e-3),
        Fundamental = Settings(9, 267),
        Third = Settings(10, 400),
        Fifth = Settings(11, 333),
        DetectorTimeS = 100e-6,
        SampleS = 150e-6,
        TimeS = 0.3,
    };

    [Benchmark]
    public double Design() => SweepDesigner.Design(_request!)?.QRelative ?? 0;

    private static Setting[] Settings(int bits, int divider) =>
        [.. Enumerable.Range(divider - 40, 81).Where(d => d > 256)
            .Select(d => new Setting(bits, d, 1 << (bits - 1), 80e6 * 256 / ((double)d * (1 << bits))))];
}
