using System.Numerics;
using Looseloop.Bench.Physics;

namespace Looseloop.Bench.Tests;

/// <summary>Pull of f0 and Q against the exact two-mesh values of section E of the project's measurement notes.</summary>
public class MeshTests
{
    private static World OneMode(double f0Hz, double q, double k, double loopReactanceRatio) => new()
    {
        Coil = new VirtualCoil { Modes = [new CoilMode(f0Hz, q)] },
        Loop = new DriveLoop { Coupling = k, InductanceUh = 8, ResistanceOhm = 2 * Math.PI * f0Hz * 8e-6 / loopReactanceRatio },
        Pickup = new PickupAntenna { PullPfPerPf = 0 },
        FeedThrough = new FeedThrough { Fraction = 0 },
    };

    [Fact]
    public void ALoopPullsThePeakAsTheExactTwoMeshSolutionSays()
    {
        // k = .02, X = 18.26, Q = 200: peak +193.17 ppm, Q 199.09 (section E, two-mesh exact).
        World world = OneMode(250e3, 200, 0.02, 18.26);
        var poles = Poles.Of(Meshes.Loaded(world), PickupSense.Voltage);
        double peakHz = PeakHz(poles, 250e3, out double halfPowerQ);
        Assert.Equal(193.17, ((peakHz / 250e3) - 1) * 1e6, 0.02);
        Assert.Equal(199.09, halfPowerQ, 0.01);

        // The pole itself carries no prefactor: 199.40 ppm by the formula, which is first-order for Q (199.13).
        Truth truth = Truth.Loaded(world);
        Assert.Equal(199.40, ((truth.F0Hz / 250e3) - 1) * 1e6, 0.1);
        Assert.Equal(199.09, truth.Q, 0.01);
    }

    [Fact]
    public void PullExtrapolatedToNoCouplingVanishes()
    {
        // K 24: k = .03, .015, .0075, a shorted loop: readings +449.0, +112.2, +28.1 ppm, intercept 0.0 +- .05 ppm.
        double[] couplings = [0.03, 0.015, 0.0075];
        double[] expectedPpm = [449.0, 112.2, 28.1];
        double[] x = new double[3];
        double[] y = new double[3];
        for (int i = 0; i < 3; i++)
        {
            World world = OneMode(250e3, 200, couplings[i], 18.26);
            y[i] = ((Truth.Loaded(world).F0Hz / 250e3) - 1) * 1e6;
            x[i] = couplings[i] * couplings[i];
            Assert.Equal(expectedPpm[i], y[i], 0.25);
        }

        Assert.Equal(0, Intercept(x, y), 0.05);
    }

    [Fact]
    public void TheWorstLossOfQIsHalfOfCouplingSquared()
    {
        // X = 1: d(1/Q) = k^2/2 and df/f = k^2/4 to first order in k^2 and 1/Q (Terman 1943, from memory).
        Truth truth = Truth.Loaded(OneMode(250e3, 250, 0.005, 1));
        Assert.Equal(0.005 * 0.005 / 2, (1 / truth.Q) - (1 / 250.0), 1e-7);
        Assert.Equal(0.005 * 0.005 / 4, (truth.F0Hz / 250e3) - 1, 1e-7);
    }

    [Fact]
    public void AnAntennaPullsByItsCapacitance()
    {
        // Section E: .02 pF on 15.6 pF is -640 ppm, f = f00 sqrt(C / (C + dC)).
        double farad = 15.6e-12;
        double f0Hz = 268.4e3;
        double henry = 1 / (Math.Pow(2 * Math.PI * f0Hz, 2) * farad);
        World world = OneMode(f0Hz, 250, 1e-6, 1) with
        {
            Coil = new VirtualCoil { InductanceMh = henry * 1e3, Modes = [new CoilMode(f0Hz, 250)] },
            Pickup = new PickupAntenna { CouplingPf = 0.02 },
        };
        Assert.Equal(Math.Sqrt(15.6 / 15.62), Truth.Loaded(world).F0Hz / f0Hz, 1e-9);
        Assert.Equal(-640e-6, (Truth.Loaded(world).F0Hz / f0Hz) - 1, 1.5e-6);
        Assert.Equal(f0Hz, Truth.Unloaded(world).F0Hz, 1e-6);
        Assert.Equal(250, Truth.Unloaded(world).Q, 1e-9);
    }

    [Fact]
    public void ACoupledPrimarySplitsTheResponse()
    {
        // K 51: 250 kHz and 260 kHz at k = .12 give 240.154662 and 272.628960 kHz (no losses).
        World world = OneMode(250e3, 1e7, 1e-9, 1) with
        {
            Room = new Room { Neighbours = [new Neighbour { F0Hz = 260e3, Q = 1e7, CouplingToCoil = 0.12 }] },
        };
        var poles = Poles.Of(Meshes.Unloaded(world), PickupSense.Voltage);
        double[] hertz = [.. poles.Pole.Select(p => p.Magnitude / (2 * Math.PI)).Order()];
        Assert.Equal(240154.662, hertz[0], 0.01);
        Assert.Equal(272628.960, hertz[1], 0.01);
    }

    [Fact]
    public void AClosedTurnRaisesTheFrequency()
    {
        // Section I: k = sqrt(1 - (f_open/f_short)^2); 250 and 253.2 kHz give .158483.
        World world = OneMode(250e3, 1e6, 1e-9, 1) with
        {
            Room = new Room { Neighbours = [new Neighbour { F0Hz = 0, Q = 1e7, CouplingToCoil = 0.158483 }] },
        };
        Assert.Equal(253.2e3, Truth.Unloaded(world).F0Hz, 1);
    }

    [Fact]
    public void PolesAndResiduesAreThoseOfTheMeshes()
    {
        // The partial fractions must equal a direct solution of the mesh equations at any frequency.
        var world = new World
        {
            Room = new Room
            {
                Neighbours =
                [
                    new Neighbour { F0Hz = 152e3, Q = 90, CouplingToCoil = 0.01, CouplingToLoop = 0.02, PickupShare = 0.1 },
                    new Neighbour { F0Hz = 0, Q = 30, CouplingToCoil = 0.05, CouplingToLoop = 0.01 },
                ],
            },
            Loop = new DriveLoop { Coupling = 0.05 },
        };
        var meshes = Meshes.Loaded(world);
        var poles = Poles.Of(meshes, PickupSense.Voltage);
        foreach (double hertz in new[] { 50e3, 149e3, 150.3e3, 418.5e3, 2e6 })
        {
            var s = new Complex(0, 2 * Math.PI * hertz);
            Complex direct = Solve(meshes, s);
            Complex fractions = poles.At(s.Imaginary);
            Assert.True((direct - fractions).Magnitude < 1e-9 * direct.Magnitude, $"{hertz}: {direct} {fractions}");
        }
    }

    private static Complex Solve(Meshes meshes, Complex s)
    {
        int n = meshes.Count;
        var matrix = new Complex[n, n];
        meshes.Fill(s, matrix, new Complex[n, n]);
        var rows = MathNet.Numerics.LinearAlgebra.Matrix<Complex>.Build.DenseOfArray(matrix);
        var right = MathNet.Numerics.LinearAlgebra.Vector<Complex>.Build.Dense(n);
        right[meshes.Loop] = 1;
        var currents = rows.Solve(right);
        Complex sum = 0;
        for (int i = 0; i < n; i++)
        {
            sum += meshes.Sees(i) * currents[i] / s;
        }

        return sum;
    }

    private static double PeakHz(Poles poles, double nearHz, out double halfPowerQ)
    {
        double Size(double hertz) => poles.At(2 * Math.PI * hertz).Magnitude;
        double low = nearHz * 0.995;
        double high = nearHz * 1.005;
        for (int i = 0; i < 200; i++)
        {
            double a = low + ((high - low) / 3);
            double b = high - ((high - low) / 3);
            if (Size(a) < Size(b))
            {
                low = a;
            }
            else
            {
                high = b;
            }
        }

        double peak = (low + high) / 2;
        double half = Size(peak) / Math.Sqrt(2);
        double up = Bisect(f => Size(f) - half, peak, peak * 1.02);
        double down = Bisect(f => half - Size(f), peak * 0.98, peak);
        halfPowerQ = peak / (up - down);
        return peak;
    }

    private static double Bisect(Func<double, double> falling, double low, double high)
    {
        for (int i = 0; i < 100; i++)
        {
            double middle = (low + high) / 2;
            if (falling(middle) > 0)
            {
                low = middle;
            }
            else
            {
                high = middle;
            }
        }

        return (low + high) / 2;
    }

    private static double Intercept(double[] x, double[] y)
    {
        (double intercept, _) = MathNet.Numerics.LinearRegression.SimpleRegression.Fit(x, y);
        return intercept;
    }
}
