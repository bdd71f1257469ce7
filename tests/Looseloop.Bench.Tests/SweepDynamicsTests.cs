using System.Numerics;
using Looseloop.Bench.Physics;

namespace Looseloop.Bench.Tests;

/// <summary>
/// Ring-up, ring-down and the detector's lag against the sweep-bias tables of section C of the measurement notes, which
/// were computed from tau da/dt = -(1 + jx) a + 1 and tau_d dy/dt = |a| - y.
/// </summary>
public class SweepDynamicsTests
{
    private const double F0Hz = 250e3;

    // So narrow that the exact resonance and the tables' narrow-band form are the same.
    private const double Q = 50_000;

    private static World Bare(DetectorKind kind, double timeConstantS) => new()
    {
        Coil = new VirtualCoil { Modes = [new CoilMode(F0Hz, Q)] },
        Loop = new DriveLoop { Coupling = 1e-6, InductanceUh = 1, ResistanceOhm = 1000 },
        Pickup = new PickupAntenna { PullPfPerPf = 0, Gain = 1000 },
        Drive = new DriveStage { Harmonics = 1 },
        FeedThrough = new FeedThrough { Fraction = 0 },
        Detector = new DetectorParameters { Kind = kind, TimeConstantUs = timeConstantS * 1e6, FloorMv = 0, PedestalVolts = 0, Gain = 1 },
    };

    [Fact]
    public void TheRingDiesWithTheTextbookTime()
    {
        // K 16: Q 200 at 250 kHz rings for 254.647909 us.
        World world = Bare(DetectorKind.RmsLinear, 0) with { Coil = new VirtualCoil { Modes = [new CoilMode(F0Hz, 200)] } };
        var scene = new Scene(world, 1);
        scene.Drive(0, F0Hz, 0.5);
        scene.Stop(0.01);
        double first = scene.DetectorVolts(0.0101);
        double second = scene.DetectorVolts(0.0106);
        Assert.Equal(254.647909, 500 / Math.Log(first / second), 1e-4);
    }

    [Fact]
    public void AResponseRunsOnThroughEveryChange()
    {
        // The coil's charge cannot jump: whatever is switched, the waveform is continuous (15 harmonics: to their remainder).
        World world = Bare(DetectorKind.RmsLinear, 0) with
        {
            Coil = new VirtualCoil { Modes = [new CoilMode(F0Hz, 40), new CoilMode(3.03 * F0Hz, 30)] },
            Drive = new DriveStage { Harmonics = 40 },
        };
        var response = new CoilResponse(world);
        response.Set(0, F0Hz, 0.3, 0);
        double[] changes = [11.3e-6, 47.9e-6, 90e-6, 133.33e-6];
        double size = 0;
        for (int i = 0; i < changes.Length; i++)
        {
            double before = response.Waveform(changes[i]);
            size = Math.Max(size, Math.Abs(before));
            if (i == 2)
            {
                response.Stop(changes[i]);
            }
            else
            {
                response.Set(changes[i], F0Hz * (1 + (0.01 * i)), 0.5 - (0.1 * i), 0);
            }

            Assert.Equal(before, response.Waveform(changes[i]), 2e-3 * size);
        }
    }

    [Theory]
    [InlineData(0.05, 1, 0, 0.0259, -0.0031, 5e-5)]
    [InlineData(0.1, 2, 0, 0.00943, -0.00225, 2e-5)] // K 17
    [InlineData(0.1, 3, 0, 0.00175, -0.00045, 2e-5)]
    [InlineData(0.1, 5, 0, 0.00005, -0.00002, 2e-5)]
    [InlineData(0.2, 2, 0, 0.01805, -0.00824, 3e-5)]
    public void AnUpwardSweepMovesTheFit(double step, double dwell, double lag, double f0Bias, double qBias, double tolerance)
    {
        (double f0, double q) = Sweep(DetectorKind.RmsLinear, step, dwell, lag);
        Assert.Equal(f0Bias, f0, tolerance);
        Assert.Equal(qBias, q, tolerance);
    }

    [Theory]
    [InlineData(0.1, 3, 0.5, 0.00625, double.NaN, 3e-5)]
    [InlineData(0.1, 3, 1, 0.01863, -0.00416, 3e-5)] // K 18
    [InlineData(0.1, 5, 1, 0.00265, -0.00070, 3e-5)]
    [InlineData(0.1, 10, 1, 0.00002, 0, 2e-5)]
    [InlineData(0.1, 5, 2, 0.01573, double.NaN, 5e-5)]
    public void ALaggingDetectorMovesTheFitFurther(double step, double dwell, double lag, double f0Bias, double qBias, double tolerance)
    {
        (double f0, double q) = Sweep(DetectorKind.MeanAbsolute, step, dwell, lag);
        Assert.Equal(f0Bias, f0, tolerance);
        if (!double.IsNaN(qBias))
        {
            Assert.Equal(qBias, q, tolerance);
        }
    }

    [Theory]
    [InlineData(5, 0.077, -0.066)]
    [InlineData(10, 0.030, -0.023)]
    [InlineData(20, 0.008, -0.006)]
    public void APeakDetectorThatFallsSlowlyCostsQ(double dwell, double f0Bias, double qBias)
    {
        // Section C: attack .1 and decay 10 ring times, step .1 bandwidths; figures of two digits.
        double ringUs = Q / (Math.PI * F0Hz) * 1e6;
        World world = Bare(DetectorKind.Peak, 0.1 * ringUs * 1e-6);
        world = world with { Detector = world.Detector with { DecayUs = 10 * ringUs } };
        (double f0, double q) = Sweep(world, 0.1, dwell, 1);
        Assert.Equal(f0Bias, f0, 0.0015);
        Assert.Equal(qBias, q, 0.0015);
    }

    // step in bandwidths, dwell and lag in ring times; one sample at the end of each dwell.
    private static (double F0Bias, double QBias) Sweep(DetectorKind kind, double step, double dwell, double lag) =>
        Sweep(Bare(kind, lag * Q / (Math.PI * F0Hz)), step, dwell, lag);

    private static (double F0Bias, double QBias) Sweep(World world, double step, double dwell, double lag)
    {
        double ringS = Q / (Math.PI * F0Hz);
        double widthHz = F0Hz / Q;
        var scene = new Scene(world, 1);
        var u = new double[(int)Math.Round(5 / step) + 1];
        var y = new double[u.Length];
        double timeS = 0;
        scene.Drive(timeS, F0Hz - (2.5 * widthHz), 0.5);
        timeS += 100 * ringS * (1 + lag);
        for (int i = 0; i < u.Length; i++)
        {
            u[i] = -2.5 + (i * step);
            scene.Drive(timeS, F0Hz + (u[i] * widthHz), 0.5, scene.Response.PhaseAt(timeS));
            timeS += dwell * ringS;
            y[i] = scene.DetectorVolts(timeS);
        }

        double[] fit = CurveFit.Resonance(u, y);
        return (fit[0], (1 / fit[1]) - 1);
    }
}
