namespace Looseloop.Coil;

/// <summary>One line of a tap table.</summary>
/// <param name="Turns">Where the tap sits.</param>
/// <param name="InductanceH">From the beginning to there, henry.</param>
/// <param name="FrequencyHz">With the tank's capacitor, hertz.</param>
/// <param name="Coupling">k to the secondary.</param>
/// <param name="HzPerCentimetre">How much a centimetre of conductor moves the tank there, hertz; negative: longer is lower.</param>
public sealed record TapRow(double Turns, double InductanceH, double FrequencyHz, double Coupling, double HzPerCentimetre);

/// <summary>A move of the tap.</summary>
/// <param name="FromTurns">Where it sits.</param>
/// <param name="ToTurns">Where it must go.</param>
/// <param name="AlongM">Along the conductor, metres; positive outwards (more turns).</param>
/// <param name="StrayH">Inductance of leads and layout that the reading implies, henry; 0 where it was put on the capacitor.</param>
/// <param name="CapacitorF">The capacitance taken.</param>
public sealed record TapMove(double FromTurns, double ToTurns, double AlongM, double StrayH, double CapacitorF)
{
    /// <summary>Which way.</summary>
    public string Direction => ToTurns > FromTurns ? "more turns" : "fewer turns";
}

/// <summary>A primary with its capacitor, set against a secondary.</summary>
/// <param name="primary">The primary.</param>
/// <param name="secondary">The secondary it drives.</param>
/// <param name="secondaryInductanceH">Its inductance at direct current, henry.</param>
public sealed class Tank(PrimaryCoil primary, CoilGeometry secondary, double secondaryInductanceH)
{
    /// <summary>The primary.</summary>
    public PrimaryCoil Primary => primary;

    /// <summary>The capacitor for a frequency and an inductance, farad: 1/((2 pi f)^2 L) (Thomson).</summary>
    public static double CapacitorF(double frequencyHz, double inductanceH)
    {
        double w = 2 * Math.PI * Demand.Frequency(frequencyHz, "the frequency");
        return 1 / (w * w * Demand.Inductance(inductanceH, "the inductance"));
    }

    /// <summary>The inductance for a frequency and a capacitor, henry.</summary>
    public static double InductanceH(double frequencyHz, double capacitorF)
    {
        double w = 2 * Math.PI * Demand.Frequency(frequencyHz, "the frequency");
        return 1 / (w * w * Demand.Capacitance(capacitorF, "the capacitor"));
    }

    /// <summary>Resonance of an inductance with a capacitor, hertz.</summary>
    public static double ResonanceHz(double inductanceH, double capacitorF) =>
        1 / (2 * Math.PI * Math.Sqrt(
            Demand.Inductance(inductanceH, "the inductance") * Demand.Capacitance(capacitorF, "the capacitor")));

    /// <summary>The tap table for a capacitor: every whole turn, or finer.</summary>
    /// <param name="capacitorF">The tank's capacitor.</param>
    /// <param name="stepTurns">Between two rows, .01 or more.</param>
    public IReadOnlyList<TapRow> TapTable(double capacitorF, double stepTurns)
    {
        Demand.Capacitance(capacitorF, "the capacitor");
        Demand.Within(stepTurns, 0.01, 100, "the step", "");
        var rows = new List<TapRow>();
        double wound = primary.Geometry.Turns;
        for (int i = 1; i * stepTurns <= wound * (1 + 1e-12); i++)
        {
            rows.Add(RowAt(Math.Min(wound, i * stepTurns), capacitorF));
        }

        return rows;
    }

    /// <summary>One line of it.</summary>
    public TapRow RowAt(double turns, double capacitorF)
    {
        double l = primary.InductanceH(turns);
        return new TapRow(
            turns, l, ResonanceHz(l, capacitorF), primary.CouplingTo(secondary, turns, secondaryInductanceH),
            HzPerCentimetre(turns, capacitorF));
    }

    /// <summary>How much a centimetre of conductor at a tap moves the tank, hertz; over a tenth of a turn, that is, as a hand moves it.</summary>
    public double HzPerCentimetre(double turns, double capacitorF)
    {
        double low = Math.Max(0.01, turns - 0.05);
        double high = Math.Min(primary.Geometry.Turns, turns + 0.05);
        double rise = ResonanceHz(primary.InductanceH(high), capacitorF) - ResonanceHz(primary.InductanceH(low), capacitorF);
        return rise / (primary.ConductorM(high) - primary.ConductorM(low)) / 100;
    }

    /// <summary>Where the tap must sit to resonate at a frequency; null where the winding does not reach.</summary>
    /// <param name="frequencyHz">Wanted.</param>
    /// <param name="capacitorF">The tank's capacitor.</param>
    /// <param name="strayH">Inductance of leads and layout, henry.</param>
    public double? TurnsFor(double frequencyHz, double capacitorF, double strayH = 0)
    {
        Demand.Within(strayH, 0, 1, "the stray inductance", "H");
        double wanted = InductanceH(frequencyHz, capacitorF) - strayH;
        return wanted <= 1e-12 ? null : primary.TurnsForInductance(wanted);
    }

    /// <summary>
    /// Which way and how far to move the tap, from a reading of the tank itself (secondary away or shorted): what it lies off the
    /// reckoning is put on the capacitor's value, or on stray inductance of leads and layout. The truth lies between the two.
    /// </summary>
    /// <param name="readHz">The tank as read.</param>
    /// <param name="tapTurns">Where the tap sat.</param>
    /// <param name="wantedHz">Where it should be.</param>
    /// <param name="capacitorF">The capacitor's marking, or null: then only the first can be worked out.</param>
    /// <returns>One or two moves; empty where the winding does not reach.</returns>
    public IReadOnlyList<TapMove> MovesFor(double readHz, double tapTurns, double wantedHz, double? capacitorF)
    {
        double l = primary.InductanceH(tapTurns);
        var moves = new List<TapMove>();
        void Add(double c, double stray)
        {
            if (TurnsFor(wantedHz, c, stray) is double to)
            {
                moves.Add(new TapMove(tapTurns, to, primary.ConductorM(to) - primary.ConductorM(tapTurns), stray, c));
            }
        }

        // A reading above the reckoning cannot come from leads.
        if (capacitorF is double marked && InductanceH(readHz, marked) > l)
        {
            Add(marked, InductanceH(readHz, marked) - l);
        }

        Add(CapacitorF(readHz, l), 0);
        return moves;
    }
}
