namespace Looseloop.Resonance;

/// <summary>One point of a response curve, as the fit takes it.</summary>
/// <param name="FrequencyHz">
/// Frequency at which the coil was driven, hertz, above 0: the exact one of the setting; for a vernier setting its third or fifth
/// multiple.
/// </param>
/// <param name="Amplitude">Amplitude in any one unit, the detector's zero taken off; noise may make it negative.</param>
/// <param name="Variance">Its variance, the unit squared; 0 or NaN where unknown.</param>
/// <param name="Group">
/// Points of one group share a constant feed-through power: 0 for plain points, another number for each harmonic of a vernier.
/// 0 .. <see cref="ResonanceFitter.MostGroups"/> - 1.
/// </param>
/// <param name="DriveWeight">
/// Amplitude of the driving harmonic against that of the others, above 0: 1 throughout, or from the true duties
/// (<see cref="DutyHarmonics"/>).
/// </param>
public readonly record struct FitPoint(
    double FrequencyHz, double Amplitude, double Variance = double.NaN, int Group = 0, double DriveWeight = 1)
{
    /// <summary>
    /// Variance of the power where the noise belongs to the power (a square-law output), the unit to the fourth; NaN for noise
    /// that belongs to the amplitude. The residual of such a point is taken in power.
    /// </summary>
    public double PowerVariance { get; init; } = double.NaN;

    /// <summary>A point whose detector gives power with noise of its own, from that power.</summary>
    /// <param name="frequencyHz">See <see cref="FrequencyHz"/>.</param>
    /// <param name="power">Amplitude squared, the zero taken off; noise may make it negative.</param>
    /// <param name="powerVariance">Its variance, above 0.</param>
    /// <param name="group">See <see cref="Group"/>.</param>
    /// <param name="driveWeight">See <see cref="DriveWeight"/>.</param>
    public static FitPoint FromPower(double frequencyHz, double power, double powerVariance, int group = 0, double driveWeight = 1)
    {
        double amplitude = double.CopySign(Math.Sqrt(Math.Abs(power)), power);
        double variance = powerVariance / (4 * Math.Max(Math.Abs(power), Math.Sqrt(powerVariance)));
        return new FitPoint(frequencyHz, amplitude, variance, group, driveWeight) { PowerVariance = powerVariance };
    }
}
