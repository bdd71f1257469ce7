namespace Looseloop.Coil;

/// <summary>What a coil of this geometry should read, and how far that may be trusted.</summary>
public sealed record CoilExpectation
{
    /// <summary>The coil.</summary>
    public required CoilGeometry Coil { get; init; }

    /// <summary>The lowest resonances, lowest first; three of them.</summary>
    public required IReadOnlyList<Mode> Modes { get; init; }

    /// <summary>Inductance at direct current: sheet with round-wire correction, henry.</summary>
    public required double DirectInductanceH { get; init; }

    /// <summary>The same by the sum of the turns, henry; of the nearest whole number of turns.</summary>
    public required double FilamentInductanceH { get; init; }

    /// <summary>What the copper allows.</summary>
    public required QEstimate Q { get; init; }

    /// <summary>How each dimension moves f1.</summary>
    public required IReadOnlyList<Sensitivity> Sensitivities { get; init; }

    /// <summary>All contributions to the uncertainty, largest first.</summary>
    public required IReadOnlyList<Contribution> Contributions { get; init; }

    /// <summary>Relative change of f1 per kelvin by the expansion of former and top load; NaN where the former's expansion is not known.</summary>
    public required double F1PerKelvin { get; init; }

    /// <summary>Relative change of Q per kelvin by copper's resistance in the skin regime.</summary>
    public const double QPerKelvin = -PhysicalConstants.CopperPerKelvin / 2;

    /// <summary>The first resonance, hertz.</summary>
    public double F1Hz => Modes[0].FrequencyHz;

    /// <summary>Standard uncertainty of it, hertz.</summary>
    public double F1UncertaintyHz => Math.Sqrt(Contributions.Sum(c => c.UncertaintyHz * c.UncertaintyHz));

    /// <summary>The capacitance that would resonate with the inductance at direct current, farad.</summary>
    public double EquivalentCapacitanceF => 1 / (Modes[0].AngularHz * Modes[0].AngularHz * DirectInductanceH);

    /// <summary>What must stand beside the figures.</summary>
    public const string Caution =
        "Expected figures are estimates for a cold coil: f0 2-3 % in a real room; Q is an upper bound (former, ground, damp and corona come on top).";
}
