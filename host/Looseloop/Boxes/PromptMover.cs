using Looseloop.Box;
using Looseloop.Readings;
using Looseloop.Resonance;
using Looseloop.Terminal;

namespace Looseloop.Boxes;

/// <summary>A person moves things and presses Enter.</summary>
internal sealed class PromptMover(Shell shell, ChosenBox box) : IMover
{
    private static readonly TimeSpan _stepBack = TimeSpan.FromSeconds(4);

    public DetectorLaw? Law => box.Law;

    /// <summary>What to do, in a sentence.</summary>
    public static string Instruction(StandoffMove moved, int place)
    {
        (string this_, string other) = moved == StandoffMove.Pickup ? ("pickup", "loop") : ("loop", "pickup");
        return place == 0
            ? $"Put loop and pickup at their usual places: next, only the {this_} will be moved."
            : $"Move only the {this_}, away from the coil until it reads some two thirds as much. Leave the {other}, the cable and everything else.";
    }

    public BoxSession Place(StandoffMove moved, int place)
    {
        shell.ErrorText.Write($"{Instruction(moved, place)} Then press Enter and step back: ");
        if (shell.InText.ReadLine() is null)
        {
            throw new UserError("The input has ended. Nothing was kept.", ExitCode.Failure);
        }

        shell.Cancel.ThrowIfCancellationRequested();
        box.Session.Pause(_stepBack);
        return box.Session;
    }

    public void Dispose() => box.Dispose();
}
