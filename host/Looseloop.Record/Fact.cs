namespace Looseloop.Record;

/// <summary>Something known of a box or a coil beside its readings. The newest of a kind counts; older ones are kept.</summary>
/// <param name="Id">Unique on every machine (UUID version 7).</param>
/// <param name="Subject">Box or coil.</param>
/// <param name="Name">Which: the box as its user names it (its port), or the coil's name.</param>
/// <param name="Kind">What it says: "detector-law", "clock-trim", "pedestal", "commissioning", "set-up", "pull"...</param>
/// <param name="Utc">When it was found.</param>
/// <param name="HostVersion">The program that found it.</param>
/// <param name="Json">The fact itself, as a JSON object whose form belongs to its kind.</param>
public sealed record Fact(
    Guid Id, FactSubject Subject, string Name, string Kind, DateTimeOffset Utc, string HostVersion, string Json);
