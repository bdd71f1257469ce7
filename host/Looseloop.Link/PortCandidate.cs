namespace Looseloop.Link;

/// <summary>A port behind which a box may be.</summary>
/// <param name="Name">What to open: the name that stays with the adapter where there is one, else the device.</param>
/// <param name="Device">The device itself, such as /dev/ttyUSB0; equal to <paramref name="Name"/> where it has no other.</param>
public sealed record PortCandidate(string Name, string Device);
