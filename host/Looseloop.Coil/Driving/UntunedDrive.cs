namespace Looseloop.Coil;

/// <summary>
/// A primary driven straight from a bridge, with no tank capacitor: nothing but its own reactance and what the secondary reflects
/// limits the current.
/// </summary>
public sealed record UntunedDrive
{
    /// <summary>Reactance of the primary at the drive frequency, ohm.</summary>
    public required double ReactanceOhm { get; init; }

    /// <summary>Amplitude of the bridge's fundamental, volts: (4/pi) V for four switches, (2/pi) V for two.</summary>
    public required double FundamentalV { get; init; }

    /// <summary>Peak of the triangular current with no secondary, amperes: V/(4 f L) for four switches, half for two.</summary>
    public required double TrianglePeakA { get; init; }

    /// <summary>Resistance that a secondary in resonance reflects, ohm: (w M)^2 / Rs = k^2 Q w Lp.</summary>
    public required double ReflectedOhm { get; init; }

    /// <summary>Amplitude of the fundamental of the current with the secondary in resonance, amperes.</summary>
    public required double ResonantPeakA { get; init; }

    /// <summary>Power into the secondary then, watts.</summary>
    public required double PowerW { get; init; }

    /// <summary>What must stand beside the currents.</summary>
    public const string Caution =
        "Currents and power are estimates for an ideal supply; begin at a fraction of the voltage with a current limit, as the venue's rules allow.";

    /// <summary>Works it out.</summary>
    /// <param name="inductanceH">Of the primary in use.</param>
    /// <param name="frequencyHz">Drive frequency.</param>
    /// <param name="busVoltageV">Supply of the bridge, volts.</param>
    /// <param name="fullBridge">Four switches, or two.</param>
    /// <param name="k">Coupling to the secondary, 0 .. below 1.</param>
    /// <param name="secondaryQ">Its quality factor in the state meant (cold or loaded).</param>
    public static UntunedDrive Of(
        double inductanceH, double frequencyHz, double busVoltageV, bool fullBridge, double k, double secondaryQ)
    {
        Demand.Inductance(inductanceH, "the inductance");
        Demand.Frequency(frequencyHz, "the frequency");
        Demand.Within(busVoltageV, 1e-3, 1e6, "the bus voltage", "V");
        Demand.Within(k, 0, 0.999, "the coupling", "");
        Demand.Quality(secondaryQ, "the secondary's Q");
        double swing = fullBridge ? busVoltageV : busVoltageV / 2;
        double x = 2 * Math.PI * frequencyHz * inductanceH;
        double fundamental = 4 / Math.PI * swing;
        double reflected = k * k * secondaryQ * x;
        double current = fundamental / double.Hypot(x, reflected);
        return new UntunedDrive
        {
            ReactanceOhm = x,
            FundamentalV = fundamental,
            TrianglePeakA = swing / (4 * frequencyHz * inductanceH),
            ReflectedOhm = reflected,
            ResonantPeakA = current,
            PowerW = current * current * reflected / 2,
        };
    }
}
