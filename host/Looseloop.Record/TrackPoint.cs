using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>One reading of a long log, as little of it as drift needs.</summary>
/// <param name="Number">Its number in this record.</param>
/// <param name="TimeS">
/// Seconds since the first: by the host's monotonic clock where that goes on from one reading to the next, else by UTC.
/// </param>
/// <param name="F0Hz">Resonant frequency, hertz; NaN where there is none.</param>
/// <param name="F0RepeatabilityHz">Its standard uncertainty by repeatability, hertz.</param>
/// <param name="Q">Quality factor; NaN where there is none.</param>
/// <param name="QRepeatability">Its standard uncertainty by repeatability.</param>
/// <param name="TemperatureC">Temperature, degrees Celsius; NaN where there is none.</param>
/// <param name="Verdict">How far the reading may be trusted.</param>
public readonly record struct TrackPoint(
    long Number, double TimeS, double F0Hz, double F0RepeatabilityHz, double Q, double QRepeatability, double TemperatureC,
    Verdict Verdict);
