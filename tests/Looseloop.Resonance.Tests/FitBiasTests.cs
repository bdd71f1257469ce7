using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>
/// What a background does to a fit, against values computed once, apart from this code, from the definition
/// |A/(1+jx) + b exp(j phi)| (201 points over +-3 bandwidths).
/// </summary>
public sealed class FitBiasTests
{
    private static readonly double[] _grid = TestCurves.Grid(201, 3);
    private static readonly double _bandwidth = TestCurves.F0 / TestCurves.NarrowQ;

    [Theory]
    [InlineData(0.01, 90, -0.0160, -0.0001)]
    [InlineData(0.03, 90, -0.0479, -0.0012)]
    [InlineData(0.10, 0, 0, -0.0509)]
    [InlineData(0.10, 45, -0.0997, -0.0369)]
    [InlineData(0.10, 90, -0.1600, -0.0134)]
    [InlineData(0.10, 180, 0, -0.0745)]
    [InlineData(0.30, 45, -0.2547, -0.2523)]
    [InlineData(0.30, 90, -0.4908, -0.2053)]
    public void Feed_through_bends_the_three_parameter_fit_and_not_the_invariant_one(double b, double phase, double f0Bias, double qBias)
    {
        FitPoint[] points = TestCurves.Points(_grid, f => TestCurves.Amplitude(f, TestCurves.F0, TestCurves.NarrowQ, 1, b, phase));
        ResonanceFit plain = ResonanceFitter.FitOnce(points, new FitOptions { Background = BackgroundModel.None });
        Assert.Equal(f0Bias, (plain.F0Hz - TestCurves.F0) / _bandwidth, 2e-4);
        Assert.Equal(qBias, (plain.Q / TestCurves.NarrowQ) - 1, 2e-4);

        ResonanceFit invariant = ResonanceFitter.FitOnce(points, new FitOptions());
        Assert.True(invariant.IsFitted);
        Assert.Equal(0, (invariant.F0Hz - TestCurves.F0) / _bandwidth, 1e-5);
        Assert.Equal(1, invariant.Q / TestCurves.NarrowQ, 1e-5);
    }

    [Theory]
    [InlineData(3, 0.01, -0.0261)]
    [InlineData(3, -0.01, 0.0272)]
    [InlineData(3, 0.05, -0.121)]
    [InlineData(1.5, 0.01, -0.0163)]
    [InlineData(1.5, -0.01, 0.0169)]
    [InlineData(1.5, 0.05, -0.0767)]
    public void A_detector_offset_bends_q_and_not_f0(double k, double offset, double qBias)
    {
        FitPoint[] points = TestCurves.Points(
            TestCurves.Grid(201, k), f => TestCurves.Amplitude(f, TestCurves.F0, TestCurves.NarrowQ, 1) + offset);
        ResonanceFit plain = ResonanceFitter.FitOnce(points, new FitOptions { Background = BackgroundModel.None });
        Assert.Equal(0, (plain.F0Hz - TestCurves.F0) / _bandwidth, 1e-5);
        Assert.Equal(qBias, (plain.Q / TestCurves.NarrowQ) - 1, Math.Abs(offset) > 0.02 ? 5e-4 : 2e-4);
    }

    [Theory]
    [InlineData(1.5, 2.077)]
    [InlineData(3, 2.302)]
    [InlineData(5, 2.410)]
    public void Power_taken_for_amplitude_doubles_q(double k, double factor)
    {
        FitPoint[] points = TestCurves.Points(
            TestCurves.Grid(201, k), f => Math.Pow(TestCurves.Amplitude(f, TestCurves.F0, TestCurves.NarrowQ, 1), 2));
        ResonanceFit plain = ResonanceFitter.FitOnce(points, new FitOptions { Background = BackgroundModel.None });
        Assert.Equal(factor, plain.Q / TestCurves.NarrowQ, 1e-3);
    }

    [Fact]
    public void The_half_amplitude_rule_on_power_data_multiplies_q()
    {
        // y = 1/(1+x^2) falls to 0.707 at x = sqrt(sqrt 2 - 1): Q x 1.553774.
        (double low, double high) = ResonanceModel.FractionEdges(TestCurves.F0, 50, Math.Sqrt(Math.Sqrt(0.5)));
        Assert.Equal(1.553774, TestCurves.F0 / 50 / (high - low), 1e-6);
    }

    [Fact]
    public void The_raw_peak_moves_by_half_the_quadrature()
    {
        // b = 0.1 at 90 degrees: -0.0495 bandwidths, in the curve that the fit itself draws.
        FitPoint[] points = TestCurves.Points(_grid, f => TestCurves.Amplitude(f, TestCurves.F0, TestCurves.NarrowQ, 1, 0.1, 90));
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions());
        double top = Enumerable.Range(-2000, 4001).Select(i => TestCurves.F0 + (i * 1e-4 * _bandwidth)).MaxBy(f => fit.AmplitudeAt(f));
        Assert.Equal(-0.0495, (top - TestCurves.F0) / _bandwidth, 1e-4);
    }

    [Theory]
    [InlineData(-1)]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    public void A_declared_prefactor_is_taken_out_exactly(int n)
    {
        const double q = 50;
        double[] grid = TestCurves.Grid(61, 3, 250e3, q);
        FitPoint[] points = TestCurves.Points(grid, f => Math.Pow(f / 250e3, n) * TestCurves.Amplitude(f, 250e3, q, 1));
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions { PrefactorExponent = n });
        Assert.Equal(250e3, fit.F0Hz, 1e-4);
        Assert.Equal(q, fit.Q, 1e-7);
        Assert.Equal(1, fit.PeakAmplitude, 1e-7);
    }

    [Theory]
    [InlineData(1.5, 0.639)]
    [InlineData(5, 0.88)]
    public void A_wrong_prefactor_moves_f0_by_the_known_part(double k, double perQ)
    {
        // Shift of 0.639/Q (3 bandwidths) and 0.88/Q (10) bandwidths per unit of n, spans counted whole; first order in 1/Q.
        const double q = 2000;
        double[] grid = TestCurves.Grid(401, k, 250e3, q);
        FitPoint[] points = TestCurves.Points(grid, f => f / 250e3 * TestCurves.Amplitude(f, 250e3, q, 1));
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions { Background = BackgroundModel.None });
        Assert.Equal(perQ / q, (fit.F0Hz - 250e3) / (250e3 / q), 0.01 / q);
    }

    [Fact]
    public void Two_feed_throughs_share_one_power_curve()
    {
        double br = 0.1 * Math.Cos(Math.PI / 3);
        double bi = 0.1 * Math.Sin(Math.PI / 3);
        FeedThrough pair = FeedThrough.FromInvariants(1 + (2 * br) + 0.01, -2 * bi, 0.01);
        Assert.Equal(1.113552873, pair.Amplitude, 1e-8);
        Assert.Equal(-0.062861856, pair.InPhase, 1e-8);
        Assert.Equal(0.077771377, pair.Quadrature, 1e-8);
        Assert.Equal(1, pair.OtherAmplitude, 1e-8);
        Assert.Equal(br, pair.OtherInPhase, 1e-8);
        Assert.Equal(bi, pair.OtherQuadrature, 1e-8);
        Assert.Equal(0.1, pair.Ratio, 1e-8);
        Assert.False(pair.Clamped);
    }

    [Fact]
    public void The_ring_time_is_q_over_pi_f0() => Assert.Equal(254.647909e-6, ResonanceModel.RingTimeS(250e3, 200), 1e-12);
}
