using Looseloop.Bench;
using Looseloop.Procedures.Commissioning;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Commissioning;

/// <summary>Instruments on a virtual box, each of which a test may spoil.</summary>
internal sealed class BenchHands(VirtualBox box) : IAttendant
{
    public TimeSpan Hold => TimeSpan.FromSeconds(0.2);

    public double CounterDigitHz { get; init; } = 1;

    public Func<double, double?> Counter { get; init; } = hertz => Math.Round(hertz);

    public Func<double, double?> Meter { get; init; } = share => share;

    /// <summary>Amplitude of the tone, volts; null: there is no source.</summary>
    public double? ToneVolts { get; init; } = 0.3;

    public List<ToneSource> Brought { get; } = [];

    public void Prepare(string instruction)
    {
    }

    public void Driving(Setting setting)
    {
    }

    public double? CounterHz(Setting setting) => Counter(box.Board.DriveHz);

    public double? MeanShare(Setting setting) => Meter(
        ((double)box.Board.DutyCount / (1L << box.Board.DutyBits)) + (box.Board.World.Drive.HighExtraNs * 1e-9 * box.Board.DriveHz));

    public bool Bring(ToneSource tone, double aboutHz)
    {
        Brought.Add(tone);
        if (ToneVolts is not double volts)
        {
            return false;
        }

        var steady = new Carrier { FrequencyHz = aboutHz, Volts = volts };
        box.Board.Bring(tone switch
        {
            ToneSource.Steady => steady,
            ToneSource.Chopped => steady with { PeriodS = 0.2, OnS = 0.001 },
            _ => null,
        });
        return true;
    }
}
