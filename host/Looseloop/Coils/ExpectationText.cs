using Looseloop.Coil;
using Looseloop.Report.Plots;
using Spectre.Console;

namespace Looseloop.Coils;

/// <summary>An expectation as a person reads it.</summary>
internal static class ExpectationText
{
    public static void Write(IAnsiConsole console, CoilExpectation e)
    {
        Mode f1 = e.Modes[0];
        console.MarkupLineInterpolated($"[bold]{e.Coil.Name}[/], expected, cold");
        Grid grid = new Grid().AddColumns(2);
        void Row(string name, string value) => grid.AddRow(name, Markup.Escape(value));
        grid.AddRow("[bold]f1[/]", $"[bold]{Words.Kilohertz(e.F1Hz)} ± {Words.Kilohertz(2 * e.F1UncertaintyHz)}[/] (95 %)");
        Row("overtones", string.Join(", ", e.Modes.Skip(1).Select((m, i) => $"f{i + 2} {Words.Kilohertz(m.FrequencyHz)} ({Words.Number(m.FrequencyHz / e.F1Hz, 3)} f1)")));
        Row("inductance", $"{Words.Henry(e.DirectInductanceH)} at direct current ({Words.Henry(e.FilamentInductanceH)} turn by turn)");
        Row("capacitance", $"{Words.Picofarad(e.EquivalentCapacitanceF)}, which with it makes f1");
        Row("at the top", $"{Words.Picofarad(f1.TopCapacitanceF)} and {Words.Henry(f1.TopInductanceH)} effective");
        Row("base current", $"{Words.Digits(f1.BaseCurrentPerVolt * 1e6, 4)} mA for each kilovolt at the top");
        Row("Q at most", $"{e.Q.Low:0} to {e.Q.High:0} (Medhurst x skin {e.Q.MedhurstTimesSkin:0}, Dowell {e.Q.Dowell:0}, Medhurst thin skin {e.Q.MedhurstThinSkin:0}; skin alone {e.Q.SkinOnly:0})");
        Row("per kelvin", $"f1 {(double.IsNaN(e.F1PerKelvin) ? "not known for this former" : Words.Number(e.F1PerKelvin * 1e6, 0) + " ppm")}, Q {Words.Percent(CoilExpectation.QPerKelvin, 2)}");
        console.Write(grid);
        console.MarkupLine("Largest contributions to the uncertainty of f1:");
        Table table = new Table().Border(TableBorder.Simple).AddColumns("", "u Hz", "%", "from");
        table.Columns[1].RightAligned();
        table.Columns[2].RightAligned();
        foreach (Contribution c in e.Contributions.Take(5))
        {
            table.AddRow(Markup.Escape(c.Name), $"{c.UncertaintyHz:0}", Words.Number(100 * c.UncertaintyHz / e.F1Hz, 2), Markup.Escape(c.Origin));
        }

        console.Write(table);
    }

    public static void WriteSensitivities(IAnsiConsole console, CoilExpectation e)
    {
        Table table = new Table().Border(TableBorder.Simple).AddColumns("dimension", "value", "f1 % per 1 %", "Hz per unit", "tolerance", "u Hz");
        for (int i = 1; i < 6; i++)
        {
            table.Columns[i].RightAligned();
        }

        foreach (Sensitivity s in e.Sensitivities)
        {
            string unit = s.Dimension.Unit.Length > 0 ? " " + s.Dimension.Unit : "";
            table.AddRow(
                Markup.Escape(s.Dimension.Path), Words.Plain(s.Dimension.Value) + unit, Words.Number(s.RelativePerPercent, 3),
                Words.Digits(s.HzPerUnit, 3), $"{Words.Digits(s.Tolerance, 2)}{unit}{(s.Stated ? "" : " (usual)")}", $"{s.UncertaintyHz:0}");
        }

        console.Write(table);
    }

    public static void WriteProfile(IAnsiConsole console, Mode mode)
    {
        Table table = new Table().Border(TableBorder.Simple).AddColumns("height mm", "voltage / top", "current mA/kV");
        for (int i = 0; i < 3; i++)
        {
            table.Columns[i].RightAligned();
        }

        double length = mode.HeightM[^1];
        for (int i = 0; i <= 10; i++)
        {
            double height = length * i / 10;
            int band = Enumerable.Range(0, mode.CurrentPerVolt.Count).First(k => mode.HeightM[k + 1] >= height - 1e-12);
            table.AddRow(Words.Number(height * 1e3, 0), Words.Number(mode.VoltageAt(height), 3), Words.Digits(mode.CurrentPerVolt[band] * 1e6, 3));
        }

        console.Write(table);
        console.Write(new BrailleCanvas(
            new PlotSheet("voltage along the winding", "height in mm", "voltage over the top's",
                [new PlotSeries("f1", [.. mode.HeightM.Select(h => h * 1e3)], mode.Voltage, SeriesLook.Line)]), 10));
    }

    public static void WriteComparison(IAnsiConsole console, CoilExpectation e, Comparison c, FrequencySource source)
    {
        Grid grid = new Grid().AddColumns(2);
        string spread = double.IsFinite(source.AbsoluteHz) ? $" ± {Words.Kilohertz(2 * source.AbsoluteHz, 3)}" : "";
        grid.AddRow("read", Markup.Escape($"{Words.Kilohertz(c.ReadHz)}{spread} ({source.From})"));
        grid.AddRow("expected", $"{Words.Kilohertz(c.ExpectedHz)} ± {Words.Kilohertz(2 * c.ExpectedUncertaintyHz)}");
        grid.AddRow("difference", $"{Words.Percent(c.Relative, 2)}, {Words.Number(c.Z, 1)} standard uncertainties");
        if (double.IsFinite(source.Q))
        {
            grid.AddRow("Q", QWords(e.Q, source.Q));
        }

        console.Write(grid);
        if (c.WithinUncertainty)
        {
            console.MarkupLine("[green]They agree within the uncertainty.[/] What would account for the difference all the same:");
        }
        else
        {
            console.MarkupLine("[yellow]They do not agree.[/] Any one of these, alone, would account for it:");
        }

        Table table = new Table().Border(TableBorder.Simple).AddColumns("cause", "from", "to", "");
        table.Columns[1].RightAligned();
        table.Columns[2].RightAligned();
        foreach (Cause cause in c.Causes.Where(k => k.CanAccount))
        {
            string unit = cause.Unit.Length > 0 ? " " + cause.Unit : "";
            table.AddRow(Markup.Escape(cause.Name), Words.Plain(cause.From) + unit, Words.Digits(cause.To, 4) + unit, Markup.Escape(cause.Remark));
        }

        console.Write(table);
        string[] unable = [.. c.Causes.Where(k => !k.CanAccount).Select(k => k.Name)];
        if (unable.Length > 0)
        {
            console.MarkupLineInterpolated($"[dim]No value within reach of: {string.Join(", ", unable)}.[/]");
        }
    }

    private static string QWords(QEstimate bound, double q) =>
        q > bound.High * 1.3 ? $"{q:0} read, more than the copper allows ({bound.High:0}): read again, or the wire is not what the file says"
        : q < 0.5 * bound.Low ? $"{q:0} read, less than half of what the copper allows ({bound.Low:0}): former, earth, damp, or a shorted turn"
        : $"{q:0} read; the copper allows {bound.Low:0} to {bound.High:0} at most";
}
