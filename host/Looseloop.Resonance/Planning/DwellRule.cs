namespace Looseloop.Resonance;

/// <summary>
/// How long to wait before a point is read: by then the ring and the detector have forgotten the point before. The remaining bias of
/// an ordered sweep in steps of a tenth of the bandwidth is below 0.0004 of it, even where the detector is as slow as the ring.
/// </summary>
public static class DwellRule
{
    private const double Ordered = 7;
    private const double Jump = 9;

    /// <summary>After a step to a neighbouring setting: 7 (tau + tau_d), seconds.</summary>
    public static double OrderedS(double ringTimeS, double detectorTimeS) => Ordered * (ringTimeS + detectorTimeS);

    /// <summary>After a jump, a change of harmonic or the start: 9 tau, and not less than after a step; seconds.</summary>
    public static double JumpS(double ringTimeS, double detectorTimeS) =>
        Math.Max(Jump * ringTimeS, OrderedS(ringTimeS, detectorTimeS));
}
