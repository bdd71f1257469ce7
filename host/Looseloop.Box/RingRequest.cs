using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>A series of ring-downs.</summary>
/// <param name="Setting">Where to drive.</param>
/// <param name="DriveUs">How long before each stop, microseconds.</param>
/// <param name="DelayUs">From the stop to the first sample, microseconds.</param>
/// <param name="StaggerUs">How much later each repeat begins than the one before, microseconds.</param>
/// <param name="Samples">Samples of one ring, as fast as the box can, 1..64.</param>
/// <param name="Repeats">How many rings, 1..1000.</param>
public sealed record RingRequest(Setting Setting, int DriveUs, int DelayUs, int StaggerUs, int Samples, int Repeats);

/// <summary>One sample of a decay.</summary>
/// <param name="Repeat">Which ring.</param>
/// <param name="SinceStopUs">Time since the drive stopped, microseconds.</param>
/// <param name="Counts">Raw counts.</param>
public readonly record struct DecaySample(int Repeat, long SinceStopUs, int Counts);

/// <summary>What came of a series of rings.</summary>
/// <param name="Samples">Every sample that arrived.</param>
/// <param name="Look">The dark level of the look before it.</param>
public sealed record RingResult(IReadOnlyList<DecaySample> Samples, DarkLevel Look);
