using Looseloop.Coil;
using Looseloop.Rendering;
using Looseloop.Report.Plots;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Coils;

/// <summary>f1 against one dimension, and the value that gives a wanted f1.</summary>
internal sealed class DimensionSearch(Shell shell, CoilGeometry coil)
{
    public int Run(SweepRange? sweep, double? targetHz, string? vary, bool asJson)
    {
        string path = sweep?.Path ?? vary ?? throw new UserError("--target needs --vary KEY (or --sweep): which dimension may change?");
        if (sweep is not null && vary is not null && vary != sweep.Path)
        {
            throw new UserError("--vary and --sweep name different dimensions: give one of them.");
        }

        Dimension dimension = CoilArgument.DimensionOf(coil, path);
        if (path.StartsWith("primary.", StringComparison.Ordinal))
        {
            throw new UserError($"{path} does not move the secondary's f1: sweep one of the coil's own dimensions.");
        }

        IReadOnlyList<SweepRow> rows = sweep is null
            ? []
            : CoilWork.Run(() => Targeting.Sweep(dimension, sweep.From, sweep.To, sweep.Step, Resolution.Fine));
        double? found = targetHz is double wanted ? CoilWork.Run(() => Found(dimension, wanted, sweep)) : null;
        if (asJson)
        {
            WriteJson(dimension, rows, targetHz, found);
        }
        else
        {
            WriteText(dimension, rows, targetHz, found);
        }

        Cautions.Say(shell, CoilExpectation.Caution);
        return targetHz is not null && found is null ? ExitCode.Failure : ExitCode.Ok;
    }

    private static double? Found(Dimension dimension, double wantedHz, SweepRange? sweep)
    {
        (double low, double high) = sweep is not null
            ? (sweep.From, sweep.To)
            : dimension.Path.EndsWith("height_mm", StringComparison.Ordinal)
                ? (dimension.Value - 500, dimension.Value + 2000)
                : (0.2 * dimension.Value, 5 * dimension.Value);
        return Targeting.Find(dimension, wantedHz, low, high, Resolution.Fine);
    }

    private void WriteText(Dimension dimension, IReadOnlyList<SweepRow> rows, double? targetHz, double? found)
    {
        string unit = dimension.Unit.Length > 0 ? " " + dimension.Unit : "";
        if (rows.Count > 0)
        {
            Table table = new Table().Border(TableBorder.Simple).AddColumns(Markup.Escape(dimension.Path), "f1 kHz", "");
            table.Columns[0].RightAligned();
            table.Columns[1].RightAligned();
            foreach (SweepRow row in rows)
            {
                table.AddRow(Words.Plain(row.Value), Words.Number(row.F1Hz / 1e3, 2), Markup.Escape(row.Problem ?? ""));
            }

            shell.Out.Write(table);
            if (rows.Count(r => double.IsFinite(r.F1Hz)) > 1)
            {
                shell.Out.Write(new BrailleCanvas(Sheet(dimension, rows), 10));
            }
        }

        if (targetHz is double wanted)
        {
            shell.Out.MarkupLineInterpolated(found is double value
                ? (FormattableString)$"[bold]{dimension.Path} = {Words.Digits(value, 5)}{unit}[/] gives f1 = {Words.Kilohertz(wanted)} (now {Words.Plain(dimension.Value)}{unit})"
                : $"No {dimension.Path} within reach gives f1 = {Words.Kilohertz(wanted)}; --sweep shows what can be had.");
        }
    }

    private PlotSheet Sheet(Dimension dimension, IReadOnlyList<SweepRow> rows) => new(
        coil.Name, dimension.Unit.Length > 0 ? $"{dimension.Name} in {dimension.Unit}" : dimension.Name, "f1 in kHz",
        [new PlotSeries("expected f1", [.. rows.Select(r => r.Value)], [.. rows.Select(r => r.F1Hz / 1e3)], SeriesLook.Line)]);

    private void WriteJson(Dimension dimension, IReadOnlyList<SweepRow> rows, double? targetHz, double? found) =>
        shell.OutText.WriteLine(JsonText.Object(json =>
        {
            json.WriteNumber("schema_version", 1);
            json.WriteString("coil", coil.Name);
            json.WriteString("key", dimension.Path);
            json.WriteString("unit", dimension.Unit);
            json.Figure("now", dimension.Value);
            json.Objects("rows", rows, row =>
            {
                json.Figure("value", row.Value);
                json.Figure("f1_hz", row.F1Hz);
                json.WriteString("problem", row.Problem);
            });
            json.Figure("target_hz", targetHz ?? double.NaN);
            json.Figure("found", found ?? double.NaN);
            Cautions.Write(json, CoilExpectation.Caution);
        }));
}
