using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>window</c>: how far a driver may be off, and whether a fixed oscillator will do.</summary>
internal sealed class WindowCommand(Shell shell)
{
    private readonly CoilArgument _coil = new(shell, required: false);
    private readonly LoadedOptions _loaded = new();
    private readonly Option<double?> _f0 = Quantity.HertzOption("--f0", "Resonant frequency.");
    private readonly Option<double?> _q = NumberOption.Create("--q", "Quality factor.");
    private readonly Option<string?> _against = new("--against") { Description = "Take f0 and Q from a reading: last, previous, a number or a note.", HelpName = "READING" };
    private readonly Option<double?> _fraction = NumberOption.Create("--fraction", "Fraction of the amplitude, 0..1 (.9, .707 and .5).");
    private readonly Option<string?> _oscillator = new("--oscillator") { Description = "The driver's oscillator: lc or rc (rc).", HelpName = "KIND" };
    private readonly Option<double?> _component = NumberOption.Create("--component-percent", "Tolerance of its component, per cent (5).");
    private readonly Option<double?> _topPf = NumberOption.Create("--top-pf", "Effective capacitance at the top, pF, for the loaded column where no coil is named (15).");
    private readonly Option<long?> _run = new("--run") { Description = "A logged run of the record: when does its warm-up leave the window?", HelpName = "N" };

    public static Command Create(Shell shell) => new WindowCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("window", "How far a driver may be off f0 for a fraction of the amplitude, and whether a fixed oscillator will do.")
        {
            Options = { _f0, _q, _against, _fraction, _oscillator, _component, _topPf, _run, RecordChoice.RecordOption },
        };
        _loaded.AddTo(command);
        _coil.AddTo(command);
        command.Validators.Add(result =>
        {
            if (result.GetResult(_oscillator)?.Tokens is [var token] && token.Value is not ("lc" or "rc"))
            {
                result.AddError($"--oscillator is lc or rc, not '{token.Value}'.");
            }
        });
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        FrequencySource? reading = parsed.GetValue(_against) is string words ? FrequencySource.Of(shell, parsed, words) : null;
        CoilGeometry? coil = _coil.Load(parsed);
        Mode? mode = coil is null ? null : CoilWork.Run(() => ModeSolver.Lowest(new FieldModel(coil, Resolution.Fine), 1)[0]);
        double f0 = parsed.GetValue(_f0) ?? reading?.F0Hz ?? mode?.FrequencyHz
            ?? throw new UserError("Give f0 and Q (--f0, --q), a reading (--against), or a coil.");
        double q = parsed.GetValue(_q) ?? (reading is { } r && double.IsFinite(r.Q) ? r.Q : double.NaN);
        bool isBound = double.IsNaN(q);
        if (isBound)
        {
            q = coil is null ? throw new UserError("Give Q with --q, a reading with one (--against), or a coil.") : QEstimate.Of(coil, mode!).Low;
        }

        double topF = mode?.TopCapacitanceF ?? (parsed.GetValue(_topPf) ?? 15) * 1e-12;
        LoadedState loaded = _loaded.Of(parsed);
        double[] fractions = parsed.GetValue(_fraction) is double one ? [one] : [0.9, Math.Sqrt(0.5), 0.5];
        bool resonant = parsed.GetValue(_oscillator) == "lc";
        double component = (parsed.GetValue(_component) ?? 5) / 100;
        WindowFigures figures = CoilWork.Run(() => WindowFigures.Of(f0, q, isBound, loaded, topF, fractions, resonant, component));
        if (parsed.GetValue(_run) is long run)
        {
            figures = figures with { Exit = WarmUpExit.Of(RecordChoice.PathOf(shell, parsed), run, figures.Cold[0]) };
        }

        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => WindowText.WriteJson(json, figures)));
        }
        else
        {
            WindowText.Write(shell.Out, figures, reading?.From ?? (parsed.GetValue(_f0) is null ? "from the geometry" : "as given"));
        }

        Cautions.Say(shell, LoadedState.Caution, Cautions.Energise);
        return reading?.Warn(shell) ?? ExitCode.Ok;
    }
}
