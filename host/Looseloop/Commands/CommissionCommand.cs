using System.CommandLine;
using System.Runtime.ExceptionServices;
using Looseloop.Arguments;
using Looseloop.Bench;
using Looseloop.Boxes;
using Looseloop.Procedures.Commissioning;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>commission</c>: whether a box does what it should, step by step, kept for that box.</summary>
internal sealed class CommissionCommand(Shell shell)
{
    private static readonly string _names = string.Join(", ", CommissioningProcedure.All.Select(CommissioningText.Name));

    private readonly Option<string?> _only = new("--only") { Description = $"Do these steps only, with commas between them: {_names}.", HelpName = "STEPS" };
    private readonly Option<double?> _near = Quantity.HertzOption("--near", "The coil answers near this frequency; without it, a survey finds it.");
    private readonly Option<double?> _mains = Quantity.HertzOption("--mains", "Mains frequency, 50 or 60 (50).");
    private readonly Option<Readings.DetectorKind?> _kind = new("--kind") { Description = "The detector's kind as it was built (linear RMS where nothing is declared)." };
    private readonly Option<string?> _counter = new("--counter") { Description = "What the counter reads at 40, 150 and 300 kHz.", HelpName = "HZ,HZ,HZ" };
    private readonly Option<double?> _digit = Quantity.HertzOption("--counter-digit", "The counter's last digit (1Hz).");
    private readonly Option<string?> _means = new("--means")
    {
        Description = "The mean of the driver's output at duty 1/2, 1/3, 2/3, 1/5 and 4/5, volts with --supply, else as shares of the supply.",
        HelpName = "V,V,V,V,V",
    };

    private readonly Option<double?> _supply = NumberOption.Create("--supply", "The driver's supply, volts, by the same meter.");
    private readonly Option<double?> _hold = Quantity.SecondsOption("--hold", "How long each setting is driven for an instrument to be read (15s).");
    private readonly Option<bool> _source = new("--source-on") { Description = "A tone source is at the pickup already: for --only interlock without prompts." };
    private readonly Option<bool> _alone = new("--non-interactive") { Description = "No prompts: readings come from the options, and a step without its reading is skipped." };

    public static Command Create(Shell shell) => new CommissionCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("commission", "Check a box once, step by step, before its readings are believed (hardware-notes/commissioning.md).")
        {
            Options = { _only, _near, _mains, _kind, _counter, _digit, _means, _supply, _hold, _source, _alone, RecordChoice.RecordOption },
        };
        BoxChoice.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        HashSet<CommissioningStep> steps = Steps(parsed.GetValue(_only));
        bool quiet = parsed.GetValue(CommonOptions.Quiet);
        foreach (string caution in BoxCautions.All)
        {
            shell.Say(caution);
        }

        using ChosenBox box = BoxChoice.Open(shell, parsed);
        IAttendant attendant = Attendant(parsed, box);

        // What cannot be kept should not cost anybody an hour first.
        using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
        var facts = new RecordFacts(store, AppVersion.Text);
        BoxIdentity identity = box.Session.Identity;
        var options = new ReadOptions
        {
            Law = Law(parsed, box, facts, steps),
            NearHz = parsed.GetValue(_near),
            MainsHz = parsed.GetValue(_mains) ?? 50,
            Clock = facts.ClockOf(identity.Port),
            HostVersion = AppVersion.Text,
            Time = shell.Time,
        };
        CommissioningOutcome outcome = new CommissioningProcedure(
            box.Session, options, steps, attendant, new CommissioningView(shell, quiet), shell.Cancel).Run();
        facts.Keep(identity.Port, outcome.Record);
        if (outcome.Law is DetectorLaw law)
        {
            facts.Keep(identity.Port, law);
        }

        CommissioningStanding standing = CommissioningStanding.Of(facts.CommissioningsOf(identity.Port), identity.Board, identity.FirmwareVersion);
        Show(parsed, identity, outcome, standing);
        if (outcome.BrokenBy is Exception broken)
        {
            ExceptionDispatchInfo.Throw(broken);
        }

        return standing.IsComplete && outcome.Record.Steps.All(finding => finding.Result != StepResult.Failed) ? ExitCode.Ok : ExitCode.NotTrustworthy;
    }

    private void Show(ParseResult parsed, BoxIdentity box, CommissioningOutcome outcome, CommissioningStanding standing)
    {
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => CommissioningJson.Write(json, box, outcome.Record, standing, kept: true)));
        }
        else
        {
            CommissioningText.Write(shell.Out, box, outcome.Record);
        }

        if (outcome.BrokenBy is not null)
        {
            shell.Say("It ended early. The steps that were done are kept; do the rest with --only.");
        }

        shell.Say(standing.IsComplete
            ? $"The box on {box.Port} is commissioned."
            : $"The box on {box.Port} is not commissioned: {string.Join(", ", standing.Missing.Select(CommissioningText.Name))} not passed. Its readings say so.");
    }

    /// <summary>The declared law; without a ladder in this run, the one that an earlier ladder has read.</summary>
    private DetectorLaw Law(ParseResult parsed, ChosenBox box, RecordFacts facts, HashSet<CommissioningStep> steps)
    {
        DetectorLaw declared = box.Law ?? UndeclaredBox.LawOf(box.Session);
        if (parsed.GetValue(_kind) is Readings.DetectorKind kind && kind != declared.Kind)
        {
            declared = DetectorLaw.Declared(kind, declared.PedestalCounts) with { TimeConstantS = declared.TimeConstantS };
        }

        return !steps.Contains(CommissioningStep.Ladder) && facts.LawOf(box.Session.Identity.Port) is DetectorLaw law && law.Kind == declared.Kind ? law : declared;
    }

    private IAttendant Attendant(ParseResult parsed, ChosenBox box)
    {
        double digitHz = parsed.GetValue(_digit) is double digit && digit > 0 ? digit : 1;
        double? supply = parsed.GetValue(_supply);
        if (supply <= 0)
        {
            throw new UserError("--supply wants volts above 0.");
        }

        var counter = new StatedAnswers("--counter", parsed.GetValue(_counter), FrequencyStep.AtHz.Count, Quantity.TryHertz);
        var means = new StatedAnswers("--means", parsed.GetValue(_means), DutyStep.Duties, StatedAnswers.Number);
        if (!parsed.GetValue(_alone) && shell.InIsTerminal)
        {
            return new PromptAttendant(shell, counter, digitHz, means, supply, TimeSpan.FromSeconds(parsed.GetValue(_hold) ?? 15));
        }

        return box.Virtual is VirtualBox bench
            ? new BenchAttendant(bench, counter, digitHz, means, supply ?? 1)
            : new StatedAttendant(shell, counter, digitHz, means, supply ?? 1, parsed.GetValue(_source));
    }

    private static HashSet<CommissioningStep> Steps(string? only)
    {
        if (only is null)
        {
            return CommissioningProcedure.All.ToHashSet();
        }

        var steps = new HashSet<CommissioningStep>();
        foreach (string name in only.Split(',', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries))
        {
            CommissioningStep[] named = [.. CommissioningProcedure.All.Where(step => CommissioningText.Name(step) == name)];
            steps.Add(named.Length == 1 ? named[0] : throw new UserError($"There is no step '{name}'. The steps are {_names}."));
        }

        return steps.Count > 0 ? steps : throw new UserError($"--only names no step. The steps are {_names}.");
    }
}
