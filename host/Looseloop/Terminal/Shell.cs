using Spectre.Console;

namespace Looseloop.Terminal;

/// <summary>
/// Where a command's words go: results to the output, everything else (progress, warnings, cautions) to the error stream.
/// </summary>
internal sealed class Shell
{
    public required TextWriter OutText { get; init; }

    public required TextWriter ErrorText { get; init; }

    public required TextReader InText { get; init; }

    /// <summary>Tables and curves on the output.</summary>
    public required IAnsiConsole Out { get; init; }

    /// <summary>Progress and warnings on the error stream.</summary>
    public required IAnsiConsole ErrorConsole { get; init; }

    /// <summary>True if a person watches the output.</summary>
    public required bool OutIsTerminal { get; init; }

    /// <summary>True if a person watches the error stream.</summary>
    public required bool ErrorIsTerminal { get; init; }

    /// <summary>True if a person can answer prompts.</summary>
    public required bool InIsTerminal { get; init; }

    public required TimeProvider Time { get; init; }

    /// <summary>Reads an environment variable; null where it is not set.</summary>
    public required Func<string, string?> Environment { get; init; }

    /// <summary>Cancelled when the user interrupts.</summary>
    public required CancellationToken Cancel { get; init; }

    /// <summary>The signal that cancelled, as an exit code.</summary>
    public Func<int> InterruptCode { get; init; } = () => ExitCode.Interrupted;

    /// <summary>The terminal of this process.</summary>
    public static Shell OfThisProcess(Interrupt interrupt)
    {
        return new Shell
        {
            OutText = Console.Out,
            ErrorText = Console.Error,
            InText = Console.In,
            Out = Ansi(Console.Out, Console.IsOutputRedirected),
            ErrorConsole = Ansi(Console.Error, Console.IsErrorRedirected),
            OutIsTerminal = !Console.IsOutputRedirected,
            ErrorIsTerminal = !Console.IsErrorRedirected,
            InIsTerminal = !Console.IsInputRedirected,
            Time = TimeProvider.System,
            Environment = System.Environment.GetEnvironmentVariable,
            Cancel = interrupt.Token,
            InterruptCode = () => interrupt.ExitCode,
        };
    }

    /// <summary>A sentence on the error stream, after the program's name.</summary>
    public void Error(string message) => ErrorText.WriteLine($"looseloop: {message}");

    /// <summary>A sentence on the error stream that is not about a failure.</summary>
    public void Say(string message) => ErrorText.WriteLine(message);

    private static IAnsiConsole Ansi(TextWriter writer, bool redirected)
    {
        // NO_COLOR and TERM=dumb are honoured by the library's detection; a pipe gets neither colour nor cursor movement.
        IAnsiConsole console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Out = new AnsiConsoleOutput(writer),
            Ansi = redirected ? AnsiSupport.No : AnsiSupport.Detect,
            ColorSystem = redirected ? ColorSystemSupport.NoColors : ColorSystemSupport.Detect,
            Interactive = redirected ? InteractionSupport.No : InteractionSupport.Detect,
        });
        if (redirected)
        {
            console.Profile.Width = 100;
        }

        return console;
    }
}
