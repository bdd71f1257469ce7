namespace Looseloop.Readings;

/// <summary>How much faster a box's clock runs than it should.</summary>
/// <param name="Ppm">Parts per million; true frequency = nominal * (1 + Ppm * 1e-6).</param>
/// <param name="UncertaintyPpm">Standard uncertainty, parts per million.</param>
/// <param name="On">When it was found.</param>
public sealed record ClockTrim(double Ppm, double UncertaintyPpm, DateTimeOffset On);
