using System.CommandLine;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>coil</c>: the coil files.</summary>
internal static class CoilCommand
{
    public static Command Create(Shell shell) => new("coil", "Coil files: begin, list, show and check them.")
    {
        CoilNewCommand.Create(shell),
        CoilListCommand.Create(shell),
        CoilShowCommand.Create(shell),
        CoilCheckCommand.Create(shell),
    };
}
