using Looseloop.Readings;
using Looseloop.Resonance;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>A bare fit as a person reads it.</summary>
internal static class FitText
{
    public static void Write(IAnsiConsole console, in ResonanceFit fit, FitVerdict judged)
    {
        if (fit.IsFitted && judged.Verdict != Verdict.None)
        {
            double f0 = 2 * fit.F0StandardHz;
            double q = 2 * fit.Q * fit.QRelativeStandard;
            Grid grid = new Grid().AddColumns(3);
            grid.AddRow("[bold]f0[/]", $"[bold]{Figures.Value(fit.F0Hz, f0)} Hz[/]", $"± {Figures.Uncertainty(f0)} Hz");
            grid.AddRow("[bold]Q[/]", $"[bold]{Figures.Value(fit.Q, q)}[/]", $"± {Figures.Uncertainty(q)}");
            grid.AddRow("[dim]bandwidth[/]", $"[dim]{fit.BandwidthHz:0.#} Hz[/]", "");
            grid.AddRow("[dim]feed-through[/]", $"[dim]{fit.FeedThrough.Ratio:P1} of the peak[/]", "");
            grid.AddRow("[dim]residual[/]", $"[dim]{fit.ResidualRatio:P2} of the peak[/]", "");
            console.Write(grid);
        }

        console.MarkupLine($"[bold]{Verdicts.Markup(judged.Verdict)}[/]");
        foreach (Reason reason in judged.Reasons)
        {
            console.MarkupLineInterpolated($"  {reason.Name}: {reason.Detail}");
            console.MarkupLineInterpolated($"  [dim]-> {reason.Advice}[/]");
        }
    }
}
