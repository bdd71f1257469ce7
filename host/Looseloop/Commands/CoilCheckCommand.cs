using System.CommandLine;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>coil check</c>: everything that is wrong with a coil file, with its lines.</summary>
internal sealed class CoilCheckCommand(Shell shell)
{
    private readonly Argument<string> _coil = new("COIL") { Description = "A coil's name or a coil file." };

    public static Command Create(Shell shell) => new CoilCheckCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("check", "Check a coil file; every error is told with its line.") { Arguments = { _coil } };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        (string text, string place) = new CoilShelf(shell).Find(parsed.GetValue(_coil)!);
        CoilFileResult result = CoilFile.Parse(text);
        bool good = result.Coil is not null;
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.WriteString("place", place);
                json.WriteBoolean("good", good);
                json.Objects("errors", result.Errors, e =>
                {
                    json.WriteNumber("line", e.Line);
                    json.WriteString("text", e.Text);
                });
            }));
        }
        else if (good)
        {
            shell.OutText.WriteLine($"{place}: good");
        }
        else
        {
            foreach (CoilFileError error in result.Errors)
            {
                shell.OutText.WriteLine(FormattableString.Invariant($"{place}:{error.Line}: {error.Text}"));
            }
        }

        return good ? ExitCode.Ok : ExitCode.Usage;
    }
}
