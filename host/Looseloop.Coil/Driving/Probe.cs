namespace Looseloop.Coil;

/// <summary>What a capacitance hung on the coil's top does to its frequency, and the inverse.</summary>
public static class Probe
{
    /// <summary>The frequency with it, hertz: f sqrt(C / (C + Cp)).</summary>
    /// <param name="frequencyHz">Without it.</param>
    /// <param name="topCapacitanceF">The coil's effective capacitance where it is hung on, farad.</param>
    /// <param name="addedF">The probe with its lead, farad; 0 or more.</param>
    public static double WouldReadHz(double frequencyHz, double topCapacitanceF, double addedF)
    {
        Demand.Frequency(frequencyHz, "the frequency");
        Demand.Capacitance(topCapacitanceF, "the coil's own capacitance");
        Demand.Within(addedF, 0, 1, "the added capacitance", "F");
        return frequencyHz * Math.Sqrt(topCapacitanceF / (topCapacitanceF + addedF));
    }

    /// <summary>The added capacitance over the coil's own that explains two readings: (f/f')^2 - 1. Negative where the second is higher.</summary>
    /// <param name="withoutHz">The reading without it.</param>
    /// <param name="withHz">The reading with it.</param>
    public static double AddedOverOwn(double withoutHz, double withHz)
    {
        Demand.Frequency(withoutHz, "the frequency without it");
        Demand.Frequency(withHz, "the frequency with it");
        double ratio = withoutHz / withHz;
        return (ratio * ratio) - 1;
    }

    /// <summary>Capacitance of a straight thin wire that runs along a plane, farad: 2 pi eps0 l / arcosh(h/r).</summary>
    /// <param name="lengthM">Its length, metres.</param>
    /// <param name="diameterM">Its diameter, metres.</param>
    /// <param name="heightM">Its height above the plane, metres; more than its radius.</param>
    public static double LeadF(double lengthM, double diameterM, double heightM)
    {
        Demand.Length(lengthM, "the length");
        Demand.Length(diameterM, "the diameter");
        Demand.Within(heightM, 0.5001 * diameterM, Demand.LongestM, "the height", "m");
        return 2 * Math.PI * PhysicalConstants.Epsilon0 * lengthM / Math.Acosh(2 * heightM / diameterM);
    }
}
