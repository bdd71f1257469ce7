using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>tank</c>: the primary for a secondary: taps, capacitor, coupling, currents, and which way to move the tap.</summary>
internal sealed class TankCommand(Shell shell)
{
    private readonly CoilArgument _coil = new(shell, required: true);
    private readonly LoadedOptions _loaded = new();
    private readonly Option<double?> _f0 = Quantity.HertzOption("--f0", "The secondary's f0 (default: from the geometry).");
    private readonly Option<string?> _against = new("--against")
    {
        Description = "Work from a reading: last, previous, a number, a note, or a frequency with its unit; of the secondary, or of the primary tank.",
        HelpName = "READING",
    };

    private readonly Option<string?> _of = new("--of") { Description = "Which circuit the reading is of: secondary or primary (default: as the reading says).", HelpName = "CIRCUIT" };
    private readonly Option<double?> _tap = NumberOption.Create("--tap", "Where the tap sits, turns (default: all turns).");
    private readonly Option<double?> _capacitor = NumberOption.Create("--capacitor-nf", "The tank's capacitor, nF (default: the coil file's).");
    private readonly Option<double?> _bus = NumberOption.Create("--bus-voltage-v", "Supply of the driver's bridge, V (default: the coil file's).");
    private readonly Option<double?> _step = NumberOption.Create("--step", "Turns between two lines of the tap table (0.5).");

    public static Command Create(Shell shell) => new TankCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("tank", "The primary for a secondary: tap table, capacitor, coupling, currents, cold and loaded.")
        {
            Options = { _f0, _against, _of, _tap, _capacitor, _bus, _step, RecordChoice.RecordOption },
        };
        _loaded.AddTo(command);
        _coil.AddTo(command);
        command.Validators.Add(result =>
        {
            if (result.GetResult(_of)?.Tokens is [var token] && token.Value is not ("primary" or "secondary"))
            {
                result.AddError($"--of is primary or secondary, not '{token.Value}'.");
            }
        });
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        CoilGeometry coil = _coil.Load(parsed)!;
        if (coil.Primary is not PrimaryGeometry primary)
        {
            throw new UserError($"The coil file of {coil.Name} has no [primary]: `looseloop coil new NAME` writes one to copy from.");
        }

        primary = primary with
        {
            CapacitorF = parsed.GetValue(_capacitor) * 1e-9 ?? primary.CapacitorF,
            BusVoltageV = parsed.GetValue(_bus) ?? primary.BusVoltageV,
        };
        FrequencySource? reading = parsed.GetValue(_against) is string words ? FrequencySource.Of(shell, parsed, words) : null;
        bool ofPrimary = reading is not null && (parsed.GetValue(_of) is string of ? of == "primary" : reading.IsOfPrimary);
        TankFigures figures = CoilWork.Run(() => TankFigures.Of(
            coil with { Primary = primary }, parsed.GetValue(_f0), ofPrimary ? null : reading, ofPrimary ? reading : null,
            parsed.GetValue(_tap) ?? primary.Turns, parsed.GetValue(_step) ?? 0.5, _loaded.Of(parsed)));
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => TankText.WriteJson(json, figures)));
        }
        else
        {
            TankText.Write(shell.Out, figures);
        }

        Cautions.Say(shell, LoadedState.Caution, Cautions.Hands, Cautions.Energise);
        return reading?.Warn(shell) ?? ExitCode.Ok;
    }
}
