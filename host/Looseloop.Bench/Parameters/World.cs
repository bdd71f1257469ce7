namespace Looseloop.Bench;

/// <summary>
/// Everything that a virtual bench consists of: a coil, what stands around it, and the box that looks at it. Immutable; a
/// change is a copy (<c>with</c>). What is not set is an ordinary, harmless value. <see cref="Truth"/> says what a perfect
/// instrument would find.
/// </summary>
public sealed record World
{
    /// <summary>Short name, as a user would type it.</summary>
    public string Name { get; init; } = "unnamed";

    /// <summary>What the coil is and what a reading of it should show, in a few sentences.</summary>
    public string About { get; init; } = "";

    public VirtualCoil Coil { get; init; } = new();

    public DriveLoop Loop { get; init; } = new();

    public DriveStage Drive { get; init; } = new();

    public PickupAntenna Pickup { get; init; } = new();

    public FeedThrough FeedThrough { get; init; } = new();

    public Room Room { get; init; } = new();

    public DetectorParameters Detector { get; init; } = new();

    public ConverterParameters Converter { get; init; } = new();

    public BoardParameters Board { get; init; } = new();
}
