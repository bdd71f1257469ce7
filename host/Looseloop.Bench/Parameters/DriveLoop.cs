namespace Looseloop.Bench;

/// <summary>The loop at the coil's foot. It is a mesh of its own: it pulls f0 and Q, and bends the drive over frequency.</summary>
public sealed record DriveLoop
{
    /// <summary>Coupling coefficient k to the coil's lowest mode, 0 to 1.</summary>
    public double Coupling { get; init; } = 0.004;

    /// <summary>Its inductance, microhenry.</summary>
    public double InductanceUh { get; init; } = 8;

    /// <summary>All resistance in its mesh, the drive stage's included, ohms.</summary>
    public double ResistanceOhm { get; init; } = 47;
}
