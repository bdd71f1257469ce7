using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>Bad points end in an outcome and a reason, never in an exception or in a figure called sound.</summary>
public sealed class FitVerdictTests
{
    private const double F0 = 152.3e3;
    private const double Q = 180;

    [Fact]
    public void A_good_curve_is_sound()
    {
        FitVerdict verdict = Judge(Curve(61, 3, 0.05, 70, 0.002));
        Assert.Equal(Verdict.Sound, verdict.Verdict);
        Assert.Empty(verdict.Reasons);
    }

    [Fact]
    public void Without_variances_it_says_where_the_noise_came_from()
    {
        FitVerdict verdict = Judge([.. Curve(61, 3, 0.05, 70, 0.002).Select(p => p with { Variance = double.NaN })]);
        Assert.Equal(Verdict.Sound, verdict.Verdict);
        Assert.Equal([ReasonCode.NoiseFromResiduals], verdict.Reasons.Select(r => r.Code));
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(4)]
    public void Few_points_are_refused(int count) =>
        Expect([.. Curve(61, 3, 0, 0, 0.002).Skip(28).Take(count)], FitOutcome.TooFewPoints, ReasonCode.TooFewPoints);

    [Fact]
    public void One_frequency_over_and_over_is_refused() =>
        Expect([.. Enumerable.Range(0, 20).Select(i => new FitPoint(F0, 1 + (i * 1e-3), 1e-6))], FitOutcome.TooFewPoints, ReasonCode.TooFewPoints);

    [Theory]
    [InlineData(double.NaN, 1)]
    [InlineData(0, 1)]
    [InlineData(-5, 1)]
    [InlineData(double.PositiveInfinity, 1)]
    [InlineData(F0, double.NaN)]
    [InlineData(F0, double.NegativeInfinity)]
    [InlineData(F0, 1e300)]
    public void Numbers_that_are_none_are_refused(double frequency, double amplitude)
    {
        FitPoint[] points = Curve(61, 3, 0, 0, 0.002);
        points[7] = points[7] with { FrequencyHz = frequency, Amplitude = amplitude };
        Expect(points, FitOutcome.BadPoint, ReasonCode.FitFailed);
    }

    [Fact]
    public void Noise_and_constants_are_no_peak()
    {
        int taken = 0;
        var random = new Random(3);
        for (int run = 0; run < 200; run++)
        {
            double level = run % 2;
            FitPoint[] points = TestCurves.Points(TestCurves.Grid(61, 3, F0, Q), _ => level, 0.01, random);
            FitVerdict verdict = Judge(points);
            FitVerdict blind = Judge([.. points.Select(p => p with { Variance = double.NaN })]);
            taken += verdict.Verdict != Verdict.None ? 1 : 0;
            taken += blind.Verdict == Verdict.Sound ? 1 : 0;
        }

        Assert.Equal(0, taken);
        Expect(TestCurves.Points(TestCurves.Grid(61, 3, F0, Q), _ => 0), FitOutcome.NoPeak, ReasonCode.NoPeak);
        Expect(TestCurves.Points(TestCurves.Grid(61, 3, F0, Q), _ => 0.7), FitOutcome.NoPeak, ReasonCode.NoPeak);
    }

    [Theory]
    [InlineData(0.1)]
    [InlineData(0.4)]
    [InlineData(-0.3)]
    [InlineData(-2)]
    public void A_peak_at_the_edge_is_never_sound(double inside)
    {
        double bandwidth = F0 / Q;
        double[] grid = [.. Enumerable.Range(0, 61).Select(i => F0 + ((-inside + (i * 0.1)) * bandwidth))];
        FitVerdict verdict = Judge(TestCurves.Points(grid, f => TestCurves.Amplitude(f, F0, Q, 1, 0.03, 50), 0.002, new Random(4)));
        Assert.NotEqual(Verdict.Sound, verdict.Verdict);
        Assert.Contains(verdict.Reasons, r => r.Code is ReasonCode.PeakAtEdge or ReasonCode.NoPeak or ReasonCode.TooLittleSignal);
    }

    [Fact]
    public void A_saturated_detector_is_doubtful()
    {
        FitPoint[] points = [.. Curve(61, 3, 0.02, 70, 0.002).Select(p => p with { Amplitude = Math.Min(p.Amplitude, 0.8) })];
        FitVerdict verdict = Judge(points);
        Assert.NotEqual(Verdict.Sound, verdict.Verdict);
        Assert.Contains(verdict.Reasons, r => r.Code == ReasonCode.Saturated);
    }

    [Fact]
    public void Large_feed_through_is_doubtful()
    {
        FitVerdict verdict = Judge(Curve(61, 3, 0.5, 70, 0.002));
        Assert.NotEqual(Verdict.Sound, verdict.Verdict);
        Assert.Contains(verdict.Reasons, r => r.Code == ReasonCode.FeedThroughLarge);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void Two_resonances_are_not_one(bool stated)
    {
        FitPoint[] points = TestCurves.Points(
            TestCurves.Grid(61, 4, F0, Q),
            f => TestCurves.Amplitude(f, F0, Q, 1) + TestCurves.Amplitude(f, F0 * (1 + (1.2 / Q)), Q, 0.3), 0.002, new Random(5));
        FitVerdict verdict = Judge(stated ? points : [.. points.Select(p => p with { Variance = double.NaN })]);
        Assert.NotEqual(Verdict.Sound, verdict.Verdict);
        Assert.Contains(verdict.Reasons, r => r.Code == ReasonCode.ResidualTooLarge);
    }

    [Fact]
    public void A_grid_that_steps_over_the_peak_is_doubtful()
    {
        // Steps of three bandwidths, as at Q = 800 and 150 kHz without vernier.
        double[] grid = [.. Enumerable.Range(-8, 17).Select(i => F0 + ((i + 0.4) * 3 * F0 / 800))];
        FitVerdict verdict = Judge(TestCurves.Points(grid, f => TestCurves.Amplitude(f, F0, 800, 1, 0.03, 20), 1e-4, new Random(6)));
        Assert.NotEqual(Verdict.Sound, verdict.Verdict);
        Assert.Contains(verdict.Reasons, r => r.Code is ReasonCode.GridTooCoarse);
    }

    [Fact]
    public void Order_and_repeats_change_nothing()
    {
        FitPoint[] points = Curve(61, 3, 0.05, 70, 0.002);
        ResonanceFit plain = ResonanceFitter.FitOnce(points, new FitOptions());
        FitPoint[] shuffled = [.. points];
        new Random(8).Shuffle(shuffled);
        ResonanceFit other = ResonanceFitter.FitOnce(shuffled, new FitOptions());
        Assert.Equal(plain.F0Hz, other.F0Hz, 1e-6);
        Assert.Equal(plain.Q, other.Q, 1e-6);

        // Every point twice: the same curve, half the variance.
        ResonanceFit twice = ResonanceFitter.FitOnce([.. points, .. points.Reverse()], new FitOptions());
        Assert.Equal(plain.F0Hz, twice.F0Hz, 1e-6);
        Assert.Equal(plain.Stated.F0Hz2 / 2, twice.Stated.F0Hz2, 1e-6 * plain.Stated.F0Hz2);
    }

    [Fact]
    public void Scale_changes_nothing()
    {
        FitPoint[] points = Curve(61, 3, 0.05, 70, 0.002);
        ResonanceFit plain = ResonanceFitter.FitOnce(points, new FitOptions());
        foreach (double factor in new[] { 1e-9, 4095, 1e12 })
        {
            ResonanceFit scaled = ResonanceFitter.FitOnce(
                [.. points.Select(p => p with { Amplitude = p.Amplitude * factor, Variance = p.Variance * factor * factor })], new FitOptions());
            Assert.Equal(plain.F0Hz, scaled.F0Hz, 1e-6);
            Assert.Equal(plain.QRelativeStandard, scaled.QRelativeStandard, 1e-9);
        }
    }

    private static FitPoint[] Curve(int count, double reach, double b, double phase, double sigma) =>
        TestCurves.Points(TestCurves.Grid(count, reach, F0, Q), f => TestCurves.Amplitude(f, F0, Q, 1, b, phase), sigma, new Random(2));

    private static FitVerdict Judge(FitPoint[] points)
    {
        var fitter = new ResonanceFitter(points.Length);
        ResonanceFit fit = fitter.Fit(points, new FitOptions());
        return FitVerdict.Judge(points, fit, fit.IsFitted ? fitter.NormalizedResiduals : default);
    }

    private static void Expect(FitPoint[] points, FitOutcome outcome, ReasonCode code)
    {
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions());
        Assert.Equal(outcome, fit.Outcome);
        FitVerdict verdict = FitVerdict.Judge(points, fit);
        Assert.Equal(Verdict.None, verdict.Verdict);
        Assert.Contains(verdict.Reasons, r => r.Code == code);
    }
}
