using Looseloop.Box;
using Looseloop.Procedures.Detector;

namespace Looseloop.Procedures.Survey;

/// <summary>
/// Uneven edges, or a detector that does not respond to power, can spoil the duty test. But a ghost is weaker than what it
/// comes from: where nothing at a multiple of the strongest response is as strong, that one is real.
/// </summary>
public static class SourceLook
{
    private static readonly int[] _orders = [2, 3, 4, 5, 7, 9];

    /// <summary>Looks at the multiples that the box can drive.</summary>
    public static bool IsReal(BoxSession box, AmplitudeMaker maker, Response response, CancellationToken cancel) =>
        response.Kind is ResponseKind.Ghost or ResponseKind.Unknown
        && !_orders.Select(order => order * response.FrequencyHz)
            .Where(hz => hz < 0.99 * box.Identity.HighestHz)
            .Any(hz => CloseLook.Run(box, maker, hz, cancel) is CloseLook.Finding source
                && source.Amplitude > 5 * source.Sigma && source.Amplitude > response.Amplitude);

    /// <summary>The names, with the strongest response taken for the coil's own where nothing was and its source says so.</summary>
    public static IReadOnlyList<Response> Settle(
        BoxSession box, AmplitudeMaker maker, IReadOnlyList<Response> named, CancellationToken cancel)
    {
        if (named.Count == 0 || named.Any(response => response.Kind == ResponseKind.F0))
        {
            return named;
        }

        Response strongest = named.MaxBy(response => response.Amplitude)!;
        return IsReal(box, maker, strongest, cancel)
            ? [.. named.Select(response => ReferenceEquals(response, strongest) ? response with { Kind = ResponseKind.F0, Harmonic = 1 } : response)]
            : named;
    }
}
