namespace Looseloop.Procedures.Survey;

/// <summary>What a response of a survey is.</summary>
public enum ResponseKind
{
    /// <summary>The lowest response of the coil itself.</summary>
    F0,

    /// <summary>A response of something to a harmonic of the drive.</summary>
    Ghost,

    /// <summary>A higher mode of the coil.</summary>
    Overtone,

    /// <summary>Another resonance close to f0: a coupled primary, or a second coil.</summary>
    Neighbour,

    /// <summary>It did not come back, or does not follow the drive.</summary>
    Carrier,

    /// <summary>Real, or not; the tests did not tell.</summary>
    Unknown,
}

/// <summary>A named response.</summary>
/// <param name="Kind">What it is.</param>
/// <param name="FrequencyHz">Drive frequency of its maximum.</param>
/// <param name="Amplitude">Amplitude at duty 1/2 over its surroundings, counts.</param>
/// <param name="Harmonic">Harmonic of the drive that causes it; 1 for a real one, 0 where unknown.</param>
/// <param name="DutyRatio">Amplitude at duty 1/5 over that at duty 1/2.</param>
/// <param name="DutyRatioUncertainty">Its standard uncertainty.</param>
public sealed record Response(
    ResponseKind Kind, double FrequencyHz, double Amplitude, int Harmonic, double DutyRatio, double DutyRatioUncertainty);
