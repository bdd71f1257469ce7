using System.CommandLine;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>coil new</c>: begins a coil file to be filled in.</summary>
internal sealed class CoilNewCommand(Shell shell)
{
    private readonly Argument<string> _name = new("NAME") { Description = "The new coil's name." };
    private readonly Option<string> _like = new("--like")
    {
        Description = "A coil, file or example to begin from (foyer).",
        HelpName = "COIL",
        DefaultValueFactory = _ => "foyer",
    };

    private readonly Option<string[]> _set = new("--set")
    {
        Description = "A dimension, such as turns=900; may be repeated.",
        HelpName = "KEY=VALUE",
        DefaultValueFactory = _ => [],
    };

    private readonly Option<bool> _force = new("--force") { Description = "Write over a coil file of that name." };

    public static Command Create(Shell shell) => new CoilNewCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("new", "Begin a coil file from an example, to be filled in with an editor.")
        {
            Arguments = { _name },
            Options = { _like, _set, _force },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        string name = parsed.GetValue(_name)!;
        if (string.IsNullOrWhiteSpace(name) || name.IndexOfAny(Path.GetInvalidFileNameChars()) >= 0 || name.StartsWith('.') || name.Contains('\\', StringComparison.Ordinal))
        {
            throw new UserError($"'{name}' cannot be the name of a file: use letters, digits, spaces and dashes.");
        }

        var shelf = new CoilShelf(shell);
        CoilGeometry coil = CoilArgument.Changed(shelf.Load(parsed.GetValue(_like)!) with { Name = name, Note = null }, parsed.GetValue(_set) ?? []);
        string file = shelf.FileFor(name);
        if (File.Exists(file) && !parsed.GetValue(_force))
        {
            throw new UserError($"There is a coil {name} already, in {file}; it was left as it is. --force writes over it.");
        }

        Directory.CreateDirectory(shelf.Folder);
        // Beside it first: a file that is there is never half written.
        string beside = file + ".new";
        File.WriteAllText(beside, CoilFileText.Of(coil));
        File.Move(beside, file, overwrite: true);
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.WriteString("name", name);
                json.WriteString("file", file);
            }));
        }
        else
        {
            shell.OutText.WriteLine(file);
            shell.Say($"Fill in the dimensions with an editor, then: looseloop coil check {name}");
        }

        return ExitCode.Ok;
    }
}
