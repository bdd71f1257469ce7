namespace Looseloop.Procedures.Survey;

/// <summary>One setting of a survey.</summary>
/// <param name="FrequencyHz">Exact drive frequency.</param>
/// <param name="Amplitude">Amplitude, counts of a linear detector.</param>
/// <param name="Sigma">Its standard uncertainty.</param>
public readonly record struct SurveyPoint(double FrequencyHz, double Amplitude, double Sigma);
