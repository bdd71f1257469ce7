using System.CommandLine;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>coil show</c>: a coil's dimensions and what follows from them at once.</summary>
internal sealed class CoilShowCommand(Shell shell)
{
    private readonly CoilArgument _coil = new(shell, required: true);

    public static Command Create(Shell shell) => new CoilShowCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("show", "Show a coil's dimensions.");
        _coil.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        CoilGeometry coil = _coil.Load(parsed)!;
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                CoilText.WriteJson(json, coil);
            }));
        }
        else
        {
            CoilText.Write(shell.Out, coil);
        }

        return ExitCode.Ok;
    }
}
