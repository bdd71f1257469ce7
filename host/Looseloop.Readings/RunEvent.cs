namespace Looseloop.Readings;

/// <summary>Something that happened in a run beside a reading.</summary>
public sealed record RunEvent
{
    /// <summary>Unique on every machine and ordered in time (UUID version 7).</summary>
    public required Guid Id { get; init; }

    public required Guid RunId { get; init; }

    /// <summary>When it was noticed.</summary>
    public required DateTimeOffset Utc { get; init; }

    /// <summary>The host's monotonic clock at that moment, seconds from an arbitrary zero; NaN where unknown.</summary>
    public double MonotonicS { get; init; } = double.NaN;

    public required RunEventKind Kind { get; init; }

    /// <summary>Begin of what it speaks of (a gap, a pause), or null.</summary>
    public DateTimeOffset? From { get; init; }

    /// <summary>Its end, or null.</summary>
    public DateTimeOffset? To { get; init; }

    /// <summary>What was seen, with figures and units; one sentence.</summary>
    public required string Detail { get; init; }
}
