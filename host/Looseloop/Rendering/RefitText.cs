using Looseloop.Procedures.Refit;
using Looseloop.Readings;
using Looseloop.Records;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>What a refit changed, as a person reads it.</summary>
internal static class RefitText
{
    /// <summary>All of it, for one reading.</summary>
    public static void Write(Shell shell, RefitDone done)
    {
        (Reading kept, Reading now, RefitChanges changes) = (done.Kept, done.Now, done.Changes);
        shell.Out.MarkupLineInterpolated($"[bold]reading {done.Number}[/] fitted again as [bold]reading {done.NewNumber}[/]; both are kept");
        Table table = new Table().Border(TableBorder.Simple).AddColumns("", "as kept", "now", "change");
        (double f0Kept, double f0Now) = (Intervals.F0Hz(kept, false), Intervals.F0Hz(now, false));
        (double qKept, double qNow) = (Intervals.Q(kept, false), Intervals.Q(now, false));
        table.AddRow("f0 in Hz", Figures.Value(kept.F0Hz, f0Kept), Figures.Value(now.F0Hz, f0Now), Change(changes.F0Hz, f0Kept, kept.F0Hz));
        table.AddRow("± between readings", Figures.Uncertainty(f0Kept), Figures.Uncertainty(f0Now), "");
        table.AddRow("± absolute", Figures.Uncertainty(Intervals.F0Hz(kept, true)), Figures.Uncertainty(Intervals.F0Hz(now, true)), "");
        table.AddRow("Q", Figures.Value(kept.Q, qKept), Figures.Value(now.Q, qNow), Change(now.Q - kept.Q, qKept, kept.Q));
        table.AddRow("± between readings", Figures.Uncertainty(qKept), Figures.Uncertainty(qNow), "");
        table.AddRow("± absolute", Figures.Uncertainty(Intervals.Q(kept, true)), Figures.Uncertainty(Intervals.Q(now, true)), "");
        table.AddRow("verdict", Verdicts.Markup(kept.Verdict), Verdicts.Markup(now.Verdict), kept.Verdict == now.Verdict ? "none" : "[bold]changed[/]");
        table.AddRow(new Text("host version"), new Text(kept.HostVersion), new Text(now.HostVersion), new Text(kept.HostVersion == now.HostVersion ? "none" : "changed"));
        shell.Out.Write(table);
        foreach (string difference in RefitWords.Differences(done.Before, done.After))
        {
            shell.Out.WriteLine(difference);
        }

        foreach (Reason reason in changes.NewReasons)
        {
            shell.Out.MarkupLineInterpolated($"new: {reason.Name}: {reason.Detail}");
            shell.Out.MarkupLineInterpolated($"  [dim]-> {reason.Advice}[/]");
        }

        foreach (Reason reason in changes.GoneReasons)
        {
            shell.Out.MarkupLineInterpolated($"gone: {reason.Name}: {reason.Detail}");
        }

        if (changes.Same)
        {
            shell.Out.WriteLine("Nothing changed: figures, uncertainties and verdict are the same to rounding.");
        }
    }

    /// <summary>One line, for one of many.</summary>
    public static void WriteLine(Shell shell, RefitDone done)
    {
        RefitChanges changes = done.Changes;
        string what = changes.Same
            ? "the same to rounding"
            : $"f0 {Change(changes.F0Hz, Intervals.F0Hz(done.Kept, false), done.Kept.F0Hz)} Hz, Q {Change(done.Now.Q - done.Kept.Q, Intervals.Q(done.Kept, false), done.Kept.Q)}, "
                + (done.Kept.Verdict == done.Now.Verdict ? Word(done.Now) : $"{Word(done.Kept)} became {Word(done.Now)}");
        shell.OutText.WriteLine($"reading {done.Number} as {done.NewNumber}: {what}");
    }

    private static string Word(Reading reading) => reading.Verdict.ToString().ToLowerInvariant();

    private static string Change(double difference, double interval, double value)
    {
        if (!double.IsFinite(difference))
        {
            return "-";
        }

        bool none = Math.Abs(difference) <= RefitChanges.Rounding * Math.Abs(value);
        return none ? "none" : (difference > 0 ? "+" : "") + Figures.Value(difference, Math.Min(interval, Math.Abs(difference)));
    }
}
