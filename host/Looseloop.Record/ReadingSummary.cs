using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>The figures of a reading, without its raw points.</summary>
/// <param name="Number">Its number in this record.</param>
/// <param name="Id">Its id.</param>
/// <param name="Run">The number of its run.</param>
/// <param name="RefitOf">The number of the reading that it fits again, or null.</param>
/// <param name="Utc">When it was complete.</param>
/// <param name="Coil">The coil, or null.</param>
/// <param name="Note">The note, or null.</param>
/// <param name="F0Hz">Resonant frequency, hertz; NaN where there is none.</param>
/// <param name="F0RepeatabilityHz">Its standard uncertainty by repeatability, hertz.</param>
/// <param name="F0AbsoluteHz">Its absolute standard uncertainty, hertz.</param>
/// <param name="Q">Quality factor; NaN where there is none.</param>
/// <param name="QRepeatability">Its standard uncertainty by repeatability.</param>
/// <param name="QAbsolute">Its absolute standard uncertainty.</param>
/// <param name="Verdict">How far it may be trusted.</param>
public sealed record ReadingSummary(
    long Number, Guid Id, long Run, long? RefitOf, DateTimeOffset Utc, string? Coil, string? Note, double F0Hz,
    double F0RepeatabilityHz, double F0AbsoluteHz, double Q, double QRepeatability, double QAbsolute, Verdict Verdict);
