using Looseloop.Resonance;
using Xunit.Abstractions;

namespace Looseloop.Resonance.Tests;

/// <summary>
/// Decays made by stepping the detector's differential equation, tau_d dp/dt = A^2 exp(-2t/tau) - p, in small steps: nothing of the
/// estimator's closed form is used.
/// </summary>
public sealed class RingDownTests(ITestOutputHelper output)
{
    private const double F0 = 150e3;
    private const double StepS = 1e-6;

    [Theory]
    [InlineData(100, 0.2)]
    [InlineData(300, 0.2)]
    [InlineData(600, 0.2)]
    [InlineData(1000, 0.2)]
    [InlineData(600, 0.05)]
    [InlineData(600, 0)]
    public void Q_comes_back_within_its_interval(double q, double detectorPart)
    {
        double tau = q / (Math.PI * F0);
        double lag = detectorPart * tau;
        int inside = 0;
        double sum = 0;
        const int runs = 40;
        double[] levels = Levels(tau, lag, 1);
        var random = new Random((int)q);
        double relative = 0;
        for (int run = 0; run < runs; run++)
        {
            // The figure for tau_d is off by its own uncertainty, 5 %.
            double told = lag * (1 + (0.05 * TestCurves.Gaussian(random)));
            RingSample[] samples = Sampled(levels, 150e-6, 0.003, random);
            RingResult result = RingDown.Evaluate(samples, RingDetector.Power, told, 0.05 * lag);
            Assert.Equal(RingOutcome.Found, result.Outcome);
            inside += Math.Abs(result.Q(F0) - q) < 1.96 * result.QRelativeStandard * q ? 1 : 0;
            sum += (result.Q(F0) / q) - 1;
            relative = result.QRelativeStandard;
        }

        output.WriteLine($"Q {q}, tau_d {detectorPart} tau: u {relative:P2}, mean error {sum / runs:P2}, covered {inside}/{runs}");

        // 95 % of 40 is 38; 34 or fewer happen once in a hundred.
        Assert.InRange(inside, 34, runs);
        Assert.InRange(sum / runs, -0.5 * relative, 0.5 * relative);
        if (q >= 600)
        {
            Assert.True(relative < 0.02);
        }
    }

    [Fact]
    public void Feed_through_before_the_stop_does_not_matter()
    {
        double tau = 400 / (Math.PI * F0);
        RingSample[] samples = Decay(tau, 0.2 * tau, 100e-6, 0, new Random(1), 1.5);
        RingResult result = RingDown.Evaluate(samples, RingDetector.Power, 0.2 * tau, 0.01 * tau);
        Assert.Equal(400, result.Q(F0), 0.4);
    }

    [Fact]
    public void An_amplitude_detector_decays_with_tau()
    {
        double tau = 400 / (Math.PI * F0);
        double lag = 0.2 * tau;
        RingSample[] samples = [.. Enumerable.Range(0, 60).Select(i =>
        {
            double t = i * 60e-6;
            return new RingSample(t, ((Math.Exp(-t / tau) * tau) - (lag * Math.Exp(-t / lag))) / (tau - lag), 1e-8);
        })];
        RingResult result = RingDown.Evaluate(samples, RingDetector.Amplitude, lag, 0.02 * lag);
        Assert.Equal(400, result.Q(F0), 0.1);
    }

    [Theory]
    [InlineData(60, 1.0)]
    [InlineData(60, 3.0)]
    [InlineData(20, 0.5)]
    public void A_slow_detector_hides_the_ring_and_is_refused(double q, double detectorPart)
    {
        double tau = q / (Math.PI * F0);
        RingSample[] samples = Decay(tau, detectorPart * tau, 150e-6, 0.003, new Random(3));
        RingResult result = RingDown.Evaluate(samples, RingDetector.Power, detectorPart * tau, 0.05 * detectorPart * tau);
        Assert.Equal(RingOutcome.TooShort, result.Outcome);
        Assert.True(double.IsNaN(result.Q(F0)));
    }

    [Fact]
    public void Nonsense_is_refused()
    {
        RingSample[] flat = [.. Enumerable.Range(0, 40).Select(i => new RingSample(i * 1e-4, 0.5, 1e-4))];
        Assert.NotEqual(RingOutcome.Found, RingDown.Evaluate(flat, RingDetector.Power, 1e-4, 1e-5).Outcome);
        var random = new Random(4);
        RingSample[] noise = [.. flat.Select(s => s with { Level = 0.01 * TestCurves.Gaussian(random) })];
        Assert.NotEqual(RingOutcome.Found, RingDown.Evaluate(noise, RingDetector.Power, 1e-4, 1e-5).Outcome);
        Assert.Equal(RingOutcome.BadSamples, RingDown.Evaluate(flat.AsSpan(0, 3), RingDetector.Power, 1e-4, 1e-5).Outcome);
        flat[5] = flat[5] with { Level = double.NaN };
        Assert.Equal(RingOutcome.BadSamples, RingDown.Evaluate(flat, RingDetector.Power, 1e-4, 1e-5).Outcome);
    }

    private static RingSample[] Decay(double tau, double lag, double sampleS, double sigma, Random random, double before = 1) =>
        Sampled(Levels(tau, lag, before), sampleS, sigma, random);

    /// <summary>The detector's level, out to five ring times, from the power before the stop.</summary>
    private static double[] Levels(double tau, double lag, double before)
    {
        double[] level = new double[(int)(5 * tau / StepS)];
        double p = before;
        for (int i = 0; i < level.Length; i++)
        {
            level[i] = Math.Sqrt(p);
            double start = Math.Exp(-2 * i * StepS / tau);
            double middle = Math.Exp(-2 * (i + 0.5) * StepS / tau);
            double end = Math.Exp(-2 * (i + 1) * StepS / tau);
            double decay = Math.Exp(-StepS / Math.Max(lag, 1e-12));
            p = lag > 0 ? (p * decay) + ((1 - decay) * (start + (4 * middle) + end) / 6) : end;
        }

        return level;
    }

    /// <summary>Eight repeats whose samples are staggered over one sample time.</summary>
    private static RingSample[] Sampled(double[] level, double sampleS, double sigma, Random random)
    {
        const int repeats = 8;
        var samples = new List<RingSample>();
        for (int repeat = 0; repeat < repeats; repeat++)
        {
            for (int i = (int)(repeat * sampleS / repeats / StepS); i < level.Length; i += (int)(sampleS / StepS))
            {
                samples.Add(new RingSample(i * StepS, level[i] + (sigma * TestCurves.Gaussian(random)), Math.Max(sigma * sigma, 1e-8)));
            }
        }

        return [.. samples];
    }
}
