using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Checks;

/// <summary>Whether the levels suit the converter.</summary>
public static class LevelCheck
{
    /// <summary>Peak over noise below which the checks themselves no longer see much.</summary>
    private const double LeastPeakToNoise = 40;

    public static IEnumerable<Reason> Reasons(Measurement measurement)
    {
        int full = measurement.Box.FullCounts;
        int top = measurement.Points.Max(point => point.Max);
        if (measurement.Saturated || top >= full * 0.97)
        {
            yield return new Reason(ReasonCode.Saturated, $"Samples reach {top} of {full} counts.");
        }

        int floor = measurement.Points.Min(point => point.Min);
        if (floor <= 0)
        {
            yield return new Reason(ReasonCode.BelowRange, "Samples read zero: the pedestal is inside the converter's dead zone.");
        }

        // Of the points near the top, where every detector's noise is known best.
        double peak = measurement.FitPoints.Max(point => point.Amplitude);
        double sigma = Math.Sqrt(measurement.FitPoints.Where(point => point.Amplitude > peak / 2).Average(point => point.Variance));
        double ratio = peak / (sigma * Math.Sqrt(measurement.Plan.Samples));
        if (peak / sigma < LeastPeakToNoise)
        {
            yield return new Reason(ReasonCode.TooLittleSignal, $"The peak is only {ratio:0.0} times the noise of a sample.");
        }

        if (measurement.Missing > 0)
        {
            yield return new Reason(ReasonCode.PointsMissing, $"{measurement.Missing} points were lost on the line.");
        }
    }
}
