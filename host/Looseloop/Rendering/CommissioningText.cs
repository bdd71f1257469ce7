using System.Globalization;
using Looseloop.Readings;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>A commissioning as a table.</summary>
internal static class CommissioningText
{
    /// <summary>The step's name, as the command line takes it.</summary>
    public static string Name(CommissioningStep step) => step == CommissioningStep.FirstCoil ? "first-coil" : step.ToString().ToLowerInvariant();

    public static string Result(StepResult result) => result switch
    {
        StepResult.NotApplicable => "not applicable",
        StepResult.NotDone => "not done",
        _ => result.ToString().ToLowerInvariant(),
    };

    public static void Write(IAnsiConsole console, BoxIdentity box, CommissioningRecord record)
    {
        console.MarkupLineInterpolated($"{box.Port}, {record.Board}, firmware {record.FirmwareVersion}, {record.Utc:yyyy-MM-dd HH:mm} UTC");
        Table table = new Table().Border(TableBorder.Simple).AddColumns("step", "result", "what was found");
        foreach (StepFinding finding in record.Steps)
        {
            string figures = string.Join(", ", finding.Figures.Where(figure => double.IsFinite(figure.Value)).Select(figure =>
                $"{figure.Key} {figure.Value.ToString("0.####", CultureInfo.InvariantCulture)}"));
            table.AddRow(
                Name(finding.Step), Coloured(finding.Result),
                Markup.Escape(finding.Detail) + (figures.Length > 0 ? $"\n[dim]{Markup.Escape(figures)}[/]" : ""));
        }

        console.Write(table);
    }

    private static string Coloured(StepResult result) => result switch
    {
        StepResult.Passed => "[green]passed[/]",
        StepResult.Failed => "[red]failed[/]",
        _ => $"[yellow]{Result(result)}[/]",
    };
}
