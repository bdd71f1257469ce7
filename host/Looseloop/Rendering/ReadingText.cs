using Looseloop.Readings;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>A reading as a person reads it: figures, verdict, reasons.</summary>
internal static class ReadingText
{
    public static void Write(IAnsiConsole console, Reading reading)
    {
        if (double.IsFinite(reading.F0Hz))
        {
            Grid figures = new Grid().AddColumns(4);
            figures.AddRow("", "", "[dim]between readings[/]", "[dim]absolute[/]");
            Row(figures, "f0", reading.F0Hz, " Hz", Intervals.F0Hz(reading, false), Intervals.F0Hz(reading, true));
            Row(figures, "Q", reading.Q, "", Intervals.Q(reading, false), Intervals.Q(reading, true));
            console.Write(figures);
        }

        if (double.IsFinite(reading.RingQ))
        {
            double ring = 2 * reading.RingQ * reading.RingQRelative;
            console.MarkupLine($"Q by ring-down {Figures.Value(reading.RingQ, ring)} ± {Figures.Uncertainty(ring)}");
        }

        console.MarkupLine($"[bold]{Verdicts.Markup(reading.Verdict)}[/]");
        foreach (Reason reason in reading.Reasons.Where(reason => reason.AtBest < Verdict.Sound))
        {
            console.MarkupLineInterpolated($"  {reason.Name}: {reason.Detail}");
            console.MarkupLineInterpolated($"  [dim]-> {reason.Advice}[/]");
        }
    }

    /// <summary>What widened the budget, and how the reading was made; said once, on the side.</summary>
    public static void WriteNotes(IAnsiConsole console, Reading reading)
    {
        if (double.IsFinite(reading.F0Hz))
        {
            console.MarkupLineInterpolated(
                $"[dim]peak {reading.PeakCounts:0} counts, feed-through {reading.FeedThrough:P1}, {reading.Points.Count} points, {reading.BoardSeconds:0.0} s of board time. Intervals are 95 %; cold, small-signal.[/]");
        }

        foreach (Reason reason in reading.Reasons.Where(reason => reason.AtBest == Verdict.Sound))
        {
            console.MarkupLineInterpolated($"[dim]{reason.Detail} {reason.Advice}[/]");
        }
    }

    /// <summary>The budget, term by term.</summary>
    public static void WriteBudget(IAnsiConsole console, Reading reading)
    {
        Table table = new Table().Border(TableBorder.Simple).AddColumns("term", "u(f0) Hz", "u(Q) %", "kind", "from");
        table.Columns[1].RightAligned();
        table.Columns[2].RightAligned();
        foreach (BudgetLine line in reading.Budget.Lines)
        {
            table.AddRow(line.Term, Digits(line.F0Hz), Digits(100 * line.QRelative), line.Repeatability ? "repeatability" : "common", line.Origin);
        }

        table.AddRow("combined, repeatability", Digits(reading.Budget.F0Hz(false)), Digits(100 * reading.Budget.QRelative(false)), "", "");
        table.AddRow("combined, absolute", Digits(reading.Budget.F0Hz(true)), Digits(100 * reading.Budget.QRelative(true)), "", "");
        console.Write(table);
        if (reading.Reasons.Any(reason => reason.Code == ReasonCode.NotCommissioned))
        {
            console.MarkupLine("[yellow]The box was never commissioned: that these terms are all there is has not been checked.[/]");
        }
    }

    private static string Digits(double value) => value == 0 ? "-" : value.ToString(value >= 10 ? "0" : value >= 1 ? "0.0" : "0.000", System.Globalization.CultureInfo.InvariantCulture);

    private static void Row(Grid grid, string name, double value, string unit, double between, double absolute) =>
        grid.AddRow($"[bold]{name}[/]", $"[bold]{Figures.Value(value, between)}{unit}[/]", $"± {Figures.Uncertainty(between)}{unit}", $"± {Figures.Uncertainty(absolute)}{unit}");
}
