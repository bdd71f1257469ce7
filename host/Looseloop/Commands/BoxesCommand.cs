using System.CommandLine;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>boxes</c>: which ports could be a box, and which of them answer.</summary>
internal static class BoxesCommand
{
    public static Command Create(Shell shell)
    {
        var command = new Command("boxes", "List the ports that could be a sweep box, and ask each what it is.");
        command.SetAction(parsed => ExitCode.Ok);
        return command;
    }
}
