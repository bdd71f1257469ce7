namespace Looseloop.Readings;

/// <summary>What loop, pickup and people change in a reading, found by a standoff for one coil and set-up.</summary>
/// <param name="F0Relative">(read f0 - f0 without them) / f0.</param>
/// <param name="F0Uncertainty">Its standard uncertainty.</param>
/// <param name="LossAdded">(1/Q as read) - (1/Q without them).</param>
/// <param name="LossUncertainty">Its standard uncertainty.</param>
/// <param name="On">When it was found.</param>
public sealed record Pull(double F0Relative, double F0Uncertainty, double LossAdded, double LossUncertainty, DateTimeOffset On);
