using Looseloop.Readings;

namespace Looseloop.Procedures.Detector;

/// <summary>Where a detector's zero stands, as far as can be told with the drive off.</summary>
public static class Pedestal
{
    /// <summary>Standard uncertainty of a pedestal that nobody has measured, counts: noise and weak carriers hide in it.</summary>
    private const double Unmeasured = 4;

    /// <summary>
    /// A law with its pedestal settled by a look. A pedestal that is not known (NaN), or that stands above what was seen with
    /// the drive off, is taken from the look: the level with nothing there cannot be above the level with something there.
    /// </summary>
    public static DetectorLaw Settle(DetectorLaw law, DarkLevel look)
    {
        bool known = double.IsFinite(law.PedestalCounts) && look.Mean > law.PedestalCounts - (3 * law.PedestalUncertainty);
        return known ? law : law with { PedestalCounts = look.Mean, PedestalUncertainty = Unmeasured };
    }
}
