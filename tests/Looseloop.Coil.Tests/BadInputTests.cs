namespace Looseloop.Coil.Tests;

/// <summary>NaN, zero, negative and huge inputs are clear errors everywhere, never a figure.</summary>
public class BadInputTests
{
    public static TheoryData<double> Bad => [double.NaN, double.PositiveInfinity, double.NegativeInfinity, 0, -1, 1e300];

    [Theory]
    [MemberData(nameof(Bad))]
    public void Refused(double x)
    {
        Action[] calls =
        [
            () => CurrentSheet.NagaokaCoefficient(x),
            () => CurrentSheet.InductanceH(x, .48, 1000),
            () => CurrentSheet.InductanceH(.11, x, 1000),
            () => CurrentSheet.InductanceH(.11, .48, x),
            () => HandbookFormulas.LundinH(x, .48, 1000),
            () => HandbookFormulas.Wheeler1928H(.11, x, 1000),
            () => HandbookFormulas.WheelerContinuousH(.11, .48, x),
            () => Loops.MutualH(x, .2, .1),
            () => Loops.SelfH(.1, x, 0),
            () => RoundWireCorrection.ReductionH(x, 10, 1e-3, 1e-3),
            () => FilamentCoil.InductanceH(.1, x, 10, 1e-5),
            () => ConductorCapacitance.OfTorusF(x, .1),
            () => ConductorCapacitance.OfTorusF(.1, x),
            () => Medhurst.SelfCapacitanceF(x, .1),
            () => SkinEffect.DepthM(x),
            () => Medhurst.Phi(1, x),
            () => Probe.WouldReadHz(x, 1e-12, 1e-12),
            () => Probe.WouldReadHz(1e5, x, 1e-12),
            () => Probe.AddedOverOwn(1e5, x),
            () => Probe.LeadF(1, 1e-3, x),
            () => Coupling.FromOpenAndShorted(x, 2e5, 1, 1),
            () => Coupling.FromOpenAndShorted(1e5, x, 1, 1),
            () => Coupling.SplitHz(x, 1e5, .1),
            () => PadMethod.Of(x, 0, 1e5, 1e-12, 1e-4, 0),
            () => PadMethod.Of(2e5, 0, 1e5, x, 1e-4, 0),
            () => DetuningWindow.Exact(x, 100, .9),
            () => DetuningWindow.Exact(1e5, x, .9),
            () => DetuningWindow.Exact(1e5, 100, x),
            () => Tank.CapacitorF(x, 1e-5),
            () => Tank.CapacitorF(1e5, x),
            () => UntunedDrive.Of(x, 1e5, 30, false, .1, 20),
            () => UntunedDrive.Of(1e-5, 1e5, x, false, .1, 20),
            () => new PrimaryCoil(SampleCoil.Spiral with { PitchM = x }).InductanceH(1),
            () => new PrimaryCoil(SampleCoil.Spiral with { Turns = x }).InductanceH(1),
            () => new PrimaryCoil(SampleCoil.Spiral).InductanceH(x),
            () => new PrimaryCoil(SampleCoil.Spiral).TurnsForInductance(x),
        ];
        for (int i = 0; i < calls.Length; i++)
        {
            ArgumentException error = Assert.ThrowsAny<ArgumentException>(calls[i]);
            Assert.Contains("must lie between", error.Message, StringComparison.Ordinal);
        }
    }

    [Theory]
    [MemberData(nameof(Bad))]
    public void Coils_are_refused_by_name(double x)
    {
        (CoilGeometry Coil, string Path)[] coils =
        [
            (SampleCoil.Bare with { WindingDiameterM = x }, "winding_diameter_mm"),
            (SampleCoil.Bare with { WindingLengthM = x }, "winding_length_mm"),
            (SampleCoil.Bare with { Turns = x }, "turns"),
            (SampleCoil.Bare with { WireDiameterM = x }, "wire_diameter_mm"),
            (SampleCoil.Bare with { BaseHeightM = x }, "base_height_mm"),
            (SampleCoil.Bare with { WallDistanceM = x }, "room.wall_distance_mm"),
            (SampleCoil.Bare with { Ground = new Ground(GroundKind.Disc, x, 1) }, "ground.diameter_mm"),
            (SampleCoil.Bare with { TopLoads = [new Toroid(x, .08, .05)] }, "top_load.major_diameter_mm"),
            (SampleCoil.Bare with { TopLoads = [new Toroid(.3, x, .05)] }, "top_load.minor_diameter_mm"),
            (SampleCoil.Bare with { TopLoads = [new Sphere(x, .2)] }, "top_load.diameter_mm"),
            (SampleCoil.Bare with { TopLoads = [new Disc(.2, x)] }, "top_load.height_mm"),
            (SampleCoil.Bare with { Primary = SampleCoil.Spiral with { Turns = x } }, "primary.turns"),
        ];
        foreach ((CoilGeometry coil, string path) in coils)
        {
            ImpossibleGeometryException error = Assert.Throws<ImpossibleGeometryException>(() => Expectations.Of(coil));
            Assert.Contains(error.Problems, p => p.Path == path);
        }
    }

    [Fact]
    public void Readings_the_wrong_way_round_are_told()
    {
        Assert.Contains("check which reading", Assert.Throws<ArgumentException>(() => Coupling.FromOpenAndShorted(2e5, 1e5, 1, 1)).Message, StringComparison.Ordinal);
        Assert.Contains("check which reading", Assert.Throws<ArgumentException>(() => PadMethod.Of(1e5, 0, 2e5, 5e-12, 0, 0)).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => Coupling.FromEqualSplit(2e5, 1e5));
    }

    // A pad whose reading falls further than any capacitance of the coil's own allows.
    [Fact]
    public void Readings_of_two_coils_are_told() =>
        Assert.Contains("without capacitance", Assert.Throws<ArgumentException>(() => PadMethod.Of(2e5, 10e-12, 1e5, 12e-12, 0, 0)).Message, StringComparison.Ordinal);
}
