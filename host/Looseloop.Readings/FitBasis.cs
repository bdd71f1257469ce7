namespace Looseloop.Readings;

/// <summary>
/// What the fit of a reading was made with, beside the reading's own points and dark levels: with this it can be made again
/// and comes out the same.
/// </summary>
public sealed record FitBasis
{
    /// <summary>The detector's law, its pedestal settled.</summary>
    public required DetectorLaw Law { get; init; }

    /// <summary>n of the amplitude's prefactor (f/f0)^n.</summary>
    public double PrefactorExponent { get; init; }

    /// <summary>The clock error that was taken off, or null.</summary>
    public ClockTrim? Clock { get; init; }

    /// <summary>The pull that was taken off, or null.</summary>
    public Pull? Pull { get; init; }

    /// <summary>True if the box had been commissioned.</summary>
    public bool Commissioned { get; init; }

    /// <summary>f0 that the points were planned on, hertz.</summary>
    public required double PlannedF0Hz { get; init; }

    /// <summary>Q that they were planned on.</summary>
    public required double PlannedQ { get; init; }

    /// <summary>Duty that they were planned on, 0..1/2.</summary>
    public required double PlannedDuty { get; init; }

    /// <summary>Dwell before each point, microseconds.</summary>
    public required int DwellUs { get; init; }

    /// <summary>Samples at each visit of a setting.</summary>
    public required int Samples { get; init; }

    /// <summary>From sample to sample, microseconds.</summary>
    public required int SpacingUs { get; init; }

    /// <summary>Which harmonic of the drive each point uses, in the order of the points: 1, 3 or 5.</summary>
    public required IReadOnlyList<int> Harmonics { get; init; }

    /// <summary>The other duty, at which the settings were looked at again.</summary>
    public required double OtherDuty { get; init; }

    /// <summary>The points taken at it.</summary>
    public required IReadOnlyList<RawPoint> AtOtherDuty { get; init; }

    /// <summary>The points taken again after a longer dwell.</summary>
    public required IReadOnlyList<RawPoint> AfterLongerDwell { get; init; }

    /// <summary>Points of the fit that could not be had.</summary>
    public int MissingInSweep { get; init; }

    /// <summary>Points at the other duty or after the longer dwell that could not be had.</summary>
    public int MissingInChecks { get; init; }

    /// <summary>True if even the lowest duty left the converter at its upper end.</summary>
    public bool Saturated { get; init; }

    /// <summary>What the survey before the reading saw; null for a reading near a given frequency.</summary>
    public SurveySeen? Survey { get; init; }
}
