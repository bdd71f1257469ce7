namespace Looseloop.Resonance;

/// <summary>The ring time of a coil from its free decay. Figures are NaN unless found.</summary>
public readonly record struct RingResult()
{
    public RingOutcome Outcome { get; init; } = RingOutcome.BadSamples;

    /// <summary>Ring time of the amplitude, seconds.</summary>
    public double TauS { get; init; } = double.NaN;

    /// <summary>Its standard uncertainty, that of the detector's time constant included.</summary>
    public double TauStandardS { get; init; } = double.NaN;

    /// <summary>The detector's time constant as the decay has it together with what was known, seconds.</summary>
    public double DetectorTimeS { get; init; } = double.NaN;

    /// <summary>Sum of squared residuals over their variances.</summary>
    public double ChiSquare { get; init; } = double.NaN;

    public int DegreesOfFreedom { get; init; }

    /// <summary>Q = pi f0 tau.</summary>
    public double Q(double f0Hz) => Math.PI * f0Hz * TauS;

    /// <summary>Relative standard uncertainty of Q; that of f0 adds nothing that counts.</summary>
    public double QRelativeStandard => TauStandardS / TauS;
}
