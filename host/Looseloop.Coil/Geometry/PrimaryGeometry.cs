namespace Looseloop.Coil;

/// <summary>A primary of tube or wire, wound as helix, flat spiral or cone: each turn one pitch further out and one rise further up.</summary>
/// <param name="InnerDiameterM">Diameter of the first turn's beginning to the conductor's centre, metres.</param>
/// <param name="Turns">As wound.</param>
/// <param name="PitchM">Step from turn to turn along the winding's slope, metres.</param>
/// <param name="SlopeDegrees">0 for a flat spiral, 90 for a helix, between for a cone.</param>
/// <param name="ConductorDiameterM">Of the tube or wire, metres; below the pitch.</param>
/// <param name="BaseHeightM">Of its beginning above the ground plane, metres.</param>
public sealed record PrimaryGeometry(
    double InnerDiameterM, double Turns, double PitchM, double SlopeDegrees, double ConductorDiameterM, double BaseHeightM)
{
    /// <summary>Tank capacitor, farad, or null where there is none.</summary>
    public double? CapacitorF { get; init; }

    /// <summary>Supply of the driver's bridge, volts, or null.</summary>
    public double? BusVoltageV { get; init; }

    /// <summary>True for a bridge of four switches, false for two.</summary>
    public bool FullBridge { get; init; }

    /// <summary>Radius to which the conductor has come after some turns, metres.</summary>
    public double RadiusM(double turns) => (InnerDiameterM / 2) + (SlopeDegrees >= 90 ? 0 : PitchM * Math.Cos(Slope) * turns);

    /// <summary>Height above the ground plane to which it has come, metres.</summary>
    public double HeightM(double turns) => BaseHeightM + (PitchM * Math.Sin(Slope) * turns);

    /// <summary>Every length multiplied.</summary>
    public PrimaryGeometry Scaled(double factor) => this with
    {
        InnerDiameterM = InnerDiameterM * factor,
        PitchM = PitchM * factor,
        ConductorDiameterM = ConductorDiameterM * factor,
        BaseHeightM = BaseHeightM * factor,
    };

    // cos(90 degrees) is not zero in floating point, and a helix must not drift outwards: see RadiusM.
    private double Slope => SlopeDegrees * Math.PI / 180;
}
