using System.CommandLine;
using Looseloop.Bench;
using Looseloop.Boxes;
using Looseloop.Link;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>bench</c>: serves a virtual box on a pseudo-terminal in real time, as if it were plugged in.</summary>
internal sealed class BenchCommand(Shell shell)
{
    private readonly Argument<string?> _world = new("WORLD")
    {
        Description = "One of the worlds of --list, or a world file.",
        Arity = ArgumentArity.ZeroOrOne,
    };

    private readonly Option<bool> _list = new("--list") { Description = "List the worlds that ship with the program." };
    private readonly Option<bool> _show = new("--show") { Description = "Print the world's file, as a start for one's own." };

    public static Command Create(Shell shell) => new BenchCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("bench", "Serve a virtual coil and box on a pseudo-terminal, until interrupted.")
        {
            Arguments = { _world },
            Options = { _list, _show, BoxChoice.SeedOption },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        string name = parsed.GetValue(_world) ?? WorldShelf.Default;
        try
        {
            if (parsed.GetValue(_list))
            {
                return List();
            }

            if (parsed.GetValue(_show) && WorldShelf.Names.Contains(name))
            {
                shell.OutText.Write(WorldShelf.TextOf(name));
                return ExitCode.Ok;
            }

            return Serve(WorldShelf.Load(name), parsed.GetValue(BoxChoice.SeedOption));
        }
        catch (WorldFileException error)
        {
            throw new UserError(error.Message);
        }
    }

    private int List()
    {
        Table table = new Table().Border(TableBorder.Simple).AddColumns("world", "what it is");
        foreach (string name in WorldShelf.Names)
        {
            table.AddRow(name, Markup.Escape(WorldShelf.Load(name).About.Trim()));
        }

        shell.Out.Write(table);
        return ExitCode.Ok;
    }

    private int Serve(World world, ulong seed)
    {
        if (!PseudoTerminal.IsSupported)
        {
            throw new UserError($"A pseudo-terminal needs Linux. Here, use --box bench:{world.Name} instead.", ExitCode.Failure);
        }

        using var line = new PseudoTerminal();
        using var box = new VirtualBox(world, seed);
        shell.OutText.WriteLine(line.SlavePath);
        shell.OutText.Flush();
        shell.Say($"The world '{world.Name}' is on {line.SlavePath}. In another terminal: looseloop read --box {line.SlavePath}. Ctrl-C ends it.");
        new BenchServer(box, line).Run(shell.Cancel);
        return ExitCode.Ok;
    }
}
