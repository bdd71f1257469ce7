using Looseloop.Procedures.Survey;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>A reading and what drawing it takes.</summary>
/// <param name="Reading">The reading.</param>
/// <param name="Fit">The curve, or null where there is none.</param>
/// <param name="Points">The points of the fit, amplitudes in counts of a linear detector; empty where there is none.</param>
/// <param name="Survey">The survey before it, or null.</param>
public sealed record ReadOutcome(Reading Reading, ResonanceFit? Fit, IReadOnlyList<FitPoint> Points, SurveyResult? Survey);
