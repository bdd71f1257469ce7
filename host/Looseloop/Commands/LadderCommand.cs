using System.CommandLine;
using System.Globalization;
using Looseloop.Arguments;
using Looseloop.Boxes;
using Looseloop.Procedures.Ladder;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>ladder</c>: the law of the box's detector, read in place on a coil's resonance.</summary>
internal sealed class LadderCommand(Shell shell)
{
    private readonly Option<double?> _near = Quantity.HertzOption("--near", "Stand on the resonance near this frequency, without a survey.");
    private readonly Option<double?> _mains = Quantity.HertzOption("--mains", "Mains frequency, 50 or 60 (50).");
    private readonly Option<DetectorKind?> _kind = new("--kind") { Description = "The detector's kind as it was built (linear RMS where nothing is declared)." };
    private readonly Option<bool> _dry = new("--dry") { Description = "Show the law, keep nothing." };

    public static Command Create(Shell shell) => new LadderCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("ladder", "Read the detector's law: amplitude against duty on a coil's resonance. Once a box, and after every change of it.")
        {
            Options = { _near, _mains, _kind, _dry, RecordChoice.RecordOption },
        };
        BoxChoice.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        using ChosenBox box = BoxChoice.Open(shell, parsed);
        DetectorLaw declared = box.Law ?? UndeclaredBox.LawOf(box.Session) with { Kind = parsed.GetValue(_kind) ?? DetectorKind.RmsLinear };
        if (parsed.GetValue(_kind) is DetectorKind kind && kind != declared.Kind)
        {
            declared = DetectorLaw.Declared(kind, declared.PedestalCounts) with { TimeConstantS = declared.TimeConstantS };
        }

        var options = new ReadOptions
        {
            Law = declared,
            NearHz = parsed.GetValue(_near),
            MainsHz = parsed.GetValue(_mains) ?? 50,
            HostVersion = AppVersion.Text,
            Time = shell.Time,
        };
        var progress = new ProgressLine(shell, parsed.GetValue(CommonOptions.Quiet));
        LadderOutcome outcome;
        try
        {
            outcome = new LadderProcedure(box.Session, options, progress, shell.Cancel).Run();
        }
        finally
        {
            progress.End();
        }

        bool keep = outcome.Law is not null && !outcome.Choice!.Contradicts && !parsed.GetValue(_dry);
        if (keep)
        {
            using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
            new RecordFacts(store, AppVersion.Text).Keep(box.Session.Identity.Port, outcome.Law!);
        }

        Show(parsed, outcome, keep);
        return outcome.Law is null || outcome.Choice!.Contradicts ? ExitCode.NotTrustworthy : ExitCode.Ok;
    }

    private void Show(ParseResult parsed, LadderOutcome outcome, bool kept)
    {
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => LadderJson.Write(json, outcome, kept)));
            return;
        }

        if (outcome.Law is DetectorLaw law)
        {
            Grid grid = new Grid().AddColumns(2);
            grid.AddRow("law", law.Kind.ToString());
            grid.AddRow("pedestal", $"{F(law.PedestalCounts, "0.0")} ± {F(2 * law.PedestalUncertainty, "0.0")} counts");
            if (law.Kind is DetectorKind.RmsLog or DetectorKind.LogOfWaveform or DetectorKind.DiodeKnee)
            {
                string unit = law.Kind == DetectorKind.DiodeKnee ? "counts (knee)" : "counts per decibel";
                grid.AddRow("shape", $"{Figures.Value(law.Shape, law.ShapeUncertainty)} ± {Figures.Uncertainty(2 * law.ShapeUncertainty)} {unit}");
            }

            grid.AddRow("bow left, at most", $"{F(100 * law.BowBound, "0.00")} % of the largest level");
            grid.AddRow("high too long by", $"{F(law.HighExtraS * 1e9, "0.0")} ± {F(2e9 * law.HighExtraUncertaintyS, "0.0")} ns (edges; by D against 1 - D)");
            shell.Out.Write(grid);
            Table table = new Table().Border(TableBorder.Simple).AddColumns("tried", "chi-square", "degrees of freedom");
            foreach (LadderFit fit in outcome.Choice!.All)
            {
                table.AddRow(fit.Law.Kind.ToString(), F(fit.ChiSquare, "0"), F(fit.DegreesOfFreedom, "0"));
            }

            shell.Out.Write(table);
            if (outcome.Direct is DirectCheck direct)
            {
                shell.Out.WriteLine($"Against the waveform itself: {F(100 * direct.Difference, "+0.00;-0.00")} % ({(direct.Agrees ? "agrees" : "disagrees")}, uncertain by {F(100 * direct.Uncertainty, "0.00")} %).");
            }
        }

        foreach (Reason reason in outcome.Reasons)
        {
            shell.Say($"{reason.Name}: {reason.Detail} {reason.Advice}");
        }

        shell.Say(kept ? "The law is kept for this box." : "Nothing was kept.");
    }

    private static string F(double value, string format) => double.IsFinite(value) ? value.ToString(format, CultureInfo.InvariantCulture) : "-";
}
