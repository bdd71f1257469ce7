using Looseloop.Bench;
using Looseloop.Procedures.Commissioning;
using Looseloop.Readings;

namespace Looseloop.Boxes;

/// <summary>On the bench the program reads the instruments itself: they show what the virtual board really does.</summary>
internal sealed class BenchAttendant(VirtualBox box, StatedAnswers counter, double digitHz, StatedAnswers means, double supply) : IAttendant
{
    /// <summary>Amplitude of the tone at the detector's input, volts: more than a tenth of any shipped detector's range.</summary>
    private const double ToneVolts = 0.3;

    private readonly bool _countsAreStated = counter.Any;
    private readonly bool _meansAreStated = means.Any;

    public TimeSpan Hold => TimeSpan.FromSeconds(0.2);

    public double CounterDigitHz => digitHz;

    public void Prepare(string instruction)
    {
    }

    public void Driving(Setting setting)
    {
    }

    public double? CounterHz(Setting setting) =>
        _countsAreStated ? counter.Next() : Math.Round(box.Board.DriveHz / digitHz) * digitHz;

    public double? MeanShare(Setting setting)
    {
        DriveStage stage = box.Board.World.Drive;
        return _meansAreStated
            ? means.Next() / supply
            : ((double)box.Board.DutyCount / (1L << box.Board.DutyBits)) + (stage.HighExtraNs * 1e-9 * box.Board.DriveHz);
    }

    public bool Bring(ToneSource tone, double aboutHz)
    {
        var steady = new Carrier { FrequencyHz = aboutHz, Volts = ToneVolts };
        box.Board.Bring(tone switch
        {
            ToneSource.Steady => steady,
            ToneSource.Chopped => steady with { PeriodS = 0.2, OnS = 0.001 },
            _ => null,
        });
        return true;
    }
}
