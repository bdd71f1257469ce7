namespace Looseloop.Resonance;

/// <summary>How a fit ended. Only <see cref="Fitted"/> gives figures that may be used.</summary>
public enum FitOutcome
{
    /// <summary>A minimum was found, f0 lies inside the points, and every parameter is determined.</summary>
    Fitted,

    /// <summary>Fewer points, or fewer different frequencies, than the model needs.</summary>
    TooFewPoints,

    /// <summary>A frequency, amplitude, group or drive weight is not a number, infinite or out of its range.</summary>
    BadPoint,

    /// <summary>The points are as well explained by constants: there is no resonance in them.</summary>
    NoPeak,

    /// <summary>The best curve has its f0 outside the points.</summary>
    PeakOutside,

    /// <summary>No acceptable minimum, or one that leaves a parameter undetermined.</summary>
    NotDetermined,
}
