using Looseloop.Readings;

namespace Looseloop.Procedures.Ladder;

/// <summary>The rungs: one frequency at many duties, each at D and at 1 - D.</summary>
public static class LadderPlan
{
    /// <summary>Smallest share of the full amplitude that is asked for.</summary>
    private const double LowestShare = 0.02;

    private const int Rungs = 16;

    /// <summary>
    /// Settings from the smallest duty to 1/2, each followed by its mirror image; taken there and back they lie like a
    /// palindrome in time, so that a steady drift cancels.
    /// </summary>
    /// <param name="at">Where to drive.</param>
    public static IReadOnlyList<Setting> Settings(Setting at)
    {
        int whole = 1 << at.DutyBits;
        var settings = new List<Setting>();
        int last = 0;
        for (int i = 0; i < Rungs; i++)
        {
            // Even in the logarithm at the bottom and in the amplitude at the top: a law bends in either place.
            double t = i / (Rungs - 1.0);
            double share = (0.6 * Math.Pow(LowestShare, 1 - t)) + (0.4 * (LowestShare + ((1 - LowestShare) * t)));
            int count = Math.Max((int)Math.Round(Math.Asin(Math.Min(share, 1)) / Math.PI * whole), 1);
            if (count <= last)
            {
                continue;
            }

            last = count;
            settings.Add(at with { DutyCount = count });
            if (whole - count != count)
            {
                settings.Add(at with { DutyCount = whole - count });
            }
        }

        return settings;
    }
}
