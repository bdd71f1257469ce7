using Looseloop.Procedures.Survey;

namespace Looseloop.Rendering;

/// <summary>What a response is, in words.</summary>
internal static class ResponseWords
{
    public static string Of(Response response) => response.Kind switch
    {
        ResponseKind.F0 => "f0",
        ResponseKind.Ghost => $"ghost: harmonic {response.Harmonic} of the drive, from {response.Harmonic * response.FrequencyHz / 1000:0} kHz",
        ResponseKind.Overtone => "overtone of the coil",
        ResponseKind.Neighbour => "another resonance near f0: a primary, or a second coil",
        ResponseKind.Carrier => "not there when looked at: a carrier or a disturbance",
        _ => "unknown",
    };
}
