using System.Numerics;
using Looseloop.Procedures.Tracking;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Tests.Tracking;

public class CurveInversionTests
{
    private const double F0Hz = 150_000;
    private const double Q = 200;
    private const double BandwidthHz = F0Hz / Q;
    private const double Peak = 2000;

    // The curve from complex numbers: y = |A/(1 + jx) + b|, x = Q (f/f0 - f0/f), a series RLC beside a constant feed-through.
    private static double Curve(double frequencyHz, double f0Hz, double q, Complex feedThrough, double peak = Peak)
    {
        double x = q * ((frequencyHz / f0Hz) - (f0Hz / frequencyHz));
        return ((peak / new Complex(1, x)) + (Peak * feedThrough)).Magnitude;
    }

    private static FitPoint[] Points(IEnumerable<double> bandwidths, double f0Hz, double q, Complex feedThrough, double sigma = 1, double peak = Peak) =>
        [.. bandwidths.Select(u => F0Hz + (u * BandwidthHz)).Select(f => new FitPoint(f, Curve(f, f0Hz, q, feedThrough, peak), sigma * sigma))];

    private static HeldCurve Held(Complex feedThrough)
    {
        FitPoint[] points = Points(Enumerable.Range(-30, 61).Select(i => 0.2 * i), F0Hz, Q, feedThrough);
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions());
        return HeldCurve.From(fit, points, 0)!;
    }

    // .75 bandwidths apart, as the settings near 150 kHz stand for Q = 200; a formula for small offsets errs by .03 bandwidths.
    [Theory]
    [InlineData(0.05, 0)]
    [InlineData(0.05, 90)]
    [InlineData(0.05, 225)]
    [InlineData(0.2, 140)]
    public void A_moved_f0_comes_back_exactly_on_a_coarse_grid(double ratio, double degrees)
    {
        var feedThrough = Complex.FromPolarCoordinates(ratio, degrees * Math.PI / 180);
        HeldCurve held = Held(feedThrough);
        foreach (double moved in (double[])[-0.6, -0.3, 0, 0.25, 0.5])
        {
            double f0 = F0Hz + (moved * BandwidthHz);
            TrackedFit fit = CurveInversion.Invert(held, Points([-1.5, -0.75, 0, 0.75, 1.5], f0, Q, feedThrough))!.Value;

            // What is left is the change of Q (f/f0 - f0/f)'s own slope over half a bandwidth: ppm of the bandwidth.
            Assert.Equal(f0, fit.F0Hz, 1e-3 * BandwidthHz);
            Assert.Equal(Q, fit.Q, 1e-3 * Q);
            Assert.False(fit.QIsHeld);
        }
    }

    [Fact]
    public void Q_and_amplitude_are_followed_with_the_feed_through_staying_as_it_is()
    {
        var feedThrough = Complex.FromPolarCoordinates(0.05, 1.2);
        HeldCurve held = Held(feedThrough);
        foreach (double r in (double[])[0.9, 0.97, 1.05])
        {
            FitPoint[] points = Points([-1.5, -0.75, 0, 0.75, 1.5], F0Hz + 100, r * Q, feedThrough, peak: r * Peak);
            TrackedFit fit = CurveInversion.Invert(held, points)!.Value;
            Assert.Equal(F0Hz + 100, fit.F0Hz, 2e-3 * BandwidthHz);
            Assert.Equal(r, fit.Q / Q, 3e-3);
            Assert.Equal(1, fit.Scale, 3e-3);
        }
    }

    // Cramer-Rao bounds of a bare resonance, from its gradients dy/df0 = 2x (1+x^2)^-3/2, dy/dBW = x^2 (1+x^2)^-3/2 and
    // dy/dA = (1+x^2)^-1/2: points at 0 and +-1/2 bandwidth, one sample each, SD f0 = 1.0000 BW sigma/A and SD Q/Q = sqrt 8
    // sigma/A; two points at +-.35355 bandwidths with Q held, SD f0 = .9186 BW sigma/A.
    [Fact]
    public void The_stated_noise_is_the_bound_of_three_and_of_two_points()
    {
        HeldCurve held = Held(new Complex(1e-6, 0));
        const double Sigma = 1e-3 * Peak;
        TrackedFit three = CurveInversion.Invert(held, Points([-0.5, 0, 0.5], F0Hz, Q, Complex.Zero, Sigma))!.Value;
        Assert.Equal(1.0000, three.F0NoiseHz / BandwidthHz / 1e-3, 0.01);
        Assert.Equal(2.8284, three.QNoiseRelative / 1e-3, 0.03);
        TrackedFit two = CurveInversion.Invert(held, Points([-0.353553, 0.353553], F0Hz, Q, Complex.Zero, Sigma))!.Value;
        Assert.Equal(0.9186, two.F0NoiseHz / BandwidthHz / 1e-3, 0.01);
        Assert.True(two.QIsHeld);
    }

    // The full curve is fitted with noise, its terms are held, and noiseless points are inverted: the error that is left is
    // the held terms', and should scatter as stated.
    [Fact]
    public void The_error_of_the_held_terms_is_stated_at_its_size()
    {
        var feedThrough = Complex.FromPolarCoordinates(0.05, 0.8);
        var random = new Random(5);
        const double Sigma = 2e-3 * Peak;
        const int Trials = 200;
        double f0Sum = 0;
        double qSum = 0;
        for (int i = 0; i < Trials; i++)
        {
            FitPoint[] full = [.. Points(Enumerable.Range(-15, 31).Select(k => 0.3 * k), F0Hz, Q, feedThrough, Sigma).Select(point => point with { Amplitude = point.Amplitude + (Sigma * Normal(random)) })];
            HeldCurve held = HeldCurve.From(ResonanceFitter.FitOnce(full, new FitOptions()), full, 0)!;
            TrackedFit fit = CurveInversion.Invert(held, Points([-1.5, -0.75, 0, 0.75, 1.5], F0Hz + 150, Q, feedThrough, 1e-3))!.Value;
            f0Sum += Math.Pow((fit.F0Hz - F0Hz - 150) / fit.F0HeldHz, 2);
            qSum += Math.Pow(((fit.Q / Q) - 1) / fit.QHeldRelative, 2);
        }

        // A mean square of 200 normal figures scatters by a tenth.
        Assert.InRange(f0Sum / Trials, 0.65, 1.4);
        Assert.InRange(qSum / Trials, 0.65, 1.4);
    }

    private static double Normal(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
