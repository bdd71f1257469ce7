using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Checks;

/// <summary>What the pickup says with the drive off.</summary>
public static class DarkCheck
{
    /// <summary>Counts over the pedestal that noise and pedestal drift explain.</summary>
    private const double Unremarkable = 8;

    public static IEnumerable<Reason> Reasons(Measurement measurement)
    {
        DetectorLaw law = measurement.Options.Law;
        double dark = (measurement.DarkBefore.Mean + measurement.DarkAfter.Mean) / 2;
        double over = dark - law.PedestalCounts;
        bool logarithmic = law.Kind is DetectorKind.RmsLog or DetectorKind.LogOfWaveform;
        if (!logarithmic && over > Unremarkable + (3 * law.PedestalUncertainty))
        {
            yield return new Reason(ReasonCode.Carrier, $"With the drive off the pickup stands {over:0} counts above the box's pedestal.");
        }

        double move = measurement.DarkAfter.Mean - measurement.DarkBefore.Mean;
        double sigma = Math.Sqrt(
            (measurement.DarkBefore.SampleVariance / measurement.DarkBefore.Samples)
            + (measurement.DarkAfter.SampleVariance / measurement.DarkAfter.Samples));
        double allowed = (5 * sigma) + (0.004 * Math.Abs(measurement.Points.Max(point => point.Mean) - dark));
        if (Math.Abs(move) > allowed)
        {
            yield return new Reason(ReasonCode.Carrier, $"The level with the drive off moved by {move:0.0} counts during the reading.");
        }
    }
}
