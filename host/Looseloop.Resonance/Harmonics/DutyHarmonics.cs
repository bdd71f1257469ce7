namespace Looseloop.Resonance;

/// <summary>The harmonics of a pulse train that is high for a part D of its period: a_n = 2 |sin(n pi D)| / (n pi) of its height.</summary>
public static class DutyHarmonics
{
    /// <summary>Amplitude of a harmonic of a pulse train of height 1.</summary>
    /// <param name="harmonic">1 or more.</param>
    /// <param name="duty">0..1; the true one, from the timer's counts.</param>
    public static double Amplitude(int harmonic, double duty)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(harmonic, 1);
        return 2 * Math.Abs(Math.Sin(harmonic * Math.PI * duty)) / (harmonic * Math.PI);
    }

    /// <summary>Amplitude of a harmonic against the fundamental at duty 1/2.</summary>
    /// <param name="harmonic">1 or more.</param>
    /// <param name="duty">0..1; the true one.</param>
    public static double DriveWeight(int harmonic, double duty) => Amplitude(harmonic, duty) / Amplitude(1, 0.5);

    /// <summary>How a response that this harmonic causes changes when the duty goes from one value to another.</summary>
    /// <param name="harmonic">1 or more.</param>
    /// <param name="duty">The duty after.</param>
    /// <param name="referenceDuty">The duty before; the harmonic must not vanish there.</param>
    public static double Ratio(int harmonic, double duty, double referenceDuty) =>
        Amplitude(harmonic, duty) / Amplitude(harmonic, referenceDuty);
}
