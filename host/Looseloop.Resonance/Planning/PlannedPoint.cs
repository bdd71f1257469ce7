using Looseloop.Readings;

namespace Looseloop.Resonance;

/// <summary>One visit of a planned sweep.</summary>
/// <param name="Setting">Where the drive is to stand.</param>
/// <param name="Harmonic">Which harmonic of it drives the coil: 1, 3 or 5.</param>
/// <param name="Samples">How many samples.</param>
/// <param name="DwellS">How long to wait before the first, seconds.</param>
public readonly record struct PlannedPoint(Setting Setting, int Harmonic, int Samples, double DwellS)
{
    /// <summary>Coil-side frequency, hertz.</summary>
    public double FrequencyHz => Harmonic * Setting.FrequencyHz;

    /// <summary>The fit's group for this harmonic: 0, 1, 2 for 1, 3, 5.</summary>
    public int Group => Harmonic / 2;

    /// <summary>The fit's drive weight, from the true duty.</summary>
    public double DriveWeight => DutyHarmonics.DriveWeight(Harmonic, Setting.Duty);
}
