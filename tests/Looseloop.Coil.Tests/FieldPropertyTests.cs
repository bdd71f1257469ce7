using CsCheck;

namespace Looseloop.Coil.Tests;

/// <summary>What physics demands of every coil, whatever its dimensions.</summary>
public class FieldPropertyTests
{
    private static readonly Resolution _coarse = new(24, 12, true);

    private static readonly Gen<CoilGeometry> _coils =
        from diameter in Gen.Double[.03, .5]
        from slenderness in Gen.Double[.6, 8]
        from turns in Gen.Double[50, 2000]
        from fill in Gen.Double[.3, 1]
        from height in Gen.Double[.02, 1]
        from kind in Gen.Int[0, 4]
        from size in Gen.Double[.5, 3]
        select Make(diameter, slenderness * diameter, turns, fill, height * diameter + .01, kind, size * diameter);

    private static CoilGeometry Make(double diameter, double length, double turns, double fill, double height, int kind, double size)
    {
        var coil = new CoilGeometry
        {
            Name = "any",
            WindingDiameterM = diameter,
            WindingLengthM = length,
            Turns = turns,
            WireDiameterM = fill * length / turns * .99,
            BaseHeightM = height,
            Ground = kind == 4 ? new Ground(GroundKind.Disc, 2 * diameter, diameter) : Ground.Plane,
        };
        TopLoad[] loads = kind switch
        {
            1 => [new Toroid(size + diameter, .3 * (size + diameter) / 2, (.3 * (size + diameter) / 4) + (.1 * diameter))],
            2 => [new Sphere(size, (size / 2) + (.1 * diameter))],
            3 => [new Disc(size, .2 * diameter), new Sphere(.2 * size, (.2 * diameter) + (.3 * size))],
            _ => [],
        };
        return coil with { TopLoads = loads };
    }

    [Fact]
    public void Every_one_of_them_can_be_built() =>
        _coils.Sample(c => GeometryCheck.Problems(c).Count == 0, iter: 200);

    // A Maxwell capacitance matrix of the conductors (each band of the winding, the top load as one): symmetric, positive definite,
    // every row sum the charge of a conductor when all are at one volt.
    [Fact]
    public void Capacitance_matrix() => _coils.Sample(
        coil =>
        {
            var model = new FieldModel(coil, _coarse);
            int winding = model.WindingBands;
            int live = model.Bands.Count(b => b.Surface >= 0);
            int conductors = live > winding ? winding + 1 : winding;
            double[,] c = new double[conductors, conductors];
            for (int j = 0; j < conductors; j++)
            {
                double[] v = new double[model.Bands.Count];
                v.AsSpan(j, j < winding ? 1 : live - winding).Fill(1);
                double[] q = model.Charges(v);
                for (int i = 0; i < live; i++)
                {
                    c[Math.Min(i, conductors - 1), j] += q[i];
                }
            }

            for (int i = 0; i < conductors; i++)
            {
                double sum = 0;
                for (int j = 0; j < conductors; j++)
                {
                    sum += c[i, j];
                    Assert.Equal(0, (c[i, j] - c[j, i]) / Math.Sqrt(c[i, i] * c[j, j]), 1e-9);
                }

                Assert.True(sum >= 0, $"row {i} sums to {sum} F");
            }

            Assert.True(MathNet.Numerics.LinearAlgebra.Matrix<double>.Build.DenseOfArray(c).Evd().EigenValues.All(e => e.Real > 0));
        },
        iter: 40);

    // Energy: at resonance as much is held by the currents as by the charges.
    [Fact]
    public void Magnetic_energy_equals_electric_energy() => _coils.Sample(
        coil =>
        {
            var model = new FieldModel(coil, _coarse);
            Mode mode = ModeSolver.Lowest(model, 1)[0];
            double[] current = [.. mode.CurrentPerVolt];
            double[] flux = new double[current.Length];
            model.MultiplyInductance(current, flux);
            double magnetic = current.Zip(flux, (i, f) => i * f).Sum();
            return Math.Abs((magnetic / mode.TopCapacitanceF) - 1) < 1e-8;
        },
        iter: 60);

    // Maxwell's equations have no length of their own. By a power of four even the rounding is the same, square roots included.
    [Fact]
    public void Scaling_all_lengths_scales_f1_inversely() => Gen.Select(_coils, Gen.Double[.2, 5]).Sample(
        (coil, s) =>
        {
            double f = Expectations.F1Hz(coil, _coarse);
            Assert.Equal(f, Expectations.F1Hz(coil.Scaled(4), _coarse) * 4);
            Assert.Equal(1, Expectations.F1Hz(coil.Scaled(s), _coarse) * s / f, 1e-9);
        },
        iter: 60);

    [Fact]
    public void Anything_added_at_the_top_lowers_f1() => Gen.Select(_coils, Gen.Double[.01, 50]).Sample(
        (coil, pF) =>
        {
            var model = new FieldModel(coil, _coarse);
            Mode bare = ModeSolver.Lowest(model, 1)[0];
            Mode hung = ModeSolver.Lowest(model, 1, pF * 1e-12)[0];
            // Rayleigh: the true lowering is at least the one with the unloaded coil's own voltage profile, that is, f sqrt(C/(C + Cp)) is
            // an upper bound of the loaded frequency.
            double bound = Probe.WouldReadHz(bare.FrequencyHz, bare.TopCapacitanceF, pF * 1e-12);
            return hung.FrequencyHz < bare.FrequencyHz && hung.FrequencyHz <= bound * (1 + 1e-9);
        },
        iter: 60);

    // M <= sqrt(L1 L2) for any primary around any secondary.
    [Fact]
    public void Coupling_stays_below_one() => Gen.Select(_coils, Gen.Double[1.05, 3], Gen.Double[.5, 12], Gen.Double[0, 90]).Sample(
        (coil, wide, turns, slope) =>
        {
            double pitch = .04 * coil.WindingDiameterM;
            var primary = new PrimaryCoil(new PrimaryGeometry(
                wide * coil.WindingDiameterM, turns, pitch, slope, .6 * pitch, coil.BaseHeightM));
            double k = primary.CouplingTo(coil, turns, Expectations.DirectInductanceH(coil));
            return k is > 0 and < 1;
        },
        iter: 60);

    [Fact]
    public void Loops_are_reciprocal_and_never_beat_their_own_inductance() => Gen.Select(
        Gen.Double[.01, 1], Gen.Double[.01, 1], Gen.Double[-1, 1]).Sample(
        (a, b, d) =>
        {
            d += double.Hypot(a - b, d) < 1e-4 ? 1e-3 : 0;
            double m = Loops.MutualH(a, b, d);
            double wire = Math.Min(1e-4, .4 * double.Hypot(a - b, d));
            double bound = Math.Sqrt(Loops.SelfH(a, wire, 0) * Loops.SelfH(b, wire, 0));
            return Math.Abs((Loops.MutualH(b, a, -d) / m) - 1) < 1e-12 && m > 0 && m < bound;
        },
        iter: 500);
}
