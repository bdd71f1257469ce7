using System.CommandLine;
using System.Globalization;
using Looseloop.Arguments;
using Looseloop.Bench;
using Looseloop.Boxes;
using Looseloop.Procedures.Standoff;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>standoff</c>: what loop and pickup pull, by readings at several distances.</summary>
internal sealed class StandoffCommand(Shell shell)
{
    private readonly Option<string> _coil = new("--coil") { Description = "The coil's name; the pull is kept for it and its set-up.", HelpName = "NAME", Required = true };
    private readonly Option<double?> _near = Quantity.HertzOption("--near", "Look only near this frequency.");
    private readonly Option<int> _places = new("--places") { Description = "How many distances of each, 2 to 8.", DefaultValueFactory = _ => 3, HelpName = "N" };
    private readonly Option<double?> _pause = Quantity.SecondsOption("--pause", "Without a person at the keyboard: time to move things between readings (20s).");
    private readonly Option<bool> _alone = new("--non-interactive") { Description = "No prompts: stored readings, or readings taken in turn." };
    private readonly Option<string?> _pickup = new("--pickup-readings") { Description = "Stored readings between which only the pickup was moved, the usual place first: 12,13,14.", HelpName = "N,N" };
    private readonly Option<string?> _loop = new("--loop-readings") { Description = "Stored readings between which only the loop was moved, the usual place first.", HelpName = "N,N" };

    public static Command Create(Shell shell) => new StandoffCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("standoff", "Find what loop and pickup pull, by readings at several distances, one thing moved at a time.")
        {
            Options = { _coil, _near, _places, _pause, _alone, _pickup, _loop, RecordChoice.RecordOption },
        };
        BoxChoice.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        string coil = parsed.GetValue(_coil)!;
        int places = parsed.GetValue(_places);
        if (places is < 2 or > 8)
        {
            throw new UserError($"--places wants 2 to 8, not {places}.");
        }

        if ((parsed.GetValue(_pickup) is null) != (parsed.GetValue(_loop) is null))
        {
            throw new UserError("Stored readings are wanted of both moves: --pickup-readings and --loop-readings.");
        }

        using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
        var facts = new RecordFacts(store, AppVersion.Text);
        IReadOnlyDictionary<string, string> setUp = facts.SetUpOf(coil);
        StandoffRun run = parsed.GetValue(_pickup) is string pickup
            ? new StandoffRun(Stored(store, pickup), Stored(store, parsed.GetValue(_loop)!))
            : new StandoffReadings(shell, store, facts, Mover(parsed)).Take(parsed, coil, setUp, places, parsed.GetValue(_near));
        StandoffFinding finding = run.Evaluate(shell.Time.GetUtcNow());
        if (finding.Pull is not null)
        {
            facts.Keep(coil, setUp, finding.Pull);
        }

        Show(parsed, coil, run, finding);
        return finding.Pull is null ? ExitCode.NotTrustworthy : ExitCode.Ok;
    }

    private IMover Mover(ParseResult parsed)
    {
        World? world = BoxChoice.WorldOf(BoxChoice.NameOf(shell, parsed));
        bool alone = parsed.GetValue(_alone) || !shell.InIsTerminal;
        if (world is not null && alone)
        {
            return new BenchMover(world, parsed.GetValue(BoxChoice.SeedOption), shell.Cancel);
        }

        ChosenBox box = BoxChoice.Open(shell, parsed);
        return alone ? new TimedMover(shell, box, parsed.GetValue(_pause) ?? 20) : new PromptMover(shell, box);
    }

    private static List<Reading> Stored(RecordStore store, string numbers) =>
        [.. numbers.Split(',', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries)
            .Select(words => store.Reader.Reading(store.Reader.Find(words)))];

    private void Show(ParseResult parsed, string coil, StandoffRun run, StandoffFinding finding)
    {
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteString("coil", coil);
                json.Figure("f0_pull_relative", finding.Pull?.F0Relative ?? double.NaN);
                json.Figure("f0_pull_u_relative", finding.Pull?.F0Uncertainty ?? double.NaN);
                json.Figure("loss_added", finding.Pull?.LossAdded ?? double.NaN);
                json.Figure("loss_added_u", finding.Pull?.LossUncertainty ?? double.NaN);
                json.Figure("pickup_pull_hz", finding.PickupPullHz);
                json.Figure("pickup_pull_u_hz", finding.PickupStandardHz);
                json.Figure("loop_pull_hz", finding.LoopPullHz);
                json.Figure("loop_pull_u_hz", finding.LoopStandardHz);
                json.WriteString("refused", finding.Why);
            }));
            return;
        }

        Table table = new Table().Border(TableBorder.Simple).AddColumns("moved", "f0 Hz", "Q", "peak / Q");
        foreach ((string moved, Reading reading) in run.PickupMoves.Select(r => ("pickup", r)).Concat(run.LoopMoves.Select(r => ("loop", r))))
        {
            table.AddRow(moved, Figures.Value(reading.F0Hz, reading.Budget.F0Hz(false)), F(reading.Q, "0.0"), F(reading.PeakCounts / reading.Q, "0.00"));
        }

        shell.Out.Write(table);
        if (finding.Pull is not Pull pull)
        {
            shell.Error($"{finding.Why} Nothing was kept.");
            return;
        }

        Grid grid = new Grid().AddColumns(2);
        grid.AddRow("pickup pulls f0 by", $"{F(finding.PickupPullHz, "+0.0;-0.0")} ± {F(2 * finding.PickupStandardHz, "0.0")} Hz");
        grid.AddRow("loop pulls f0 by", $"{F(finding.LoopPullHz, "+0.0;-0.0")} ± {F(2 * finding.LoopStandardHz, "0.0")} Hz");
        grid.AddRow("together", $"{F(1e6 * pull.F0Relative, "+0;-0")} ± {F(2e6 * pull.F0Uncertainty, "0")} ppm of f0, 1/Q {F(1e6 * pull.LossAdded, "+0;-0")} ± {F(2e6 * pull.LossUncertainty, "0")} millionths");
        shell.Out.Write(grid);
        shell.Say($"Kept for {coil} in its present set-up, and taken off from its readings. People and cable are not in it: stand back, and read again after moving the cable.");
    }

    private static string F(double value, string format) => double.IsFinite(value) ? value.ToString(format, CultureInfo.InvariantCulture) : "-";
}
