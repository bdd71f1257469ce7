namespace Looseloop.Readings;

/// <summary>
/// How a box's raw counts above its pedestal follow the amplitude at the detector. Amplitude is in counts of a linear
/// detector of the same gain at the level <see cref="ReferenceCounts"/>, so that figures of all kinds look alike.
/// </summary>
/// <param name="Kind">What the detector responds to.</param>
/// <param name="PedestalCounts">Raw counts with nothing at the input.</param>
/// <param name="PedestalUncertainty">Standard uncertainty of that, counts.</param>
/// <param name="Shape">
/// The law's own figure: counts per decibel for the logarithmic kinds, knee in counts for a diode, unused otherwise.
/// </param>
/// <param name="ShapeUncertainty">Its standard uncertainty, same unit.</param>
/// <param name="ReferenceCounts">Counts above the pedestal at which amplitude and counts are equal, above 0.</param>
/// <param name="TimeConstantS">The detector's own time constant, seconds.</param>
/// <param name="ReadOn">When a ladder read it, or null where it is only declared.</param>
public sealed record DetectorLaw(
    DetectorKind Kind, double PedestalCounts, double PedestalUncertainty, double Shape, double ShapeUncertainty,
    double ReferenceCounts, double TimeConstantS, DateTimeOffset? ReadOn)
{
    /// <summary>
    /// By how much the middle of the range may still stray from the law, as a share of the largest level that the ladder
    /// saw (a bound, half-width of a rectangle); NaN where no ladder has read it.
    /// </summary>
    public double BowBound { get; init; } = double.NaN;

    /// <summary>By how much longer the drive is high than its timer makes it, seconds; NaN where no ladder has read it.</summary>
    public double HighExtraS { get; init; } = double.NaN;

    /// <summary>Standard uncertainty of <see cref="HighExtraS"/>, seconds; NaN where unknown.</summary>
    public double HighExtraUncertaintyS { get; init; } = double.NaN;

    /// <summary>True if harmonics only add a constant in power, which the fit spans.</summary>
    public bool RespondsToPower => Kind is DetectorKind.RmsLinear or DetectorKind.RmsLog or DetectorKind.SquareLaw;

    /// <summary>A linear true-RMS detector that nobody has read yet.</summary>
    public static DetectorLaw Declared(DetectorKind kind, double pedestalCounts) => new(
        kind, pedestalCounts, 2, kind is DetectorKind.RmsLog or DetectorKind.LogOfWaveform ? 40 : 100, 5, 2000, 100e-6, null);
}
