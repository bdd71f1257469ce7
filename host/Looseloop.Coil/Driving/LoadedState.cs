namespace Looseloop.Coil;

/// <summary>
/// What arcs are assumed to do to a coil. Readings and expectations are small-signal; streamers add capacitance at the top and take
/// power. The defaults are common practice, no source.
/// </summary>
/// <param name="StreamerF">Capacitance that the streamers add at the top, farad, 0 or more.</param>
/// <param name="Q">Quality factor with arcs.</param>
public sealed record LoadedState(double StreamerF, double Q)
{
    /// <summary>2 pF of streamer and a Q of 20: common practice, no source.</summary>
    public static LoadedState CommonPractice { get; } = new(2e-12, 20);

    /// <summary>What must stand beside every figure made with it.</summary>
    public const string Caution =
        "Loaded figures are guesses (common practice, no source): arcs lower f0 by several per cent and Q to tens, and both move with every streamer.";

    /// <summary>Frequency with the streamers on, hertz: f sqrt(C / (C + Cs)).</summary>
    /// <param name="coldHz">As read or expected.</param>
    /// <param name="topCapacitanceF">The coil's effective capacitance at its top, farad.</param>
    public double FrequencyHz(double coldHz, double topCapacitanceF)
    {
        Demand.Within(StreamerF, 0, 1e-9, "streamer capacitance", "F");
        return Probe.WouldReadHz(coldHz, topCapacitanceF, StreamerF);
    }
}
