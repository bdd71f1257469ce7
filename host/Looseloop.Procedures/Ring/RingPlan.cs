using Looseloop.Box;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures.Ring;

/// <summary>How a decay is sampled: many repeats, each beginning a little later, so that the samples lie between one another.</summary>
public static class RingPlan
{
    /// <summary>A box sends so many pairs in one line; more would cost more time on the wire than another repeat.</summary>
    private const int MostSamples = 15;
    private const int LeastSamples = 4;

    /// <summary>Ring times of drive: the level need not be settled, only the same each time.</summary>
    private const double RingsOfDrive = 6;

    /// <summary>Detector times until its memory of the drive is below the ring: the rest is in the model.</summary>
    private const double DetectorTimesToWait = 3;

    /// <summary>Ring times that are followed.</summary>
    public const double RingsFollowed = 4.5;

    /// <summary>Plans for a ring time.</summary>
    /// <param name="setting">Where to drive.</param>
    /// <param name="tauS">The ring time, about, seconds.</param>
    /// <param name="followS">How long to follow it from the stop, seconds.</param>
    /// <param name="law">The detector's law, for its time constant.</param>
    /// <param name="sampleS">From sample to sample, seconds.</param>
    /// <param name="repeats">How many rings.</param>
    public static RingRequest For(Setting setting, double tauS, double followS, DetectorLaw law, double sampleS, int repeats)
    {
        double beginS = DetectorTimesToWait * law.TimeConstantS;
        double endS = beginS + followS;
        int samples = (int)Math.Clamp(Math.Ceiling((endS - beginS) / sampleS), LeastSamples, MostSamples);

        // At least one sample interval of stagger, so that every delay is met.
        double staggerS = Math.Max(endS - beginS - (samples * sampleS), sampleS) / repeats;
        int delayUs = (int)Math.Round(beginS * 1e6);
        int staggerUs = (int)Math.Clamp(Math.Round(staggerS * 1e6), 1, (WireLimits.LongestRingDelayUs - delayUs) / repeats);
        int driveUs = (int)Math.Clamp(1e6 * ((RingsOfDrive * tauS) + (4 * law.TimeConstantS)), 1000, WireLimits.LongestDwellUs);
        return new RingRequest(setting, driveUs, delayUs, staggerUs, samples, repeats);
    }
}
