using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Checks;

/// <summary>Whether the same comes out again: on the way back, at another duty, after a longer dwell.</summary>
public static class RepeatCheck
{
    private const double Sigmas = 4;

    public static IEnumerable<Reason> Reasons(Measurement measurement)
    {
        if (Differ(measurement.There, measurement.Back, 0.02, 0.02) is string drift)
        {
            yield return new Reason(ReasonCode.Drift, $"The way back read otherwise than the way there: {drift}.");
        }

        // Beside a vernier the fundamental's settings alone may be too few to tell anything.
        bool tells = !measurement.Plan.UsesVernier || (measurement.OtherDutyFit.IsFitted && measurement.OtherDutyFit.QRelativeStandard < 0.1);
        if (tells && Differ(measurement.Fit, measurement.OtherDutyFit, 0.02, 0.015) is string duty)
        {
            yield return new Reason(ReasonCode.HarmonicsAtDetector, $"At duty {measurement.OtherDuty:0.00} it reads otherwise: {duty}.");
        }

        double chi = 0;
        foreach ((Detector.AmplitudePoint first, Detector.AmplitudePoint longer) in measurement.DwellPairs)
        {
            double difference = longer.Amplitude - first.Amplitude;
            double floor = 0.002 * measurement.Fit.PeakAmplitude;
            chi = Math.Max(chi, Math.Abs(difference) / Math.Sqrt(first.Variance + longer.Variance + (floor * floor)));
        }

        if (chi > 5)
        {
            yield return new Reason(ReasonCode.SweepTooFast, $"After twice the dwell a level differs by {chi:0} times its uncertainty.");
        }
    }

    /// <summary>What differs beyond noise and beyond what would matter, or null.</summary>
    /// <param name="one">A fit.</param>
    /// <param name="other">Another.</param>
    /// <param name="harmlessBandwidths">A difference of f0 that does not matter, bandwidths.</param>
    /// <param name="harmlessQ">A relative difference of Q that does not matter.</param>
    private static string? Differ(ResonanceFit one, ResonanceFit other, double harmlessBandwidths, double harmlessQ)
    {
        if (!one.IsFitted || !other.IsFitted)
        {
            return "no resonance in one of them";
        }

        double f0 = other.F0Hz - one.F0Hz;
        double f0Sigma = Math.Sqrt((one.F0StandardHz * one.F0StandardHz) + (other.F0StandardHz * other.F0StandardHz));
        double q = (other.Q / one.Q) - 1;
        double qSigma = Math.Sqrt((one.QRelativeStandard * one.QRelativeStandard) + (other.QRelativeStandard * other.QRelativeStandard));
        bool f0Differs = Math.Abs(f0) > (Sigmas * f0Sigma) + (harmlessBandwidths * one.BandwidthHz);
        bool qDiffers = Math.Abs(q) > (Sigmas * qSigma) + harmlessQ;
        return f0Differs || qDiffers ? $"f0 by {f0:+0.0;-0.0} Hz, Q by {q:+0.0%;-0.0%}" : null;
    }
}
