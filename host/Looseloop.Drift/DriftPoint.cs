namespace Looseloop.Drift;

/// <summary>One reading of a series.</summary>
/// <param name="TimeS">When, seconds from an arbitrary zero.</param>
/// <param name="Value">f0 in hertz, or Q.</param>
/// <param name="Standard">Its standard uncertainty by repeatability, in the value's unit; NaN where unknown.</param>
/// <param name="TemperatureC">Temperature then, degrees Celsius; NaN where unknown.</param>
public readonly record struct DriftPoint(double TimeS, double Value, double Standard, double TemperatureC = double.NaN);
