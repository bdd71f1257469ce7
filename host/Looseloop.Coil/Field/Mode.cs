namespace Looseloop.Coil;

/// <summary>One resonance of a coil, without losses. Amplitudes are for one volt at the top.</summary>
public sealed record Mode
{
    /// <summary>Resonant frequency, hertz.</summary>
    public required double FrequencyHz { get; init; }

    /// <summary>Heights above the winding's base at which the voltage is given, metres; the first is 0.</summary>
    public required IReadOnlyList<double> HeightM { get; init; }

    /// <summary>Voltage there over that at the top.</summary>
    public required IReadOnlyList<double> Voltage { get; init; }

    /// <summary>Current of each band between two heights, amperes per volt at the top.</summary>
    public required IReadOnlyList<double> CurrentPerVolt { get; init; }

    /// <summary>Current into the earthed base, amperes per volt at the top.</summary>
    public required double BaseCurrentPerVolt { get; init; }

    /// <summary>The capacitance that holds the same energy at the top's voltage, farad.</summary>
    public required double TopCapacitanceF { get; init; }

    /// <summary>The inductance that resonates with it, henry: what the two-capacitor method finds with a small capacitor.</summary>
    public double TopInductanceH => 1 / (AngularHz * AngularHz * TopCapacitanceF);

    /// <summary>The inductance that holds the same energy at the base's current, henry.</summary>
    public double BaseInductanceH => TopCapacitanceF / (BaseCurrentPerVolt * BaseCurrentPerVolt);

    /// <summary>2 pi f, rad/s.</summary>
    public double AngularHz => 2 * Math.PI * FrequencyHz;

    /// <summary>Voltage over the top's at a height above the winding's base, metres; by linear interpolation.</summary>
    public double VoltageAt(double heightM)
    {
        int i = 1;
        while (i < HeightM.Count - 1 && HeightM[i] < heightM)
        {
            i++;
        }

        double share = Math.Clamp((heightM - HeightM[i - 1]) / (HeightM[i] - HeightM[i - 1]), 0, 1);
        return Voltage[i - 1] + (share * (Voltage[i] - Voltage[i - 1]));
    }
}
