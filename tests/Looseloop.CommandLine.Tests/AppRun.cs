using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.CommandLine.Tests;

/// <summary>Runs the program in this process, as a script would: no terminal on any stream.</summary>
internal sealed record AppRun(int ExitCode, string Out, string Error)
{
    public static AppRun Of(params string[] args) => With([], args);

    public static AppRun With(Dictionary<string, string> environment, params string[] args)
    {
        using var output = new StringWriter();
        using var error = new StringWriter();
        var shell = new Shell
        {
            OutText = output,
            ErrorText = error,
            InText = TextReader.Null,
            Out = Console(output),
            ErrorConsole = Console(error),
            OutIsTerminal = false,
            ErrorIsTerminal = false,
            InIsTerminal = false,
            Time = TimeProvider.System,
            Environment = name => environment.GetValueOrDefault(name),
            Cancel = CancellationToken.None,
        };
        int exitCode = App.Run(args, shell);
        return new AppRun(exitCode, output.ToString(), error.ToString());
    }

    private static IAnsiConsole Console(TextWriter writer)
    {
        IAnsiConsole console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Out = new AnsiConsoleOutput(writer),
            Ansi = AnsiSupport.No,
            ColorSystem = ColorSystemSupport.NoColors,
            Interactive = InteractionSupport.No,
        });
        console.Profile.Width = 100;
        return console;
    }
}
