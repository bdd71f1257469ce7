using Looseloop.Procedures.Commissioning;
using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Boxes;

/// <summary>Nobody answers prompts: readings were given on the command line, or their step is skipped.</summary>
internal sealed class StatedAttendant(Shell shell, StatedAnswers counter, double digitHz, StatedAnswers means, double supply, bool sourceIsOn) : IAttendant
{
    public TimeSpan Hold => TimeSpan.FromSeconds(0.2);

    public double CounterDigitHz => digitHz;

    public void Prepare(string instruction) => shell.Say(instruction);

    public void Driving(Setting setting)
    {
    }

    public double? CounterHz(Setting setting) => counter.Next();

    public double? MeanShare(Setting setting) => means.Next() / supply;

    public bool Bring(ToneSource tone, double aboutHz) => tone == ToneSource.Steady && sourceIsOn;
}
