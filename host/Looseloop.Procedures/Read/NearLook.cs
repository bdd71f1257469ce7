using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Survey;
using Looseloop.Readings;

namespace Looseloop.Procedures.Read;

/// <summary>
/// Where a reading begins when the user says about where f0 is: the settings within 5 %, the largest of them, and a test
/// that it is not a ghost. The user may have been told a ghost.
/// </summary>
public static class NearLook
{
    private const double Share = 0.05;

    /// <summary>Odd harmonics that the duty test takes for a real response; what they come from must be looked for.</summary>
    private static readonly int[] _lookalikes = [9, 11];

    /// <summary>What was found.</summary>
    /// <param name="Response">The largest response, named.</param>
    /// <param name="Look">The dark level before it.</param>
    /// <param name="Points">The points of the sweep.</param>
    public sealed record Result(Response Response, DarkLevel Look, IReadOnlyList<RawPoint> Points);

    public static Result Run(BoxSession box, DetectorLaw law, double nearHz, IWatch watch, CancellationToken cancel)
    {
        watch.Begin($"looking about {nearHz / 1000:0.0} kHz", 0.3);
        double low = Math.Max(nearHz * (1 - Share), box.Identity.LowestHz);
        double high = Math.Min(nearHz * (1 + Share), box.Identity.HighestHz);
        (IReadOnlyList<RawPoint> raw, DarkLevel look) = SurveySweep.Run(box, law, low, high, 0.5, NoWatch.Instance, cancel);
        if (raw.Count == 0)
        {
            return new Result(new Response(ResponseKind.Carrier, nearHz, 0, 0, double.NaN, double.NaN), look, raw);
        }

        if (raw.Any(point => point.Max > SurveyProcedure.SaturatedShare * box.Identity.FullCounts))
        {
            return new Result(TooStrong(box, law, raw, cancel), look, raw);
        }

        var maker = new AmplitudeMaker(new DetectorScale(Pedestal.Settle(law, look)), look.Mean);
        double largestHz = raw.MaxBy(point => point.Mean).Setting.FrequencyHz;
        CloseLook.Finding finding = CloseLook.Run(box, maker, largestHz, cancel);
        CloseLook.Finding[] sources =
        [
            .. _lookalikes.Select(order => order * finding.High.FrequencyHz).Where(hz => hz < box.Identity.HighestHz)
                .Select(hz => CloseLook.Run(box, maker, hz, cancel)),
        ];
        Response named = ResponseNaming.Name([finding, .. sources], law.HighExtraS).First(response => response.FrequencyHz == finding.High.FrequencyHz);

        // Sources stand above it, so a real response here is the lowest; only its strength may say otherwise.
        bool real = named.Harmonic == 1 || SourceLook.IsReal(box, maker, named, cancel);
        return new Result(real ? named with { Kind = ResponseKind.F0, Harmonic = 1 } : named, look, raw);
    }

    /// <summary>
    /// At the end of the range the duty tells nothing. But a ghost is weaker than what it comes from: where nothing at an odd
    /// multiple is as strong, the response is real, and a lower duty will read it.
    /// </summary>
    private static Response TooStrong(BoxSession box, DetectorLaw law, IReadOnlyList<RawPoint> raw, CancellationToken cancel)
    {
        int top = raw.Max(point => point.Max);
        double centreHz = raw.Where(point => point.Max > SurveyProcedure.SaturatedShare * box.Identity.FullCounts).Average(point => point.Setting.FrequencyHz);
        Setting[] multiples =
        [
            .. new[] { 3, 5, 7, 9, 11 }.Select(order => order * centreHz).Where(hz => hz < 0.99 * box.Identity.HighestHz)
                .SelectMany(hz => CurveSweep.About(box.Grid, hz, 3, 1, 0.5)),
        ];
        int dwellUs = CurveSweep.DwellUs(new Target(centreHz, 200, 0.5), law);
        bool ghost = multiples.Length > 0
            && box.Sweep(new SweepRequest(multiples, dwellUs, 4), cancel: cancel).Points.Any(point => point.Max > 0.9 * top);
        return new Response(ghost ? ResponseKind.Unknown : ResponseKind.F0, centreHz, top, ghost ? 0 : 1, double.NaN, double.NaN);
    }

    /// <summary>Why a response near the given frequency cannot be read as f0.</summary>
    public static Reason WhyNot(Response response) => response.Kind switch
    {
        ResponseKind.Ghost => new Reason(
            ReasonCode.Ghost,
            $"The response at {response.FrequencyHz / 1000:0.0} kHz is caused by the drive's harmonic {response.Harmonic}, from something near {response.Harmonic * response.FrequencyHz / 1000:0} kHz."),
        ResponseKind.Carrier => new Reason(ReasonCode.NoPeak, $"Nothing that follows the drive stands out near {response.FrequencyHz / 1000:0.0} kHz."),
        _ => new Reason(
            ReasonCode.NoPeak,
            $"The level at {response.FrequencyHz / 1000:0.0} kHz follows the duty as no harmonic does ({response.DutyRatio:0.000} from 1/2 to 1/5): the detector is at its end, or it is no resonance."),
    };
}
