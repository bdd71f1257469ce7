namespace Looseloop.Coil;

/// <summary>What the base of the coil is earthed to.</summary>
public enum GroundKind
{
    /// <summary>A wide earthed floor: it ends the electric field, and lets the magnetic field pass (mesh, foil strips, damp concrete).</summary>
    Plane,

    /// <summary>A wide sheet of metal: it ends both fields.</summary>
    Sheet,

    /// <summary>An earthed disc of limited size, with the floor some way below.</summary>
    Disc,
}

/// <summary>The ground of a coil.</summary>
/// <param name="Kind">Which of the three.</param>
/// <param name="DiameterM">The disc's diameter, metres; not used by the others.</param>
/// <param name="AboveFloorM">The disc's height above the floor, metres; not used by the others.</param>
public sealed record Ground(GroundKind Kind, double DiameterM = 0, double AboveFloorM = 0)
{
    /// <summary>A wide earthed floor.</summary>
    public static Ground Plane { get; } = new(GroundKind.Plane);

    /// <summary>Its word in a coil file.</summary>
    public string Word => Kind switch { GroundKind.Plane => "plane", GroundKind.Sheet => "sheet", _ => "disc" };

    /// <summary>Every length multiplied.</summary>
    public Ground Scaled(double factor) => this with { DiameterM = DiameterM * factor, AboveFloorM = AboveFloorM * factor };
}
