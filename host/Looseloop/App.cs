using System.CommandLine;
using System.Globalization;
using Looseloop.Commands;
using Looseloop.Terminal;

namespace Looseloop;

/// <summary>The whole program behind its process: arguments in, exit code out.</summary>
internal static class App
{
    private const string Job = "Reads the resonant frequency f0 and the quality factor Q of high-voltage air-core coils without touching them.";

    /// <summary>Runs one command.</summary>
    /// <param name="args">The command line without the program's name.</param>
    /// <param name="shell">Where its words go and come from.</param>
    public static int Run(string[] args, Shell shell)
    {
        // Figures are written one way everywhere, so that a script reads them anywhere.
        CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;
        ParseResult parsed = Root(shell).Parse(args);
        if (parsed.Errors.Count > 0 && parsed.Action is not System.CommandLine.Help.HelpAction)
        {
            foreach (string message in parsed.Errors.Select(error => error.Message).Distinct())
            {
                shell.Error(message);
            }

            shell.Error($"`{string.Join(' ', CommandPath(parsed))} --help` shows what it takes.");
            return ExitCode.Usage;
        }

        var configuration = new InvocationConfiguration
        {
            Output = shell.OutText,
            Error = shell.ErrorText,
            EnableDefaultExceptionHandler = false,
        };
        return Guard.Run(shell, () => parsed.Invoke(configuration));
    }

    private static RootCommand Root(Shell shell)
    {
        var root = new RootCommand(Job);
        foreach (Option option in CommonOptions.All)
        {
            root.Options.Add(option);
        }

        foreach (Command command in CommandList.Create(shell))
        {
            root.Subcommands.Add(command);
        }

        return root;
    }

    private static Stack<string> CommandPath(ParseResult parsed)
    {
        var names = new Stack<string>();
        for (System.CommandLine.Parsing.CommandResult? at = parsed.CommandResult; at is not null; at = at.Parent as System.CommandLine.Parsing.CommandResult)
        {
            names.Push(at.Command is RootCommand ? "looseloop" : at.Command.Name);
        }

        return names;
    }
}
