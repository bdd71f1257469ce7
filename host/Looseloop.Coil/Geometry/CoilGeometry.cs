namespace Looseloop.Coil;

/// <summary>A secondary as it stands: its winding, what it stands on and what stands on it. Lengths in metres.</summary>
public sealed record CoilGeometry
{
    /// <summary>The coil's name.</summary>
    public required string Name { get; init; }

    /// <summary>The user's remark, or null.</summary>
    public string? Note { get; init; }

    /// <summary>Diameter of the winding to the wire's centre, metres.</summary>
    public required double WindingDiameterM { get; init; }

    /// <summary>Length of the winding, turns times pitch, metres.</summary>
    public required double WindingLengthM { get; init; }

    /// <summary>Number of turns; a part of a turn is allowed.</summary>
    public required double Turns { get; init; }

    /// <summary>Diameter of the bare conductor, metres.</summary>
    public required double WireDiameterM { get; init; }

    /// <summary>Height of the first turn above the ground plane, metres.</summary>
    public required double BaseHeightM { get; init; }

    /// <summary>What the winding is wound on.</summary>
    public Former Former { get; init; } = Former.Unknown;

    /// <summary>What the base is earthed to.</summary>
    public Ground Ground { get; init; } = Ground.Plane;

    /// <summary>Everything at the potential of the winding's top; empty for a bare coil.</summary>
    public IReadOnlyList<TopLoad> TopLoads { get; init; } = [];

    /// <summary>Distance to the nearest wall, metres, or null. It only widens the stated uncertainty.</summary>
    public double? WallDistanceM { get; init; }

    /// <summary>Height of the ceiling above the ground plane, metres, or null. It only widens the stated uncertainty.</summary>
    public double? CeilingHeightM { get; init; }

    /// <summary>The primary that belongs to it, or null.</summary>
    public PrimaryGeometry? Primary { get; init; }

    /// <summary>
    /// Half-widths of tolerance stated by the user, by the path of the dimension and in its own unit; others take the default
    /// of <see cref="Dimension.DefaultTolerance"/>.
    /// </summary>
    public IReadOnlyDictionary<string, double> Tolerances { get; init; } = new Dictionary<string, double>();

    /// <summary>Distance of neighbouring turns, metres.</summary>
    public double PitchM => WindingLengthM / Turns;

    /// <summary>Height of the winding's top above the ground plane, metres.</summary>
    public double TopHeightM => BaseHeightM + WindingLengthM;

    /// <summary>Every length multiplied; the number of turns stays.</summary>
    public CoilGeometry Scaled(double factor) => this with
    {
        WindingDiameterM = WindingDiameterM * factor,
        WindingLengthM = WindingLengthM * factor,
        WireDiameterM = WireDiameterM * factor,
        BaseHeightM = BaseHeightM * factor,
        Ground = Ground.Scaled(factor),
        TopLoads = [.. TopLoads.Select(load => load.Scaled(factor))],
        WallDistanceM = WallDistanceM * factor,
        CeilingHeightM = CeilingHeightM * factor,
        Primary = Primary?.Scaled(factor),
    };
}
