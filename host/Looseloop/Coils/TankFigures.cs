using Looseloop.Coil;

namespace Looseloop.Coils;

/// <summary>A tank set against a secondary, in one state: cold as read or expected, or loaded with arcs.</summary>
/// <param name="SecondaryHz">The secondary's frequency.</param>
/// <param name="SecondaryQ">Its Q.</param>
/// <param name="CapacitorF">The capacitor that tunes the tap in use to it.</param>
/// <param name="TapTurns">The tap that tunes the capacitor to it, turns; NaN where there is no capacitor or the winding does not reach.</param>
/// <param name="Drive">The currents where there is no capacitor, or null.</param>
internal sealed record TankState(double SecondaryHz, double SecondaryQ, double CapacitorF, double TapTurns, UntunedDrive? Drive);

/// <summary>Everything <c>tank</c> says.</summary>
internal sealed record TankFigures
{
    public required CoilGeometry Coil { get; init; }

    /// <summary>Where the secondary's frequency came from.</summary>
    public required string From { get; init; }

    /// <summary>Where the tap sits, turns.</summary>
    public required double Tap { get; init; }

    public required double InductanceH { get; init; }

    public required double MutualH { get; init; }

    public required double K { get; init; }

    public required TankState Cold { get; init; }

    public required TankState Loaded { get; init; }

    /// <summary>The tap table; empty where there is no capacitor.</summary>
    public required IReadOnlyList<TapRow> Taps { get; init; }

    /// <summary>Inductance turn by turn where there is no capacitor.</summary>
    public required IReadOnlyList<(double Turns, double InductanceH)> Turns { get; init; }

    /// <summary>The pair's frequencies with the tank tuned to the cold secondary.</summary>
    public required (double LowerHz, double UpperHz) Split { get; init; }

    /// <summary>The tank's own reading, or null.</summary>
    public FrequencySource? PrimaryReading { get; init; }

    /// <summary>Which way to move the tap after it, for the cold secondary; empty where the winding does not reach.</summary>
    public IReadOnlyList<TapMove> ColdMoves { get; init; } = [];

    /// <summary>The same for the loaded one.</summary>
    public IReadOnlyList<TapMove> LoadedMoves { get; init; } = [];

    public PrimaryGeometry Primary => Coil.Primary!;

    public static TankFigures Of(
        CoilGeometry coil, double? f0Hz, FrequencySource? secondaryReading, FrequencySource? primaryReading, double tap, double step, LoadedState loaded)
    {
        var primary = new PrimaryCoil(coil.Primary!);
        Mode mode = ModeSolver.Lowest(new FieldModel(coil, Resolution.Fine), 1)[0];
        double l2 = Expectations.DirectInductanceH(coil);
        var tank = new Tank(primary, coil, l2);
        double coldHz = f0Hz ?? secondaryReading?.F0Hz ?? mode.FrequencyHz;
        double coldQ = secondaryReading is { } r && double.IsFinite(r.Q) ? r.Q : QEstimate.Of(coil, mode).Low;
        double loadedHz = loaded.FrequencyHz(coldHz, mode.TopCapacitanceF);
        double inductance = primary.InductanceH(tap);
        double k = primary.CouplingTo(coil, tap, l2);
        double? capacitor = coil.Primary!.CapacitorF;
        TankState State(double hz, double q) => new(
            hz, q, Tank.CapacitorF(hz, inductance),
            capacitor is double c ? tank.TurnsFor(hz, c) ?? double.NaN : double.NaN,
            capacitor is null && coil.Primary!.BusVoltageV is double v ? UntunedDrive.Of(inductance, hz, v, coil.Primary.FullBridge, k, q) : null);
        IReadOnlyList<TapMove> Moves(double hz) => primaryReading is null ? [] : tank.MovesFor(primaryReading.F0Hz, tap, hz, capacitor);
        return new TankFigures
        {
            Coil = coil,
            From = f0Hz is not null ? "as given" : secondaryReading?.From ?? "from the geometry, 2-3 % in a real room",
            Tap = tap,
            InductanceH = inductance,
            MutualH = primary.MutualH(coil, tap),
            K = k,
            Cold = State(coldHz, coldQ),
            Loaded = State(loadedHz, loaded.Q),
            Taps = capacitor is double nF ? tank.TapTable(nF, step) : [],
            Turns = capacitor is null
                ? [.. Enumerable.Range(1, (int)Math.Min(500, Math.Floor((coil.Primary!.Turns / step) + 1e-9))).Select(i => (i * step, primary.InductanceH(i * step)))]
                : [],
            Split = Coupling.SplitHz(coldHz, coldHz, Math.Min(k, 0.99)),
            PrimaryReading = primaryReading,
            ColdMoves = Moves(coldHz),
            LoadedMoves = Moves(loadedHz),
        };
    }
}
