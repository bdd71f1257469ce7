using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>
/// Cramer-Rao bounds: closed forms, quadrature and optimal designs (G. Elfving, Ann. Math. Stat. 23 (1952) 255; J. Kiefer and
/// J. Wolfowitz 1960). Expected values were computed apart from this code, the exact roots are exact.
/// </summary>
public sealed class BoundTests
{
    private static readonly NoiseLaw _amplitude = NoiseLaw.ConstantInAmplitude(1);

    [Theory]
    [InlineData(1, 1.5958, 7.333)]
    [InlineData(2, 1.7231, 5.261)]
    [InlineData(3, 2.0073, 5.268)]
    [InlineData(5, 2.5393, 5.918)]
    [InlineData(10, 3.5712, 7.668)]
    [InlineData(20, 5.0468, 10.440)]
    public void Even_sweeps(double k, double cF0, double cQ)
    {
        Assert.Equal(cF0, EvenSweepBound.F0(k), 1e-4);
        Assert.Equal(cQ, EvenSweepBound.Q(k), 1e-3);

        // The general information over a dense grid says the same.
        (double f0, double q) = Dense(k, _amplitude, BackgroundModel.None, new CurveEstimate(TestCurves.F0, TestCurves.NarrowQ));
        Assert.Equal(cF0, f0, 1e-3);
        Assert.Equal(cQ, q, 5e-3);
    }

    [Fact]
    public void Best_even_spans()
    {
        (double bestF0, double atF0) = Smallest(EvenSweepBound.F0);
        Assert.Equal(1.57720, bestF0, 1e-4);
        Assert.Equal(1.189, atF0, 2e-3);
        (double bestQ, double atQ) = Smallest(EvenSweepBound.Q);
        Assert.Equal(5.19409, bestQ, 1e-4);
        Assert.Equal(2.418, atQ, 2e-3);
    }

    [Theory]
    [InlineData(1, 0.9454, 4.342)]
    [InlineData(3, 1.3863, 4.136)]
    [InlineData(6, 1.9546, 5.574)]
    public void Even_sweeps_with_noise_in_power(double k, double cF0, double cQ)
    {
        // The table counts sigma in units of the peak power.
        (double f0, double q) = Dense(
            k, NoiseLaw.ConstantInPower(1), BackgroundModel.None, new CurveEstimate(TestCurves.F0, TestCurves.NarrowQ));
        Assert.Equal(cF0, f0, 1e-3);
        Assert.Equal(cQ, q, 4e-3);
    }

    [Theory]
    [InlineData(2, 4.198, 13.500)]
    [InlineData(3, 3.611, 9.968)]
    [InlineData(4, 3.5245, 8.990)]
    [InlineData(6, 3.680, 8.661)]
    public void Even_sweeps_with_unknown_feed_through(double k, double cF0, double cQ)
    {
        (double f0, double q) = Dense(
            k, _amplitude, BackgroundModel.FeedThrough, new CurveEstimate(TestCurves.F0, TestCurves.NarrowQ));
        Assert.Equal(cF0, f0, 2e-3);
        Assert.Equal(cQ, q, 8e-3);
    }

    [Theory]
    [InlineData(3, 3.78, 9.33)]
    [InlineData(5, 3.73, 7.90)]
    public void Even_sweeps_with_a_tenth_of_feed_through(double k, double cF0, double cQ)
    {
        // A = 1, b = 0.1 j: n1 = -0.2, n2 = 0.01, P = 1.
        (double f0, double q) = Dense(
            k, _amplitude, BackgroundModel.FeedThrough, new CurveEstimate(TestCurves.F0, TestCurves.NarrowQ, -0.2, 0.01));
        Assert.Equal(cF0, f0, 0.01);
        Assert.Equal(cQ, q, 0.02);
    }

    [Fact]
    public void Optimal_designs_have_their_exact_values()
    {
        // Half each at +-1/(2 sqrt 2) bandwidths, with Q and A known to hardly matter by symmetry: c_f0 = sqrt(27/16).
        Assert.Equal(Math.Sqrt(27.0 / 16), Few([-1 / Math.Sqrt(8), 0, 1 / Math.Sqrt(8)], [0.49995, 1e-4, 0.49995]).F0, 2e-4);

        // A third each at 0 and +-sqrt 3 / 2: c_Q = 4.
        Assert.Equal(4, Few([-Math.Sqrt(0.75), 0, Math.Sqrt(0.75)], [1.0 / 3, 1.0 / 3, 1.0 / 3]).Q, 1e-4);

        // A third each at 0 and +-0.5: sqrt 3 and 2 sqrt 6.
        (double f0, double q) = Few([-0.5, 0, 0.5], [1.0 / 3, 1.0 / 3, 1.0 / 3]);
        Assert.Equal(Math.Sqrt(3), f0, 1e-4);
        Assert.Equal(2 * Math.Sqrt(6), q, 1e-4);
    }

    [Fact]
    public void An_unmeasured_offset_doubles_the_uncertainty_of_q()
    {
        // The reason why the dark is measured and never fitted: best c_Q 11.03944 at 6.412 bandwidths, against 5.19409. Computed
        // here by numerical derivatives: the product has no model with an offset.
        double Model(double f, double[] p)
        {
            double x = TestCurves.NarrowQ * p[1] * 2 * ((f / TestCurves.F0) - 1 - (p[0] / TestCurves.NarrowQ));
            return (p[2] / Math.Sqrt(1 + (x * x))) + p[3];
        }

        double q = NumericalBound.Of(TestCurves.Grid(4001, 3.206), Model, [0, 1, 1, 0], _ => 1).Q;
        Assert.Equal(11.03944, q, 0.01);
    }

    [Fact]
    public void Rice_bias_of_a_noisy_envelope()
    {
        Assert.Equal(1.253314, RiceDistribution.Mean(0, 1), 1e-6);
        Assert.Equal(0.655136, RiceDistribution.StandardDeviation(0, 1), 1e-6);
        Assert.Equal(0.172577, RiceDistribution.Mean(3, 1) - 3, 1e-6);
        Assert.Equal(0.050127, RiceDistribution.Mean(10, 1) - 10, 1e-6);
    }

    private static (double F0, double Q) Dense(double k, NoiseLaw noise, BackgroundModel background, CurveEstimate curve)
    {
        const int count = 8001;
        var information = new FisherInformation(curve, noise, background);
        foreach (double f in TestCurves.Grid(count, k / 2))
        {
            information.Add(f, 1.0 / count);
        }

        return information.Bound();
    }

    private static (double F0, double Q) Few(double[] at, double[] shares)
    {
        var information = new FisherInformation(
            new CurveEstimate(TestCurves.F0, TestCurves.NarrowQ), _amplitude, BackgroundModel.None);
        for (int i = 0; i < at.Length; i++)
        {
            information.Add(TestCurves.F0 * (1 + (at[i] / TestCurves.NarrowQ)), shares[i]);
        }

        return information.Bound();
    }

    private static (double Value, double At) Smallest(Func<double, double> bound)
    {
        double at = Enumerable.Range(500, 4000).Select(i => i * 1e-3).MinBy(bound);
        return (bound(at), at);
    }
}
