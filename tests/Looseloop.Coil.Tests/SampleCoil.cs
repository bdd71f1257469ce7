namespace Looseloop.Coil.Tests;

/// <summary>The coil of which two independent field models were computed: 110 mm x 480 mm, 1000 turns of .40 mm, base 30 mm up.</summary>
internal static class SampleCoil
{
    public static CoilGeometry Bare { get; } = new()
    {
        Name = "sample",
        WindingDiameterM = 0.110,
        WindingLengthM = 0.480,
        Turns = 1000,
        WireDiameterM = 0.40e-3,
        BaseHeightM = 0.030,
    };

    public static CoilGeometry Loaded { get; } = Bare with { TopLoads = [new Toroid(0.300, 0.080, 0.050)] };

    /// <summary>Eight turns of 6 mm tube, flat, 12 mm apart from a radius of 100 mm, level with the winding's base.</summary>
    public static PrimaryGeometry Spiral { get; } = new(0.200, 8, 0.012, 0, 0.006, 0.030);
}
