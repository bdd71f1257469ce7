using System.Numerics;
using Looseloop.Resonance;
using Xunit.Abstractions;

namespace Looseloop.Resonance.Tests;

/// <summary>
/// Extrapolation to no coupling, against the exact solution of two coupled meshes (loop: Rp, Lp, driven by a constant voltage;
/// coil: R, L, C; the pickup sees the voltage on C).
/// </summary>
public sealed class StandoffTests(ITestOutputHelper output)
{
    private const double F0 = 250e3;
    private const double Q = 200;

    [Fact]
    public void Loop_moves_of_an_inductive_loop_leave_nothing_behind()
    {
        // k = .03, .015, .0075: pulls of +449, +112, +28 ppm come to 0.0 +- 0.05 ppm, 1/Q to 200.
        double[] couplings = [0.03, 0.015, 0.0075];
        double[] pulls = [449.0, 112.2, 28.1];
        StandoffReading[] readings = [.. couplings.Select(k => Read(k, 18.26, -1))];
        for (int i = 0; i < 3; i++)
        {
            output.WriteLine($"k {couplings[i]}: {1e6 * ((readings[i].F0Hz / F0) - 1):F2} ppm, Q {readings[i].Q:F3}");
            Assert.Equal(pulls[i], 1e6 * ((readings[i].F0Hz / F0) - 1), 0.1);
        }

        Assert.True(StandoffRegression.TryExtrapolate(readings, StandoffMove.Loop, out StandoffResult result));
        output.WriteLine($"left: {1e6 * ((result.F0Hz / F0) - 1):F4} ppm, Q {result.Q:F4}");
        Assert.Equal(0, 1e6 * ((result.F0Hz / F0) - 1), 0.05);
        Assert.Equal(200, result.Q, 0.01);
    }

    [Fact]
    public void Pickup_moves_go_by_the_first_power()
    {
        // f = f00 sqrt(C/(C + dC)), 0.02 pF on 15.6 pF at the nearest place; the antenna's voltage goes as dC.
        StandoffReading At(double dC) => new(dC * 100 * Q, F0 * Math.Sqrt(15.6 / (15.6 + dC)), 0.1, Q, 1e-3);
        StandoffReading[] readings = [At(0.02), At(0.01)];
        Assert.True(StandoffRegression.TryExtrapolate(readings, StandoffMove.Pickup, out StandoffResult right));
        Assert.Equal(F0, right.F0Hz, 1e-6 * F0);

        // The other power with an amplitude ratio of 2 would leave a third of the pull, 213 of 640 ppm.
        Assert.True(StandoffRegression.TryExtrapolate(readings, StandoffMove.Loop, out StandoffResult wrong));
        Assert.Equal(-213, 1e6 * ((wrong.F0Hz / F0) - 1), 2.0);
    }

    [Theory]
    [InlineData(2, 1.374)]
    [InlineData(3, 1.132)]
    public void Two_readings_cost_the_known_factor(double ratio, double factor)
    {
        // Standard deviation at no coupling over that of one reading, readings at A and A/ratio.
        StandoffReading[] readings = [new(1000, F0, 1, Q, 1e-3), new(1000 / ratio, F0, 1, Q, 1e-3)];
        Assert.True(StandoffRegression.TryExtrapolate(readings, StandoffMove.Loop, out StandoffResult result));
        Assert.Equal(factor, result.F0StandardHz, 1e-3);
        Assert.Equal(factor * 1e-3, result.QRelativeStandard, 1e-6);
    }

    [Fact]
    public void Three_readings_cost_the_known_factor()
    {
        StandoffReading[] readings = [new(400, F0, 1, Q, 1e-3), new(200, F0, 1, Q, 1e-3), new(100, F0, 1, Q, 1e-3)];
        Assert.True(StandoffRegression.TryExtrapolate(readings, StandoffMove.Loop, out StandoffResult result));
        Assert.Equal(0.850, result.F0StandardHz, 1e-3);
    }

    [Fact]
    public void Readings_that_did_not_move_are_refused()
    {
        StandoffReading same = new(1000, F0, 1, Q, 1e-3);
        Assert.False(StandoffRegression.TryExtrapolate([same], StandoffMove.Loop, out _));
        Assert.False(StandoffRegression.TryExtrapolate([same, same], StandoffMove.Loop, out _));
        Assert.False(StandoffRegression.TryExtrapolate([same, same with { Q = double.NaN }], StandoffMove.Loop, out _));
    }

    private static StandoffReading Read(double k, double reactanceOverResistance, int prefactor)
    {
        const double inductance = 22e-3;
        const double loop = 10e-6;
        double omega0 = 2 * Math.PI * F0;
        double capacitance = 1 / (omega0 * omega0 * inductance);
        double resistance = omega0 * inductance / Q;
        double loopResistance = omega0 * loop / reactanceOverResistance;
        double mutual = k * Math.Sqrt(inductance * loop);
        FitPoint[] points = [.. TestCurves.Grid(121, 3, F0, Q).Select(f =>
        {
            double omega = 2 * Math.PI * f;
            var primary = new Complex(loopResistance, omega * loop);
            var secondary = new Complex(resistance, (omega * inductance) - (1 / (omega * capacitance)));
            Complex current = new Complex(0, omega * mutual) / ((primary * secondary) + (omega * mutual * omega * mutual));
            return new FitPoint(f, (current / (omega * capacitance)).Magnitude);
        })];
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions { PrefactorExponent = prefactor });
        return new StandoffReading(fit.PeakAmplitude, fit.F0Hz, 1, fit.Q, 1e-4);
    }
}
