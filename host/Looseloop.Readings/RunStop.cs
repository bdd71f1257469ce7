namespace Looseloop.Readings;

/// <summary>The last document of a run.</summary>
/// <param name="RunId">The run that it ends.</param>
/// <param name="Utc">When it ended.</param>
/// <param name="Status">How.</param>
/// <param name="Reason">Why; one sentence.</param>
/// <param name="Count">How many readings it has.</param>
public sealed record RunStop(Guid RunId, DateTimeOffset Utc, RunStatus Status, string Reason, long Count);
