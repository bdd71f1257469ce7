using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.CommandLine.Tests;

/// <summary>Runs the program in this process, as a script would: no terminal on any stream.</summary>
internal sealed record AppRun(int ExitCode, string Out, string Error)
{
    public static AppRun Of(params string[] args) => With([], args);

    public static AppRun With(Dictionary<string, string> environment, params string[] args) =>
        Run(environment, new StringReader(""), false, new StringWriter(), args);

    /// <summary>With a person at the keyboard who types these lines.</summary>
    public static AppRun Answering(string[] lines, params string[] args) =>
        Run([], new StringReader(string.Join('\n', lines)), true, new StringWriter(), args);

    /// <summary>Interrupted as soon as a line of the error stream begins with these words.</summary>
    public static AppRun InterruptedAt(string words, params string[] args)
    {
        using var source = new CancellationTokenSource();
        return Run([], new StringReader(""), false, new TripWriter(words, source), args, source.Token);
    }

    private static AppRun Run(
        Dictionary<string, string> environment, TextReader input, bool person, StringWriter error, string[] args, CancellationToken cancel = default)
    {
        using var output = new StringWriter();
        var shell = new Shell
        {
            OutText = output,
            ErrorText = error,
            InText = input,
            Out = Console(output),
            ErrorConsole = Console(error),
            OutIsTerminal = false,
            ErrorIsTerminal = false,
            InIsTerminal = person,
            Time = TimeProvider.System,
            Environment = name => environment.GetValueOrDefault(name),
            Cancel = cancel,
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

    private sealed class TripWriter(string words, CancellationTokenSource source) : StringWriter
    {
        public override void WriteLine(string? value)
        {
            base.WriteLine(value);
            if (value?.StartsWith(words, StringComparison.Ordinal) ?? false)
            {
                source.Cancel();
            }
        }
    }
}
