using Looseloop.Readings;

namespace Looseloop.Procedures.Standoff;

/// <summary>What a standoff found.</summary>
/// <param name="Pull">The pull at the usual places, or null where the readings do not give it.</param>
/// <param name="PickupPullHz">What the pickup does to f0 at its usual place, hertz.</param>
/// <param name="PickupStandardHz">Its standard uncertainty.</param>
/// <param name="LoopPullHz">What the loop does to f0 at its usual place, hertz.</param>
/// <param name="LoopStandardHz">Its standard uncertainty.</param>
/// <param name="PickupMisfit">Scatter about the pickup's line over what the readings state, 1 or more.</param>
/// <param name="LoopMisfit">The same of the loop's lines.</param>
/// <param name="Why">Why there is no pull; null where there is one.</param>
public sealed record StandoffFinding(
    Pull? Pull, double PickupPullHz, double PickupStandardHz, double LoopPullHz, double LoopStandardHz,
    double PickupMisfit, double LoopMisfit, string? Why)
{
    public static StandoffFinding Refused(string why) =>
        new(null, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, why);
}
