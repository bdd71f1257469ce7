using System.CommandLine;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary>The commands, in the order of the help.</summary>
internal static class CommandList
{
    public static IEnumerable<Command> Create(Shell shell)
    {
        yield return ReadCommand.Create(shell);
        yield return SurveyCommand.Create(shell);
        yield return LogCommand.Create(shell);
        yield return CommissionCommand.Create(shell);
        yield return LadderCommand.Create(shell);
        yield return StandoffCommand.Create(shell);
        yield return SetUpCommand.Create(shell);
        yield return TrimCommand.Create(shell);
        yield return HistoryCommand.Create(shell);
        yield return ShowCommand.Create(shell);
        yield return CompareCommand.Create(shell);
        yield return RefitCommand.Create(shell);
        yield return DriftCommand.Create(shell);
        yield return ExportCommand.Create(shell);
        yield return ImportCommand.Create(shell);
        yield return FitCommand.Create(shell);
        yield return BenchCommand.Create(shell);
        yield return BoxesCommand.Create(shell);
        yield return CoilCommand.Create(shell);
        yield return ExpectCommand.Create(shell);
        yield return ProbeCommand.Create(shell);
        yield return TankCommand.Create(shell);
        yield return WindowCommand.Create(shell);
        yield return CoupleCommand.Create(shell);
        yield return PadCommand.Create(shell);
    }
}
