namespace Looseloop.Readings;

/// <summary>One realisable drive point of a box's timer.</summary>
/// <param name="DutyBits">The period is 2^DutyBits counts.</param>
/// <param name="Divider">Clock divider in 1/256.</param>
/// <param name="DutyCount">The output is high for this many counts, 1 .. 2^DutyBits - 1.</param>
/// <param name="FrequencyHz">The exact frequency of the setting, hertz; never a requested one.</param>
public readonly record struct Setting(int DutyBits, int Divider, int DutyCount, double FrequencyHz)
{
    /// <summary>The true duty, 0..1.</summary>
    public double Duty => (double)DutyCount / (1 << DutyBits);
}
