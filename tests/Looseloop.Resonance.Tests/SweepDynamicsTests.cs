using System.Numerics;
using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>
/// What too short a dwell does to a fitted curve. The envelope follows tau da/dt = -(1 + jx) a + 1, phase continuous; the detector
/// tau_d dy/dt = |a| - y, read at the end of each dwell. Expected biases were computed apart from this code.
/// </summary>
public sealed class SweepDynamicsTests
{
    [Theory]
    [InlineData(2, 0, 0.00943, -0.00225, 2e-5)]
    [InlineData(3, 1, 0.01863, -0.00416, 3e-5)]
    [InlineData(5, 1, 0.00265, -0.00070, 3e-5)]
    public void An_upward_sweep_in_tenths_of_the_bandwidth(double dwell, double lag, double f0Bias, double qBias, double tolerance)
    {
        ResonanceFit fit = Sweep(dwell, lag, 0.1);
        Assert.Equal(f0Bias, (fit.F0Hz - TestCurves.F0) / (TestCurves.F0 / TestCurves.NarrowQ), tolerance);
        Assert.Equal(qBias, (fit.Q / TestCurves.NarrowQ) - 1, tolerance);
    }

    [Fact]
    public void The_dwell_rule_leaves_less_than_four_ten_thousandths()
    {
        // 7 (tau + tau_d) with a detector as slow as the ring is 14 tau.
        double dwell = DwellRule.OrderedS(1, 1);
        Assert.Equal(14, dwell);
        ResonanceFit fit = Sweep(dwell, 1, 0.1);
        Assert.InRange((fit.F0Hz - TestCurves.F0) / (TestCurves.F0 / TestCurves.NarrowQ), -4e-4, 4e-4);
    }

    /// <summary>Time in ring times, frequency in bandwidths; the curve starts settled.</summary>
    private static ResonanceFit Sweep(double dwell, double lag, double step)
    {
        int count = (int)Math.Round(5 / step) + 1;
        var points = new FitPoint[count];
        Complex a = 1 / new Complex(1, -5);
        double y = a.Magnitude;
        for (int i = 0; i < count; i++)
        {
            double u = -2.5 + (i * step);
            var pole = new Complex(1, 2 * u);
            Complex settled = 1 / pole;
            Complex start = a;
            if (lag > 0)
            {
                const int parts = 4000;
                double h = dwell / parts;
                double fade = Math.Exp(-h / lag);
                for (int k = 0; k < parts; k++)
                {
                    double middle = (settled + ((start - settled) * Complex.Exp(-pole * (k + 0.5) * h))).Magnitude;
                    y = (y * fade) + ((1 - fade) * middle);
                }
            }

            a = settled + ((start - settled) * Complex.Exp(-pole * dwell));
            points[i] = new FitPoint(TestCurves.F0 * (1 + (u / TestCurves.NarrowQ)), lag > 0 ? y : a.Magnitude);
        }

        return ResonanceFitter.FitOnce(points, new FitOptions { Background = BackgroundModel.None });
    }
}
