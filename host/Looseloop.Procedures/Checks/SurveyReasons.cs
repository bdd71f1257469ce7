using Looseloop.Procedures.Read;
using Looseloop.Procedures.Survey;
using Looseloop.Readings;

namespace Looseloop.Procedures.Checks;

/// <summary>What a survey holds against a reading.</summary>
public static class SurveyReasons
{
    /// <summary>A third mode lies up to so many times above f0.</summary>
    private const double LargestOvertone = 6;

    /// <summary>An unnamed response of this share of f0's own may be the coil's.</summary>
    private const double ShareToMind = 0.12;

    /// <summary>Why a survey gave no f0 to go on with.</summary>
    public static IReadOnlyList<Reason> WhyNoF0(SurveyResult survey, ReadOptions options)
    {
        if (survey.Saturated)
        {
            int top = survey.Raw.Max(point => point.Max);
            return [new Reason(ReasonCode.Saturated, $"The survey reaches {top} counts, the end of the converter's or the detector's range: what it found cannot be told apart.")];
        }

        string range = $"{options.LowHz / 1000:0.#} to {options.HighHz / 1000:0.#} kHz";
        var reasons = survey.Responses.Where(response => response.Kind == ResponseKind.Ghost)
            .Select(ghost => new Reason(
                ReasonCode.Ghost,
                $"The response at {ghost.FrequencyHz / 1000:0.0} kHz is caused by the drive's harmonic {ghost.Harmonic}, "
                + $"from something near {ghost.Harmonic * ghost.FrequencyHz / 1000:0} kHz."))
            .ToList();
        if (survey.LargestAtEdge)
        {
            reasons.Add(new Reason(ReasonCode.PeakAtEdge, $"The level still rises at the edge of {range}."));
        }

        if (reasons.Count == 0)
        {
            string what = survey.Responses.Count == 0 ? "Nothing stands out" : "Nothing that follows the drive stands out";
            reasons.Add(new Reason(ReasonCode.NoPeak, $"{what} from {range}."));
        }

        return reasons;
    }

    /// <summary>A whole part of f0 is where its ghosts stand.</summary>
    private static bool IsAtFraction(double frequencyHz, double f0) =>
        Math.Abs((Math.Round(f0 / frequencyHz) * frequencyHz / f0) - 1) < 0.015;

    private static double Strength(SurveyResult survey) => survey.F0?.Amplitude ?? 0;

    /// <summary>What else answers near f0, or near three times it.</summary>
    public static IEnumerable<Reason> Near(Measurement measurement)
    {
        double f0 = measurement.Fit.F0Hz;
        double lowHz = measurement.Survey is null ? f0 : measurement.Options.LowHz;
        if (lowHz > SurveySweep.LowHz && lowHz > f0 / LargestOvertone)
        {
            yield return new Reason(
                ReasonCode.NotSurveyed, $"Nothing below {Math.Min(lowHz, f0) / 1000:0.#} kHz was looked at: if f0 lies lower, this is an overtone.");
        }

        if (measurement.Survey is not SurveyResult survey)
        {
            yield break;
        }

        double bandwidth = measurement.Fit.BandwidthHz;
        foreach (Response response in survey.Responses)
        {
            double distance = Math.Abs(response.FrequencyHz - f0);
            if (response.Kind == ResponseKind.Neighbour)
            {
                yield return new Reason(
                    ReasonCode.TwoResponses,
                    $"Another response stands at {response.FrequencyHz / 1000:0.0} kHz, {distance / bandwidth:0.0} bandwidths from f0.");
            }

            if (response.Kind == ResponseKind.Unknown && response.FrequencyHz < f0 / 1.7
                && response.Amplitude > ShareToMind * Strength(survey) && !IsAtFraction(response.FrequencyHz, f0))
            {
                yield return new Reason(
                    ReasonCode.Overtone, $"A response at {response.FrequencyHz / 1000:0.0} kHz could not be named: if that is f0, this is an overtone.");
            }

            // Its own width is not known; at the drive's third harmonic three bandwidths of f0 are one of an equal Q.
            bool onThird = Math.Abs(response.FrequencyHz - (3 * f0)) < Math.Max(6 * bandwidth, 0.02 * f0);
            bool drivesThird = Math.Abs(Math.Sin(3 * Math.PI * measurement.Target.Duty)) > 0.15;
            if (response.Kind == ResponseKind.Overtone && onThird && drivesThird)
            {
                yield return new Reason(
                    ReasonCode.OvertoneOnThird,
                    $"An overtone at {response.FrequencyHz / 1000:0.0} kHz answers the drive's third harmonic while f0 is read.");
            }
        }
    }
}
