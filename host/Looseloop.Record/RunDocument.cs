using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>A run's own documents, without its readings.</summary>
/// <param name="Number">Its number in this record.</param>
/// <param name="Start">The first document.</param>
/// <param name="Events">What happened, in order.</param>
/// <param name="Stop">The last document, or null while the run goes on.</param>
/// <param name="StopAssumed">True where the run was found without a stop and closed as interrupted.</param>
public sealed record RunDocument(long Number, RunStart Start, IReadOnlyList<RunEvent> Events, RunStop? Stop, bool StopAssumed);
