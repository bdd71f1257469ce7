using Looseloop.Readings;

namespace Looseloop.Procedures.Ladder;

/// <summary>What a ladder came to.</summary>
public sealed record LadderOutcome
{
    /// <summary>The detector's law, or null where the ladder was refused; why is in <see cref="Reasons"/>.</summary>
    public DetectorLaw? Law { get; init; }

    /// <summary>What stands against it; with a law, what stands beside it.</summary>
    public required IReadOnlyList<Reason> Reasons { get; init; }

    /// <summary>Where it was taken, or null where no resonance was found.</summary>
    public Setting? At { get; init; }

    /// <summary>How far that is from f0, half-bandwidths (x of the resonance); NaN where unknown.</summary>
    public double Detuning { get; init; } = double.NaN;

    /// <summary>The laws that were tried and the one that was chosen, or null.</summary>
    public LadderChoice? Choice { get; init; }

    /// <summary>The rungs, or null.</summary>
    public LadderRungs? Rungs { get; init; }

    /// <summary>Rungs left out because the converter was at its upper end.</summary>
    public int LeftOut { get; init; }

    /// <summary>The law against true power, or null where the box has no direct input.</summary>
    public DirectCheck? Direct { get; init; }

    public DarkLevel DarkBefore { get; init; }

    public DarkLevel DarkAfter { get; init; }

    /// <summary>Board time that it took, seconds.</summary>
    public double BoardSeconds { get; init; }
}
