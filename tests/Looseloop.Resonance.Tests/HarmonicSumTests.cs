using System.Numerics;
using Looseloop.Resonance;
using Xunit.Abstractions;

namespace Looseloop.Resonance.Tests;

/// <summary>
/// A square wave drives the coil, and the feed-through passes every harmonic of it. A detector that responds to power adds them
/// up as constants, which the model spans: f0 and Q stay exact. The sum over 15 harmonics is written out here.
/// </summary>
public sealed class HarmonicSumTests(ITestOutputHelper output)
{
    private const double F0 = 150e3;
    private const double Q = 200;

    [Theory]
    [InlineData(0.05, 0.5)]
    [InlineData(0.05, 1.0 / 3)]
    [InlineData(0.10, 0.5)]
    public void Power_keeps_q_within_a_ten_thousandth_whatever_the_harmonics(double b, double duty)
    {
        double worst = 0;
        double worstF0 = 0;
        for (int phase = 0; phase < 24; phase++)
        {
            // 13 points 0.75 bandwidths apart, as the settings lie.
            FitPoint[] points = [.. Enumerable.Range(-6, 13).Select(i =>
            {
                double f = F0 * (1 + ((0.1 + (0.75 * i)) / Q));
                return new FitPoint(f, Math.Sqrt(Power(f, duty, b, phase * 15)));
            })];
            ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions());
            Assert.True(fit.IsFitted);
            worst = Math.Max(worst, Math.Abs((fit.Q / Q) - 1));
            worstF0 = Math.Max(worstF0, Math.Abs(fit.F0Hz - F0) / (F0 / Q));
        }

        output.WriteLine($"b {b}, duty {duty:F3}: Q off by {worst:P5} at worst, f0 by {worstF0:F6} bandwidths");
        Assert.True(worst < 1e-4, $"Q off by {worst:P4}");
        Assert.True(worstF0 < 1e-3);
    }

    [Fact]
    public void Vernier_groups_of_a_square_wave_are_one_curve()
    {
        // Settings near f0, f0/3 and f0/5: the third and fifth harmonic ring the coil, the fundamental only feeds through.
        var points = new List<FitPoint>();
        foreach ((int harmonic, int group, double offset) in new[] { (1, 0, 0.2), (3, 1, 0.45), (5, 2, -0.15) })
        {
            for (int i = -3; i <= 3; i++)
            {
                double f = F0 * (1 + ((offset + (1.5 * i)) / Q)) / harmonic;
                points.Add(new FitPoint(
                    harmonic * f, Math.Sqrt(Power(f, 0.5, 0.05, 70)), double.NaN, group, DutyHarmonics.DriveWeight(harmonic, 0.5)));
            }
        }

        ResonanceFit fit = ResonanceFitter.FitOnce([.. points], new FitOptions());
        ResonanceFit reversed = ResonanceFitter.FitOnce([.. points.AsEnumerable().Reverse()], new FitOptions());
        Assert.True(fit.IsFitted);
        Assert.Equal(fit.ConstantPower, reversed.ConstantPower, 1e-8);
        Assert.Equal(1, fit.Q / Q, 3e-4);
        Assert.Equal(0, (fit.F0Hz - F0) / (F0 / Q), 3e-4);
    }

    [Fact]
    public void Duty_does_not_change_the_feed_through_by_name()
    {
        // The same coil at duty 1/3, told its drive weight: peak and feed-through stay what they are at weight 1.
        double weight = DutyHarmonics.DriveWeight(1, 1.0 / 3);
        FitPoint[] points = [.. TestCurves.Grid(41, 4, F0, Q).Select(f =>
            new FitPoint(f, weight * TestCurves.Amplitude(f, F0, Q, 1, 0.1, 120), double.NaN, 0, weight))];
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions());
        Assert.Equal(0.01, fit.ConstantPower, 1e-6);
        Assert.Equal(1, new[] { fit.FeedThrough.Amplitude, fit.FeedThrough.OtherAmplitude }.MinBy(a => Math.Abs(a - 1)), 1e-5);
    }

    /// <summary>Mean square of the pickup over one period, over that of the fundamental at duty 1/2 on resonance.</summary>
    private static double Power(double driveHz, double duty, double b, double phaseDeg)
    {
        Complex feed = Complex.FromPolarCoordinates(b, phaseDeg * Math.PI / 180);
        double sum = 0;
        for (int n = 1; n <= 15; n++)
        {
            double f = n * driveHz;
            double weight = 2 * Math.Sin(n * Math.PI * duty) / (n * Math.PI) / (2 / Math.PI);
            var coil = 1 / new Complex(1, Q * ((f / F0) - (F0 / f)));
            double response = (coil + feed).Magnitude;
            sum += weight * weight * response * response;
        }

        return sum;
    }
}
