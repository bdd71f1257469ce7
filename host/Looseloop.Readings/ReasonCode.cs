namespace Looseloop.Readings;

/// <summary>Everything that can stand against a reading. The advice to each is in <see cref="ReasonText"/>.</summary>
public enum ReasonCode
{
    /// <summary>The response is caused by a harmonic of the drive.</summary>
    Ghost,

    /// <summary>The response is a higher mode of the coil.</summary>
    Overtone,

    /// <summary>Something in the room answers with the drive off, or does not follow it.</summary>
    Carrier,

    /// <summary>A field is present with the drive off: the coil may be energised.</summary>
    FieldPresent,

    /// <summary>The detector or the converter is at its upper end.</summary>
    Saturated,

    /// <summary>The pickup is below the converter's usable range.</summary>
    BelowRange,

    /// <summary>The response is too small against the noise.</summary>
    TooLittleSignal,

    /// <summary>No response at all was found.</summary>
    NoPeak,

    /// <summary>The peak lies outside the points, or at their edge.</summary>
    PeakAtEdge,

    /// <summary>Feed-through from loop to pickup is too large.</summary>
    FeedThroughLarge,

    /// <summary>The curve is not that of one resonance with a constant feed-through.</summary>
    ResidualTooLarge,

    /// <summary>f0 or Q differ with the duty: harmonics reach the detector.</summary>
    HarmonicsAtDetector,

    /// <summary>The sweep outran the ring or the detector.</summary>
    SweepTooFast,

    /// <summary>The coil or the room drifted within the reading.</summary>
    Drift,

    /// <summary>Mains hum or bursts on the samples.</summary>
    HumOrBursts,

    /// <summary>Two responses lie closer than their widths.</summary>
    TwoResponses,

    /// <summary>An overtone near three times f0 answers the drive's third harmonic.</summary>
    OvertoneOnThird,

    /// <summary>The settings are too coarse for this Q.</summary>
    GridTooCoarse,

    /// <summary>The loop is coupled too tightly.</summary>
    CouplingTooTight,

    /// <summary>Sweep and ring-down disagree on Q.</summary>
    RingDisagrees,

    /// <summary>The ring is too short for the detector or the sampling.</summary>
    RingTooShort,

    /// <summary>Points were lost on the link and could not be had again.</summary>
    PointsMissing,

    /// <summary>Too few points for the model.</summary>
    TooFewPoints,

    /// <summary>The fit found no acceptable minimum.</summary>
    FitFailed,

    /// <summary>The detector's law was never read with a ladder.</summary>
    DetectorNotRead,

    /// <summary>The detector does not respond to power.</summary>
    DetectorNotPower,

    /// <summary>The box's clock was never trimmed.</summary>
    ClockNotTrimmed,

    /// <summary>The box was never commissioned.</summary>
    NotCommissioned,

    /// <summary>The pull of loop, pickup and people was not measured with a standoff.</summary>
    PullNotMeasured,

    /// <summary>What stands with the coil was not stated.</summary>
    SetUpNotStated,

    /// <summary>Lower frequencies were not looked at: an overtone would be read as f0.</summary>
    NotSurveyed,

    /// <summary>The scatter was taken from the fit's residuals, for want of any other.</summary>
    NoiseFromResiduals,
}
