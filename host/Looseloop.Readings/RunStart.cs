namespace Looseloop.Readings;

/// <summary>The first document of a run. A run is start, then events (readings among them), then stop.</summary>
public sealed record RunStart
{
    /// <summary>Unique on every machine and ordered in time (UUID version 7).</summary>
    public required Guid Id { get; init; }

    public required DateTimeOffset Utc { get; init; }

    /// <summary>What was done, the name of the command: "read", "log", "survey", "standoff", "ladder"...</summary>
    public required string Procedure { get; init; }

    /// <summary>The host program's version.</summary>
    public required string HostVersion { get; init; }

    /// <summary>The box at the start of the run, or null where there was none (figures from a file).</summary>
    public BoxIdentity? Box { get; init; }

    /// <summary>The coil's name, or null where none was given.</summary>
    public string? Coil { get; init; }

    /// <summary>The user's note, or null.</summary>
    public string? Note { get; init; }

    /// <summary>What the user asked for, key and value, such as "every" = "30 s".</summary>
    public IReadOnlyDictionary<string, string> Options { get; init; } = new Dictionary<string, string>();
}
