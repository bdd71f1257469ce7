using MathNet.Numerics.LinearAlgebra;
using Xunit.Abstractions;

namespace Looseloop.Coil.Tests;

/// <summary>The sample coil's values come from two independent field models, one of them with 1000 single wire rings.</summary>
public class FieldModelTests(ITestOutputHelper output)
{
    private static IReadOnlyList<Mode> Solve(CoilGeometry coil, int n = 160, int m = 64, bool refined = true) =>
        ModeSolver.Lowest(new FieldModel(coil, new Resolution(n, m, refined)), 3);

    [Fact]
    public void Bare_coil()
    {
        IReadOnlyList<Mode> modes = Solve(SampleCoil.Bare);
        Assert.Equal(1, modes[0].FrequencyHz / 382.4e3, .003);
        Assert.Equal(1, modes[1].FrequencyHz / modes[0].FrequencyHz / 2.464, .002);
        Assert.Equal(1, modes[2].FrequencyHz / modes[0].FrequencyHz / 3.611, .002);
        Assert.Equal(8.425e-12, modes[0].TopCapacitanceF, 4e-15);
        Assert.Equal(20.547e-3, modes[0].TopInductanceH, 10e-6);
        Assert.Equal(1, modes[0].BaseInductanceH / 14.79e-3, .005);
    }

    [Fact]
    public void Loaded_coil()
    {
        IReadOnlyList<Mode> modes = Solve(SampleCoil.Loaded);
        Assert.Equal(1, modes[0].FrequencyHz / 268.42e3, .001);
        Assert.Equal(1, modes[1].FrequencyHz / modes[0].FrequencyHz / 3.030, .002);
        Assert.Equal(1, modes[2].FrequencyHz / modes[0].FrequencyHz / 4.775, .002);
        Assert.Equal(15.675e-12, modes[0].TopCapacitanceF, 8e-15);
        Assert.Equal(22.430e-3, modes[0].TopInductanceH, 10e-6);
        Assert.Equal(1, modes[0].BaseInductanceH / 19.88e-3, .003);
    }

    [Fact]
    public void Inductance_and_equivalent_capacitance()
    {
        Assert.Equal(22.5727e-3, Expectations.DirectInductanceH(SampleCoil.Bare), 3e-7);
        Assert.Equal(1, new FieldModel(SampleCoil.Bare, Resolution.Fine).DirectInductanceH / 22.5727e-3, 1e-4);
        Assert.Equal(7.669e-12, Expectations.Of(SampleCoil.Bare).EquivalentCapacitanceF, 4e-15);
        Assert.Equal(15.575e-12, Expectations.Of(SampleCoil.Loaded).EquivalentCapacitanceF, 8e-15);
    }

    [Fact]
    public void Convergence_is_of_first_order_with_even_bands_and_of_second_with_refined_ones()
    {
        double Order(bool refined)
        {
            double a = Solve(SampleCoil.Bare, 50, 4, refined)[0].FrequencyHz;
            double b = Solve(SampleCoil.Bare, 100, 4, refined)[0].FrequencyHz;
            double c = Solve(SampleCoil.Bare, 200, 4, refined)[0].FrequencyHz;
            output.WriteLine($"refined {refined}: {a:F1} {b:F1} {c:F1} Hz");
            return Math.Log2(Math.Abs((b - a) / (c - b)));
        }

        Assert.InRange(Order(false), .6, 1.4);
        Assert.True(Order(true) > 1.8);
        // Richardson's extrapolation of even bands meets refined ones.
        double even = (2 * Solve(SampleCoil.Bare, 400, 4, false)[0].FrequencyHz) - Solve(SampleCoil.Bare, 200, 4, false)[0].FrequencyHz;
        Assert.Equal(1, even / Solve(SampleCoil.Bare)[0].FrequencyHz, 1e-4);
        Assert.Equal(382.48e3, even, 60.0);
    }

    // What the plane costs, by the independent model: a plane that also stops the magnetic field; a 600 mm disc with the floor below.
    [Theory]
    [InlineData(false, GroundKind.Sheet, 0, 1.28)]
    [InlineData(true, GroundKind.Sheet, 0, 1.01)]
    [InlineData(false, GroundKind.Disc, .5, .97)]
    [InlineData(false, GroundKind.Disc, 1, 1.23)]
    [InlineData(false, GroundKind.Disc, 3, 1.53)]
    [InlineData(true, GroundKind.Disc, .5, 1.46)]
    [InlineData(true, GroundKind.Disc, 1, 1.90)]
    [InlineData(true, GroundKind.Disc, 3, 2.44)]
    public void Other_grounds(bool loaded, GroundKind kind, double aboveFloorM, double percent)
    {
        CoilGeometry coil = loaded ? SampleCoil.Loaded : SampleCoil.Bare;
        CoilGeometry other = coil with { Ground = new Ground(kind, .6, aboveFloorM) };
        double change = 100 * ((Solve(other)[0].FrequencyHz / Solve(coil)[0].FrequencyHz) - 1);
        Assert.Equal(percent, change, .03);
    }

    [Fact]
    public void A_sheet_lowers_the_inductance() => Assert.Equal(
        -1.77,
        100 * ((new FieldModel(SampleCoil.Bare with { Ground = new Ground(GroundKind.Sheet) }, Resolution.Fine).DirectInductanceH / 22.5727e-3) - 1),
        .02);

    // Two-capacitor method on the model: bare with 1 pF 20.78 mH and 8.32 pF; with the toroid and 5 pF 22.46 mH and 15.65 pF.
    [Theory]
    [InlineData(false, 1e-12, 20.78e-3, 8.32e-12)]
    [InlineData(true, 5e-12, 22.46e-3, 15.65e-12)]
    public void Two_capacitors_on_the_model(bool loaded, double addedF, double expectedH, double expectedF)
    {
        var model = new FieldModel(loaded ? SampleCoil.Loaded : SampleCoil.Bare, Resolution.Fine);
        double without = ModeSolver.Lowest(model, 1)[0].FrequencyHz;
        double with = ModeSolver.Lowest(model, 1, addedF)[0].FrequencyHz;
        PadMethod pad = PadMethod.Of(without, 0, with, addedF, 1e-5, 0);
        Assert.Equal(1, pad.InductanceH / expectedH, 1e-3);
        Assert.Equal(1, pad.CapacitanceF / expectedF, 1.5e-3);
        Assert.Equal(!loaded, pad.LooksBare);
    }

    // The same matrices through MathNet's dense symmetric solver: no Lanczos, no shared factorisation.
    [Fact]
    public void MathNet_finds_the_same_resonances()
    {
        var model = new FieldModel(SampleCoil.Loaded, new Resolution(60, 24, true));
        int n = model.WindingBands;
        Matrix<double> b = Matrix<double>.Build.Dense(n, n);
        Matrix<double> a = Matrix<double>.Build.Dense(n, n);
        double[] scratch = new double[model.ScratchLength];
        double[] column = new double[n];
        for (int j = 0; j < n; j++)
        {
            double[] unit = new double[n];
            unit[j] = 1;
            model.MultiplyCapacitance(unit, column, scratch, 0);
            b.SetColumn(j, column);
            model.MultiplyInductance(unit, column);
            a.SetColumn(j, column);
        }

        // a = D^-1 M D^-T, D^-1 a lower triangle of ones.
        Matrix<double> sum = Matrix<double>.Build.Dense(n, n, (i, j) => j <= i ? 1 : 0);
        a = sum * a * sum.Transpose();
        Matrix<double> l = ((b + b.Transpose()) / 2).Cholesky().Factor;
        Matrix<double> symmetric = l.Transpose() * a * l;
        Vector<double> values = ((symmetric + symmetric.Transpose()) / 2).Evd(Symmetricity.Symmetric).EigenValues.Real();
        IReadOnlyList<Mode> modes = ModeSolver.Lowest(model, 3);
        for (int i = 0; i < 3; i++)
        {
            double expected = 1 / (2 * Math.PI * Math.Sqrt(values[n - 1 - i]));
            Assert.Equal(1, modes[i].FrequencyHz / expected, 1e-9);
        }
    }
}

internal static class MathNetExtensions
{
    public static Vector<double> Real(this Vector<System.Numerics.Complex> values) => values.Map(v => v.Real);
}
