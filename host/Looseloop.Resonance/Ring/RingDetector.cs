namespace Looseloop.Resonance;

/// <summary>What the detector's time constant smooths.</summary>
public enum RingDetector
{
    /// <summary>The power; the level is the root of it (true RMS).</summary>
    Power,

    /// <summary>The amplitude itself (mean value, or a filter after the detector).</summary>
    Amplitude,
}
