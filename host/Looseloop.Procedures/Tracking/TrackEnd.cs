namespace Looseloop.Procedures.Tracking;

/// <summary>Why tracking cannot go on without a full reading.</summary>
public enum TrackEnd
{
    /// <summary>It can.</summary>
    None,

    /// <summary>There is no full reading to track from, or none that gave figures.</summary>
    NoCurve,

    /// <summary>f0 has left the settings.</summary>
    PeakLeft,

    /// <summary>The points do not lie on the held curve any more.</summary>
    OtherCurve,

    /// <summary>Amplitude or Q is far from the full reading's.</summary>
    FarFromCurve,

    /// <summary>The level with the drive off has moved since the full reading.</summary>
    DarkMoved,

    /// <summary>Samples reach the converter's upper end.</summary>
    Saturated,

    /// <summary>Single samples stray far beyond their scatter: bursts, or a field that has begun.</summary>
    Disturbed,

    /// <summary>Points were lost on the line.</summary>
    PointsMissing,
}
