namespace Looseloop.Coil;

/// <summary>How far a driver may be off resonance for a given fraction of the amplitude.</summary>
/// <param name="LowerHz">The lower edge, hertz.</param>
/// <param name="UpperHz">The upper edge, hertz.</param>
public sealed record DetuningWindow(double LowerHz, double UpperHz)
{
    /// <summary>From edge to edge, hertz.</summary>
    public double WidthHz => UpperHz - LowerHz;

    /// <summary>
    /// The coarsest step of a driver's oscillator that always has a setting inside, hertz: the window's own width. Half of it leaves
    /// room for drift.
    /// </summary>
    public double CoarsestStepHz => WidthHz;

    /// <summary>
    /// The exact edges of a resonant circuit: |H| = 1/sqrt(1 + Q^2 (f/f0 - f0/f)^2) equals the fraction; their product is f0^2
    /// (Terman, Radio Engineers' Handbook, 1943).
    /// </summary>
    /// <param name="f0Hz">Resonance.</param>
    /// <param name="q">Quality factor.</param>
    /// <param name="fraction">Of the amplitude, above 0 and below 1.</param>
    public static DetuningWindow Exact(double f0Hz, double q, double fraction)
    {
        double d = Relative(f0Hz, q, fraction) / 2;
        double root = Math.Sqrt(1 + (d * d));
        return new DetuningWindow(f0Hz / (root + d), f0Hz * (root + d));
    }

    /// <summary>Half of the window, hertz, in the narrow-band form: (f0/2Q) sqrt(1/a^2 - 1).</summary>
    public static double NarrowHalfWidthHz(double f0Hz, double q, double fraction) => f0Hz * Relative(f0Hz, q, fraction) / 2;

    /// <summary>Fraction of the amplitude left at a frequency, exact form.</summary>
    public static double AmplitudeAt(double f0Hz, double q, double driveHz)
    {
        Demand.Frequency(f0Hz, "f0");
        Demand.Frequency(driveHz, "the drive frequency");
        Demand.Quality(q, "Q");
        double d = q * ((driveHz / f0Hz) - (f0Hz / driveHz));
        return 1 / Math.Sqrt(1 + (d * d));
    }

    /// <summary>Whether a frequency lies inside.</summary>
    public bool Contains(double frequencyHz) => frequencyHz >= LowerHz && frequencyHz <= UpperHz;

    /// <summary>
    /// How far an oscillator moves when one of its components is off, hertz. An LC oscillator follows half of it (f ~ C^-1/2), an RC
    /// oscillator all of it; both exact.
    /// </summary>
    /// <param name="oscillatorHz">Its frequency.</param>
    /// <param name="componentRelative">The component's error, such as .05; above -1.</param>
    /// <param name="isResonant">True for an LC oscillator, false for an RC one.</param>
    public static double OscillatorShiftHz(double oscillatorHz, double componentRelative, bool isResonant)
    {
        Demand.Frequency(oscillatorHz, "the oscillator's frequency");
        Demand.Within(componentRelative, -0.99, 100, "the component's tolerance", "");
        double factor = 1 / (1 + componentRelative);
        return oscillatorHz * ((isResonant ? Math.Sqrt(factor) : factor) - 1);
    }

    /// <summary>
    /// How long until warm-up drift f(t) = f_inf + d exp(-t/tau) carries the resonance so far that a fixed driver leaves the window,
    /// seconds; null where it never does. The driver was set on resonance at the start; window edges move with the resonance.
    /// </summary>
    /// <param name="driftHz">d: how far above its end value the resonance starts, hertz; either sign.</param>
    /// <param name="timeConstantS">tau, seconds.</param>
    public double? LeavesAfterS(double driftHz, double timeConstantS)
    {
        Demand.Within(driftHz, -1e9, 1e9, "the drift", "Hz");
        Demand.Within(timeConstantS, 1e-3, 1e9, "the time constant", "s");
        // The resonance has moved by -d (1 - exp(-t/tau)); the driver then stands on the other side of it.
        double centre = Math.Sqrt(LowerHz * UpperHz);
        double room = driftHz > 0 ? UpperHz - centre : centre - LowerHz;
        double share = room / Math.Abs(driftHz);
        return driftHz == 0 || share >= 1 ? null : -timeConstantS * Math.Log(1 - share);
    }

    private static double Relative(double f0Hz, double q, double fraction)
    {
        Demand.Frequency(f0Hz, "f0");
        Demand.Quality(q, "Q");
        Demand.Within(fraction, 1e-6, 1 - 1e-9, "the fraction of the amplitude", "");
        return Math.Sqrt((1 / (fraction * fraction)) - 1) / q;
    }
}
