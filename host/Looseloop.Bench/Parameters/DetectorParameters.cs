namespace Looseloop.Bench;

/// <summary>The detector behind the buffer. It sees the waveform: every harmonic of the drive, coil and feed-through together.</summary>
public sealed record DetectorParameters
{
    public DetectorKind Kind { get; init; } = DetectorKind.RmsLinear;

    /// <summary>Time constant of its low-pass, microseconds; of a peak detector, that of its attack.</summary>
    public double TimeConstantUs { get; init; } = 40;

    /// <summary>Time constant of a peak detector's decay, microseconds.</summary>
    public double DecayUs { get; init; } = 400;

    /// <summary>Gain from its level to its output, for the linear kinds.</summary>
    public double Gain { get; init; } = 5;

    /// <summary>Output of the logarithmic kinds, millivolts for each decibel.</summary>
    public double MvPerDb { get; init; } = 25;

    /// <summary>Where the output of the logarithmic kinds would be zero, decibels over 1 V rms of a sine.</summary>
    public double InterceptDbV { get; init; } = -70;

    /// <summary>n V_t of a diode detector, millivolts.</summary>
    public double DiodeMv { get; init; } = 27;

    /// <summary>Noise at its input, millivolts rms: adds power, as a floor below which nothing is seen.</summary>
    public double FloorMv { get; init; } = 0.3;

    /// <summary>Noise of its output with nothing at its input, millivolts rms; the converter's own comes to it.</summary>
    public double OutputNoiseMv { get; init; }

    /// <summary>Its output with nothing at its input, volts.</summary>
    public double PedestalVolts { get; init; } = 0.25;

    /// <summary>Where its output stops, volts.</summary>
    public double CeilingVolts { get; init; } = 3.2;

    /// <summary>
    /// An ordinary detector of a kind. Diode and peak detector are those of hardware-notes, with what their netlists gave
    /// (hardware-notes/spice/results.txt, to which a test holds these figures).
    /// </summary>
    public static DetectorParameters Of(DetectorKind kind) => kind switch
    {
        DetectorKind.Diode => new DetectorParameters
        {
            Kind = kind,

            // A transistor's junction: kT/q at 27 degrees, no ideality.
            DiodeMv = 25.9,
            Gain = 100,

            // At half of n V_t, where the notes want it read. A strong signal charges in 24 and discharges in 56.
            TimeConstantUs = 36,
            OutputNoiseMv = 0.17,
            PedestalVolts = 0.3,
        },
        DetectorKind.Peak or DetectorKind.PeakToPeak => new DetectorParameters
        {
            Kind = kind,

            // At 1 V, where its law is nearest a straight line; of a weaker signal the real one shows less.
            TimeConstantUs = 3.8,
            DecayUs = 100,
            Gain = 1,
            PedestalVolts = 0.3,
        },
        _ => new DetectorParameters { Kind = kind },
    };
}

/// <summary>What a detector makes of the waveform.</summary>
public enum DetectorKind
{
    /// <summary>Root of the mean power.</summary>
    RmsLinear,

    /// <summary>Logarithm of the mean power.</summary>
    RmsLog,

    /// <summary>Mean power itself.</summary>
    Square,

    /// <summary>Mean of the absolute value (full-wave).</summary>
    MeanAbsolute,

    /// <summary>Mean of the logarithm of the absolute value.</summary>
    Logarithm,

    /// <summary>n V_t ln of the mean of exp(v / n V_t): square law at low level, peak at high level.</summary>
    Diode,

    /// <summary>Largest positive value (half-wave), with a fast attack and a slow decay.</summary>
    Peak,

    /// <summary>Largest positive less largest negative value, with a fast attack and a slow decay.</summary>
    PeakToPeak,
}
