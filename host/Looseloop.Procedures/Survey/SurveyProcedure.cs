using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;

namespace Looseloop.Procedures.Survey;

/// <summary>Finds every response in a range and names it.</summary>
public static class SurveyProcedure
{
    private const int MostResponses = 8;

    /// <summary>Above this share of its range a converter, or the detector before it, may be at its end.</summary>
    internal const double SaturatedShare = 0.92;

    /// <summary>How far from a response its echoes are found, as a share of its frequency.</summary>
    private const double EchoReach = 0.05;

    /// <summary>Surveys a range, hertz, and looks properly at what stands out.</summary>
    public static SurveyResult Run(
        BoxSession box, DetectorLaw law, double lowHz, double highHz, IWatch watch, CancellationToken cancel)
    {
        (IReadOnlyList<RawPoint> raw, DarkLevel look) = SurveySweep.Run(box, law, lowHz, highHz, 0.5, watch, cancel);
        var maker = new AmplitudeMaker(new DetectorScale(Pedestal.Settle(law, look)), look.Mean);
        IReadOnlyList<SurveyPoint> points = SurveySweep.Amplitudes(raw, maker, look.SampleVariance);
        IReadOnlyList<Maximum> maxima = ResponseFinder.Find(points, MostResponses);
        watch.Begin($"looking at {maxima.Count} {(maxima.Count == 1 ? "response" : "responses")}", maxima.Count * 0.15);
        var findings = new List<CloseLook.Finding>();
        int looked = 0;
        foreach (Maximum maximum in maxima)
        {
            CloseLook.Finding finding = CloseLook.Run(box, maker, maximum.FrequencyHz, cancel);
            if (!IsEchoOf(finding, findings))
            {
                findings.Add(finding);
            }

            watch.Progress((double)++looked / maxima.Count);
        }

        IReadOnlyList<Response> named = SourceLook.Settle(box, maker, ResponseNaming.Name(findings, law.HighExtraS), cancel);
        bool saturated = raw.Any(point => point.Max > SaturatedShare * box.Identity.FullCounts);
        return new SurveyResult(raw, points, look, named, maxima.Count > 0 && maxima[0].AtEdge, saturated);
    }

    /// <summary>
    /// A survey passes a high Q faster than it rings out; the beat leaves maxima beside it that either settle onto it or are
    /// gone when looked at.
    /// </summary>
    private static bool IsEchoOf(CloseLook.Finding finding, List<CloseLook.Finding> larger)
    {
        bool gone = !finding.IsMaximum || !(finding.Amplitude > 5 * finding.Sigma);
        return larger.Any(other =>
            Math.Abs((finding.High.FrequencyHz / other.High.FrequencyHz) - 1) is double apart && (apart < 1e-6 || (gone && apart < EchoReach)));
    }
}

/// <summary>What a survey found.</summary>
/// <param name="Raw">Its raw points, ascending in frequency.</param>
/// <param name="Points">The same as amplitudes.</param>
/// <param name="Look">The dark level before it.</param>
/// <param name="Responses">What stands out, ascending in frequency, each named.</param>
/// <param name="LargestAtEdge">True if the largest lies at the edge of the range.</param>
/// <param name="Saturated">True if some level was at the end of the range: names are then worth nothing.</param>
public sealed record SurveyResult(
    IReadOnlyList<RawPoint> Raw, IReadOnlyList<SurveyPoint> Points, DarkLevel Look, IReadOnlyList<Response> Responses,
    bool LargestAtEdge, bool Saturated)
{
    /// <summary>The coil's own f0 among them, or null.</summary>
    public Response? F0 => Responses.FirstOrDefault(response => response.Kind == ResponseKind.F0);
}
