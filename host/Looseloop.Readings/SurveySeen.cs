namespace Looseloop.Readings;

/// <summary>What the survey before a reading saw: which resonances are about cannot be told from the reading's own points.</summary>
/// <param name="LowHz">The lowest frequency that was looked at, hertz.</param>
/// <param name="Responses">What stood out, ascending in frequency.</param>
public sealed record SurveySeen(double LowHz, IReadOnlyList<SeenResponse> Responses);

/// <summary>One response of a survey.</summary>
/// <param name="Kind">What it was taken for: f0, ghost, overtone, neighbour, carrier, unknown.</param>
/// <param name="FrequencyHz">Drive frequency of its maximum, hertz.</param>
/// <param name="Amplitude">Amplitude at duty 1/2 over its surroundings, counts.</param>
/// <param name="Harmonic">Harmonic of the drive that causes it; 1 for a real one, 0 where unknown.</param>
public sealed record SeenResponse(string Kind, double FrequencyHz, double Amplitude, int Harmonic);
