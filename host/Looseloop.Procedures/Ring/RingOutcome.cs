using Looseloop.Readings;

namespace Looseloop.Procedures.Ring;

/// <summary>Q by ring-down. Figures are NaN where the ring was refused; the reasons then say why.</summary>
public sealed record RingOutcome
{
    /// <summary>Where it was driven. The free decay is at the coil's own f0 whatever this is.</summary>
    public required Setting At { get; init; }

    /// <summary>Ring time of the amplitude, seconds.</summary>
    public double TauS { get; init; } = double.NaN;

    /// <summary>Its standard uncertainty, seconds: noise, detector's time constant, law and dark.</summary>
    public double TauUncertaintyS { get; init; } = double.NaN;

    /// <summary>f0 that Q was computed with, hertz.</summary>
    public required double F0Hz { get; init; }

    /// <summary>Q = pi f0 tau.</summary>
    public double Q => Math.PI * F0Hz * TauS;

    /// <summary>Relative standard uncertainty of Q; that of f0 adds nothing that counts.</summary>
    public double QRelative => TauUncertaintyS / TauS;

    public bool IsFound => double.IsFinite(TauS);

    public required IReadOnlyList<Reason> Reasons { get; init; }

    /// <summary>How many samples the figure rests on.</summary>
    public int Samples { get; init; }

    /// <summary>Board time that it took, seconds.</summary>
    public double BoardSeconds { get; init; }
}
