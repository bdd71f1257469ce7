using System.Globalization;
using Looseloop.Drift.Comparison;
using Looseloop.Readings;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>A comparison as a person reads it.</summary>
internal static class ComparisonText
{
    public static void Write(Shell shell, (long Number, Reading Reading) first, (long Number, Reading Reading) second, ReadingComparison compared)
    {
        Table table = new Table().Border(TableBorder.Simple)
            .AddColumns("", $"reading {first.Number}", $"reading {second.Number}", "change", "± 95 %", "smallest that would be seen", "");
        table.AddRow(
            "f0 in Hz", Figures.Value(first.Reading.F0Hz, compared.F0.Expanded), Figures.Value(second.Reading.F0Hz, compared.F0.Expanded),
            Signed(compared.F0.Difference, compared.F0.Expanded), Figures.Uncertainty(compared.F0.Expanded), Figures.Uncertainty(compared.F0.Detectable),
            Word(compared.F0.Verdict));
        Change q = compared.Q;
        double scale = first.Reading.Q;
        table.AddRow(
            "Q", Figures.Value(first.Reading.Q, q.Expanded * scale), Figures.Value(second.Reading.Q, q.Expanded * scale),
            Signed(q.Difference * scale, q.Expanded * scale), Figures.Uncertainty(q.Expanded * scale), Figures.Uncertainty(q.Detectable * scale), Word(q.Verdict));
        shell.Out.Write(table);
        foreach (string line in Meaning(compared))
        {
            shell.Out.WriteLine(line);
        }

        foreach (string difference in compared.SetUpDifferences)
        {
            shell.Out.WriteLine($"set-up, {difference}");
        }

        foreach (string caution in compared.Cautions)
        {
            shell.Out.MarkupLineInterpolated($"[yellow]{caution}[/]");
        }
    }

    private static IEnumerable<string> Meaning(ReadingComparison compared)
    {
        if (compared.F0.Verdict == ChangeVerdict.Changed)
        {
            yield return Text(
                $"f0 moved by {compared.Bandwidths:+0.000;-0.000} bandwidths. If the inductance stayed, the capacitance at the top changed by {100 * compared.CapacitanceRelative:+0.000;-0.000} ± {200 * compared.CapacitanceStandard:0.000} %.");
        }
        else if (compared.F0.Verdict == ChangeVerdict.NotChanged)
        {
            yield return Text($"Any change of f0 is below {compared.F0.Margin:0.#} Hz, a tenth of a bandwidth.");
        }
        else if (compared.F0.Expanded > compared.F0.Margin)
        {
            yield return "f0: these two readings cannot see a tenth of a bandwidth. Read again with more samples or a stronger signal.";
        }

        yield return compared.Winding switch
        {
            WindingState.ShortedTurn =>
                "Q fell and f0 rose, as a shorted turn makes them: look over the winding before it is energised.",
            WindingState.MoreLoss =>
                "Q fell by more than a warm winding makes it: look for damp or dirt on the former, a bad base earth, or metal nearby.",
            WindingState.NotSuspect => "Q gives no reason to suspect the winding.",
            _ => "Whether Q fell enough to suspect the winding cannot be told from these two.",
        };
    }

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);

    private static string Signed(double value, double uncertainty) => (value > 0 ? "+" : "") + Figures.Value(value, uncertainty);

    private static string Word(ChangeVerdict verdict) => verdict switch
    {
        ChangeVerdict.Changed => "[bold]changed[/]",
        ChangeVerdict.NotChanged => "[green]not changed[/]",
        _ => "[yellow]cannot tell[/]",
    };
}
