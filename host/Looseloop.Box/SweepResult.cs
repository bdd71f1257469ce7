using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>What came of a sweep.</summary>
/// <param name="Points">The points in the order they were measured; those asked for again stand at the end.</param>
/// <param name="Look">The dark level of the look before it.</param>
/// <param name="Missing">How many points could not be had.</param>
public sealed record SweepResult(IReadOnlyList<RawPoint> Points, DarkLevel Look, int Missing);
