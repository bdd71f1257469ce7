using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;

namespace Looseloop.Procedures.Survey;

/// <summary>Finds every response in a range and names it.</summary>
public static class SurveyProcedure
{
    private const int MostResponses = 8;

    /// <summary>Surveys a range, hertz, and looks properly at what stands out.</summary>
    public static SurveyResult Run(
        BoxSession box, DetectorLaw law, double lowHz, double highHz, IWatch watch, CancellationToken cancel)
    {
        (IReadOnlyList<RawPoint> raw, DarkLevel look) = SurveySweep.Run(box, law, lowHz, highHz, 0.5, watch, cancel);
        var maker = new AmplitudeMaker(new DetectorScale(law), look.Mean);
        IReadOnlyList<SurveyPoint> points = SurveySweep.Amplitudes(raw, maker, look.SampleVariance);
        IReadOnlyList<Maximum> maxima = ResponseFinder.Find(points, MostResponses);
        watch.Begin($"looking at {maxima.Count} {(maxima.Count == 1 ? "response" : "responses")}", maxima.Count * 0.15);
        var findings = new List<CloseLook.Finding>();
        foreach (Maximum maximum in maxima)
        {
            findings.Add(CloseLook.Run(box, maker, maximum.FrequencyHz, cancel));
            watch.Progress((double)findings.Count / maxima.Count);
        }

        return new SurveyResult(raw, points, look, ResponseNaming.Name(findings), maxima.Count > 0 && maxima[0].AtEdge);
    }
}

/// <summary>What a survey found.</summary>
/// <param name="Raw">Its raw points, ascending in frequency.</param>
/// <param name="Points">The same as amplitudes.</param>
/// <param name="Look">The dark level before it.</param>
/// <param name="Responses">What stands out, ascending in frequency, each named.</param>
/// <param name="LargestAtEdge">True if the largest lies at the edge of the range.</param>
public sealed record SurveyResult(
    IReadOnlyList<RawPoint> Raw, IReadOnlyList<SurveyPoint> Points, DarkLevel Look, IReadOnlyList<Response> Responses,
    bool LargestAtEdge)
{
    /// <summary>The coil's own f0 among them, or null.</summary>
    public Response? F0 => Responses.FirstOrDefault(response => response.Kind == ResponseKind.F0);
}
