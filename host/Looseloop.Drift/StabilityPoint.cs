namespace Looseloop.Drift;

/// <summary>Stability over one averaging time, as fractions of the mean value.</summary>
/// <param name="AveragingS">Averaging time, seconds.</param>
/// <param name="Factor">How many readings that is.</param>
/// <param name="Overlapping">Overlapping Allan deviation.</param>
/// <param name="Modified">Modified Allan deviation; NaN where the run is too short for it.</param>
/// <param name="Total">Total deviation.</param>
/// <param name="RelativeStandard">
/// Relative standard uncertainty of the overlapping one, 1/sqrt(number of independent pairs of averages) (simple interval of
/// NIST SP 1065, section 5.3; from memory).
/// </param>
public readonly record struct StabilityPoint(
    double AveragingS, int Factor, double Overlapping, double Modified, double Total, double RelativeStandard);
