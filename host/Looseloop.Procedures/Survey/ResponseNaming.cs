using Looseloop.Resonance;

namespace Looseloop.Procedures.Survey;

/// <summary>Names the responses of a survey once each has been looked at. Pure.</summary>
public static class ResponseNaming
{
    /// <summary>Two frequencies of a survey count as one within this: a step of the grid either way.</summary>
    private const double SameFrequency = 0.009;

    /// <summary>A real response this much smaller than the largest is not taken for the coil's own.</summary>
    private const double SmallestShare = 0.12;

    /// <summary>Below this ratio to f0 another real response is a neighbour (a primary, a second coil), above it an overtone.</summary>
    private const double OvertoneFrom = 1.7;

    /// <summary>Relative error that detectors, edges and drift may put on a ratio.</summary>
    private const double Tolerance = 0.06;

    /// <summary>With a ratio known worse than this, what stands at a multiple decides first.</summary>
    private const double VagueRatio = 0.05;

    /// <summary>With a ratio known worse than this, nothing is called the coil's own.</summary>
    private const double WorthlessRatio = 0.1;

    /// <summary>Odd orders that look like a real response or a third harmonic at duty 1/5.</summary>
    private static readonly int[] _highOrders = [7, 9, 11, 13, 15, 17, 19];

    /// <summary>Odd orders that a vague ratio does not tell from a real response.</summary>
    private static readonly int[] _oddOrders = [3, 5, .. _highOrders];

    /// <summary>Names them, ascending in frequency.</summary>
    /// <param name="findings">What was looked at.</param>
    /// <param name="highExtraS">By how much longer the drive is high than its timer makes it, seconds; NaN where unknown.</param>
    public static IReadOnlyList<Response> Name(IReadOnlyList<CloseLook.Finding> findings, double highExtraS)
    {
        CloseLook.Finding[] ascending = [.. findings.OrderBy(finding => finding.High.FrequencyHz)];
        var named = ascending.Select(finding => First(finding, ascending, double.IsNaN(highExtraS) ? 0 : highExtraS)).ToList();
        double largest = named.Where(response => response.Harmonic == 1).Select(response => response.Amplitude).DefaultIfEmpty(0).Max();
        Response? f0 = named.FirstOrDefault(response => response.Harmonic == 1 && response.Amplitude >= SmallestShare * largest);
        return [.. named.Select(response => Last(response, f0))];
    }

    private static Response First(CloseLook.Finding finding, CloseLook.Finding[] all, double highExtraS)
    {
        double frequencyHz = finding.High.FrequencyHz;
        if (!(finding.Amplitude > 5 * finding.Sigma))
        {
            return new Response(ResponseKind.Carrier, frequencyHz, Math.Max(finding.Amplitude, 0), 0, double.NaN, double.NaN);
        }

        double extra = highExtraS * frequencyHz;
        int order = DutyTest.Classify(
            finding.Ratio, finding.RatioUncertainty, finding.Low.Duty + extra, finding.High.Duty + extra, Tolerance).Order;

        // The n-th harmonic is 1/n as strong as the fundamental, so a ghost has n times itself at n times its frequency.
        if (order is 1 or 3 or 0)
        {
            int[] orders = finding.RatioUncertainty > VagueRatio ? _oddOrders : _highOrders;
            order = Array.Find(orders, high => IsGhostOf(finding, all, high)) is int high and > 0 ? high : order;
        }

        if (order == 1 && finding.RatioUncertainty > WorthlessRatio)
        {
            order = 0;
        }

        ResponseKind kind = order switch
        {
            0 => ResponseKind.Unknown,
            1 => ResponseKind.F0, // for now: which real one it is shows when all are known
            _ => ResponseKind.Ghost,
        };
        return new Response(kind, frequencyHz, finding.Amplitude, order, finding.Ratio, finding.RatioUncertainty);
    }

    private static Response Last(Response response, Response? f0)
    {
        if (response.Kind != ResponseKind.F0 || f0 is null || ReferenceEquals(response, f0))
        {
            return response;
        }

        double ratio = response.FrequencyHz / f0.FrequencyHz;
        return response with
        {
            Kind = ratio >= OvertoneFrom ? ResponseKind.Overtone : ratio > 1 / OvertoneFrom ? ResponseKind.Neighbour : ResponseKind.Unknown,
        };
    }

    private static bool IsGhostOf(CloseLook.Finding ghost, CloseLook.Finding[] all, int order) => all.Any(source =>
        Math.Abs((source.High.FrequencyHz / (order * ghost.High.FrequencyHz)) - 1) < SameFrequency
        && source.Amplitude > 0.4 * order * ghost.Amplitude
        && source.Amplitude < 3 * order * ghost.Amplitude);
}
