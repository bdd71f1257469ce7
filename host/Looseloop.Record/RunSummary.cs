using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>A run at a glance.</summary>
/// <param name="Number">Its number in this record.</param>
/// <param name="Id">Its id.</param>
/// <param name="Utc">When it began.</param>
/// <param name="Procedure">What was done.</param>
/// <param name="Coil">The coil, or null.</param>
/// <param name="Note">The note, or null.</param>
/// <param name="Stop">How it ended, or null while it goes on.</param>
/// <param name="Count">How many readings it has.</param>
/// <param name="Last">Its last reading, or null where it has none.</param>
public sealed record RunSummary(
    long Number, Guid Id, DateTimeOffset Utc, string Procedure, string? Coil, string? Note, RunStop? Stop, long Count,
    ReadingSummary? Last);
