using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>A verdict as markup and as an exit code.</summary>
internal static class Verdicts
{
    public static string Markup(Verdict verdict) => verdict switch
    {
        Verdict.Sound => "[green]sound[/]",
        Verdict.Doubtful => "[yellow]doubtful[/]",
        _ => "[red]none[/]",
    };

    public static int ExitCodeOf(Verdict verdict) => verdict == Verdict.Sound ? ExitCode.Ok : ExitCode.NotTrustworthy;
}
