namespace Looseloop.Readings;

/// <summary>What a box's detector makes of the waveform at its input.</summary>
public enum DetectorKind
{
    /// <summary>True RMS, output proportional to amplitude: the recommended kind.</summary>
    RmsLinear,

    /// <summary>True RMS, output in decibels.</summary>
    RmsLog,

    /// <summary>Output proportional to power.</summary>
    SquareLaw,

    /// <summary>A diode between its square-law range and its peak range.</summary>
    DiodeKnee,

    /// <summary>Full-wave mean of the absolute value.</summary>
    Mean,

    /// <summary>Peak, with its hold.</summary>
    Peak,

    /// <summary>Averaged logarithm of the waveform.</summary>
    LogOfWaveform,
}
