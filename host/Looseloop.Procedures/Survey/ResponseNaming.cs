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

    /// <summary>Odd orders that look like a real response or a third harmonic at duty 1/5.</summary>
    private static readonly int[] _highOrders = [7, 9, 11, 13, 15, 17, 19];

    /// <summary>Names them, ascending in frequency.</summary>
    public static IReadOnlyList<Response> Name(IReadOnlyList<CloseLook.Finding> findings)
    {
        CloseLook.Finding[] ascending = [.. findings.OrderBy(finding => finding.High.FrequencyHz)];
        var named = ascending.Select(finding => First(finding, ascending)).ToList();
        double largest = named.Where(response => response.Harmonic == 1).Select(response => response.Amplitude).DefaultIfEmpty(0).Max();
        Response? f0 = named.FirstOrDefault(response => response.Harmonic == 1 && response.Amplitude >= SmallestShare * largest);
        return [.. named.Select(response => Last(response, f0))];
    }

    private static Response First(CloseLook.Finding finding, CloseLook.Finding[] all)
    {
        double frequencyHz = finding.High.FrequencyHz;
        if (!(finding.Amplitude > 5 * finding.Sigma))
        {
            return new Response(ResponseKind.Carrier, frequencyHz, Math.Max(finding.Amplitude, 0), 0, double.NaN, double.NaN);
        }

        int order = HarmonicTest.Order(finding.Ratio, finding.RatioUncertainty, finding.Low, finding.High);
        // The n-th harmonic is 1/n as strong as the fundamental, so a ghost has n times itself at n times its frequency.
        if (order is 1 or 3 or 0)
        {
            order = Array.Find(_highOrders, high => IsGhostOf(finding, all, high)) is int high and > 0 ? high : order;
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
