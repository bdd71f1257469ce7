using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>Trackers: exact on exact curves, and as precise as theory says (SD in bandwidths times sigma/A, one sample a point).</summary>
public sealed class TrackerTests
{
    private const double F0 = 150e3;
    private const double Q = 200;
    private const double Bandwidth = F0 / Q;

    [Theory]
    [InlineData(0, 0.5)]
    [InlineData(0.1, 0.5)]
    [InlineData(-0.25, 0.5)]
    [InlineData(0.4, 0.5)]
    [InlineData(0.3, 0.75)]
    [InlineData(-0.5, 0.35355)]
    public void Two_points_are_exact(double offset, double reach)
    {
        double centre = F0 - (offset * Bandwidth);
        double low = centre - (reach * Bandwidth);
        double high = centre + (reach * Bandwidth);
        Assert.True(TwoPointTracker.TryF0(
            low, TestCurves.Amplitude(low, F0, Q, 3), high, TestCurves.Amplitude(high, F0, Q, 3), Q, out double f0));
        Assert.Equal(F0, f0, 1e-5);
    }

    [Theory]
    [InlineData(0.75, 0.35355)]
    [InlineData(-0.8, 0.5)]
    public void Beyond_its_capture_range_it_never_gives_the_truth_away(double offset, double reach)
    {
        // Capture: 0.5 sqrt(1 + 4 ud^2), 0.612 and 0.707 bandwidths. Beyond, the ratio belongs to a nearer f0 too: the tracker takes
        // that one, which is why a full reading comes now and then, and why it re-centres within 0.15 bandwidths.
        double low = F0 - (offset * Bandwidth) - (reach * Bandwidth);
        double high = F0 - (offset * Bandwidth) + (reach * Bandwidth);
        bool found = TwoPointTracker.TryF0(
            low, TestCurves.Amplitude(low, F0, Q, 1), high, TestCurves.Amplitude(high, F0, Q, 1), Q, out double f0);
        double centre = Math.Sqrt(low * high);
        Assert.True(!found || Math.Abs(f0 - centre) <= 0.5 * Math.Sqrt(1 + (4 * reach * reach)) * Bandwidth * 1.001);
    }

    [Theory]
    [InlineData(0.35355, 0, 0.9186)]
    [InlineData(0.5, 0, 1.0)]
    [InlineData(0.35355, 0.1, 0.9737)]
    [InlineData(0.35355, 0.25, 1.3576)]
    public void Two_points_scatter_as_known(double reach, double offset, double sd)
    {
        // c grows from 1.299 to 1.377 at 0.1 and 1.92 at 0.25 bandwidths off; over sqrt 2 for one sample each.
        double low = F0 - ((offset + reach) * Bandwidth);
        double high = F0 + ((reach - offset) * Bandwidth);
        double yLow = TestCurves.Amplitude(low, F0, Q, 1);
        double yHigh = TestCurves.Amplitude(high, F0, Q, 1);
        double told = TwoPointTracker.F0StandardHz(low, yLow, 1e-3, high, yHigh, 1e-3, Q) / Bandwidth / 1e-3;
        Assert.Equal(sd, told, 0.02 * sd);
        var random = new Random(9);
        double sum = 0;
        const int trials = 40000;
        for (int i = 0; i < trials; i++)
        {
            TwoPointTracker.TryF0(
                low, yLow + (1e-3 * TestCurves.Gaussian(random)), high, yHigh + (1e-3 * TestCurves.Gaussian(random)), Q, out double f0);
            sum += Math.Pow((f0 - F0) / Bandwidth / 1e-3, 2);
        }

        Assert.Equal(told, Math.Sqrt(sum / trials), 0.015 * told);
    }

    [Fact]
    public void Three_points_are_exact_and_scatter_as_known()
    {
        double[] f = [F0 - (0.5 * Bandwidth), F0, F0 + (0.5 * Bandwidth)];
        double[] y = [.. f.Select(at => TestCurves.Amplitude(at, F0, Q, 2))];
        Assert.True(ThreePointTracker.TrySolve(f, y, out double f0, out double q, out double peak));
        Assert.Equal(F0, f0, 1e-5);
        Assert.Equal(Q, q, 1e-6);
        Assert.Equal(2, peak, 1e-9);

        // 1.0000 bandwidths and 2.8284, times sigma/A.
        ParameterCovariance covariance = ThreePointTracker.Covariance(f, y, [2e-3, 2e-3, 2e-3]);
        Assert.Equal(1.0, covariance.F0Hz / Bandwidth / 1e-3, 0.01);
        Assert.Equal(2.8284, covariance.Q / Q / 1e-3, 0.03);
        var random = new Random(10);
        double sumF0 = 0, sumQ = 0;
        const int trials = 40000;
        for (int i = 0; i < trials; i++)
        {
            Assert.True(ThreePointTracker.TrySolve(f, [.. y.Select(v => v + (2e-3 * TestCurves.Gaussian(random)))], out f0, out q, out _));
            sumF0 += Math.Pow((f0 - F0) / Bandwidth / 1e-3, 2);
            sumQ += Math.Pow(((q / Q) - 1) / 1e-3, 2);
        }

        Assert.Equal(1.0, Math.Sqrt(sumF0 / trials), 0.015);
        Assert.Equal(2.8284, Math.Sqrt(sumQ / trials), 0.05);
    }

    [Fact]
    public void A_common_background_biases_f0_but_not_its_change()
    {
        // Feed-through .05 j: f0 off by -0.050 bandwidths, a change of 0.1 bandwidths by less than 0.0007.
        double low = F0 - (0.5 * Bandwidth);
        double high = F0 + (0.5 * Bandwidth);
        double At(double f0)
        {
            Assert.True(TwoPointTracker.TryF0(
                low, TestCurves.Amplitude(low, f0, f0 / Bandwidth, 1, 0.05, 90), high,
                TestCurves.Amplitude(high, f0, f0 / Bandwidth, 1, 0.05, 90), Q, out double found));
            return found / Bandwidth;
        }

        double before = At(F0);
        double after = At(F0 + (0.1 * Bandwidth));
        Assert.Equal(-0.050, before - Q, 1e-3);
        Assert.Equal(0.1, after - before, 7e-4);
    }

    [Theory]
    [InlineData(0, 1)]
    [InlineData(1, 0)]
    [InlineData(double.NaN, 1)]
    public void Nonsense_is_refused(double low, double high) =>
        Assert.False(TwoPointTracker.TryF0(F0 - 100, low, F0 + 100, high, Q, out _));
}
