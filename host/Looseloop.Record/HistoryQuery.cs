namespace Looseloop.Record;

/// <summary>Which runs or readings are wanted; everything that is null does not matter. The newest come first.</summary>
public sealed record HistoryQuery
{
    /// <summary>At most so many.</summary>
    public int Limit { get; init; } = 20;

    /// <summary>This coil only.</summary>
    public string? Coil { get; init; }

    /// <summary>This procedure only, such as "log".</summary>
    public string? Procedure { get; init; }

    /// <summary>Notes that contain this, whatever the case.</summary>
    public string? Note { get; init; }

    /// <summary>Not before.</summary>
    public DateTimeOffset? Since { get; init; }

    /// <summary>Not after.</summary>
    public DateTimeOffset? Until { get; init; }
}
