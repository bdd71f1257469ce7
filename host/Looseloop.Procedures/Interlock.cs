using Looseloop.Box;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures;

/// <summary>Tells a box where its own pedestal stands, so that its interlock sees a field of 5 % of the detector's range.</summary>
public static class Interlock
{
    private const double FieldShare = 0.05;

    public static void Set(BoxSession box, DetectorLaw law)
    {
        LimitsAnswer limits = box.Limits();
        int pedestal = Math.Clamp((int)Math.Round(law.PedestalCounts), 0, WireLimits.HighestPedestalCounts);
        box.SetLimits(limits with { PedestalCounts = pedestal, FieldCounts = (int)(FieldShare * (box.Identity.FullCounts - pedestal)) });
    }
}
