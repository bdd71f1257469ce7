using Looseloop.Box;
using Looseloop.Readings;
using Looseloop.Resonance;
using Looseloop.Terminal;

namespace Looseloop.Boxes;

/// <summary>Nobody answers prompts: things are moved in the pauses that are announced.</summary>
internal sealed class TimedMover(Shell shell, ChosenBox box, double pauseS) : IMover
{
    public DetectorLaw? Law => box.Law;

    public BoxSession Place(StandoffMove moved, int place)
    {
        shell.Say($"{PromptMover.Instruction(moved, place)} The reading begins in {pauseS:0} s.");
        for (double left = pauseS; left > 0; left -= 0.5)
        {
            shell.Cancel.ThrowIfCancellationRequested();
            box.Session.Pause(TimeSpan.FromSeconds(Math.Min(left, 0.5)));
        }

        return box.Session;
    }

    public void Dispose() => box.Dispose();
}
