using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>probe</c>: what a probe on the winding would have made a coil read, and which capacitance explains two readings.</summary>
internal sealed class ProbeCommand(Shell shell)
{
    private readonly CoilArgument _coil = new(shell, required: false);
    private readonly Option<double?> _pf = NumberOption.Create("--pf", "Capacitance of the probe, pF.");
    private readonly Option<double?> _lead = NumberOption.Create("--lead-mm", "Length of its lead, mm.");
    private readonly Option<double?> _leadHeight = NumberOption.Create("--lead-height-mm", "Height of the lead above the ground, mm (1000).");
    private readonly Option<double?> _leadDiameter = NumberOption.Create("--lead-diameter-mm", "Diameter of the lead, mm (1).");
    private readonly Option<double?> _own = NumberOption.Create("--own-pf", "The coil's own effective capacitance at the top, pF, where no coil is named.");
    private readonly Option<string?> _without = new("--without") { Description = "Reading without the probe: a frequency with its unit, or a reading of the record.", HelpName = "READING" };
    private readonly Option<string?> _with = new("--with") { Description = "Reading with the probe.", HelpName = "READING" };

    public static Command Create(Shell shell) => new ProbeCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("probe", "What a probe on the top would have made a coil read, and the capacitance that explains two readings.")
        {
            Options = { _pf, _lead, _leadHeight, _leadDiameter, _own, _without, _with, RecordChoice.RecordOption },
        };
        _coil.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        CoilGeometry? coil = _coil.Load(parsed);
        FieldModel? model = coil is null ? null : CoilWork.Run(() => new FieldModel(coil, Resolution.Fine));
        Mode? mode = model is null ? null : ModeSolver.Lowest(model, 1)[0];
        double own = mode?.TopCapacitanceF ?? (parsed.GetValue(_own) is double pF ? pF * 1e-12 : double.NaN);
        FrequencySource? without = Source(parsed, _without);
        FrequencySource? with = Source(parsed, _with);
        if (parsed.GetValue(_pf) is null && parsed.GetValue(_lead) is null && (without is null || with is null))
        {
            throw new UserError("Say what hangs on the coil (--pf, --lead-mm), or give two readings (--without, --with).");
        }

        if (without is not null && with is not null)
        {
            return Explain(parsed, without, with, own);
        }

        return Foretell(parsed, model, mode, without, own);
    }

    private FrequencySource? Source(ParseResult parsed, Option<string?> option) =>
        parsed.GetValue(option) is string words ? FrequencySource.Of(shell, parsed, words) : null;

    private int Explain(ParseResult parsed, FrequencySource without, FrequencySource with, double own)
    {
        double ratio = CoilWork.Run(() => Probe.AddedOverOwn(without.F0Hz, with.F0Hz));
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.Figure("without_hz", without.F0Hz);
                json.Figure("with_hz", with.F0Hz);
                json.Figure("added_over_own", ratio);
                json.Figure("own_f", own);
                json.Figure("added_f", ratio * own);
            }));
        }
        else
        {
            shell.Out.MarkupLineInterpolated($"{Words.Kilohertz(without.F0Hz)} without, {Words.Kilohertz(with.F0Hz)} with: what was added has [bold]{Words.Number(ratio, 3)} times[/] the coil's own effective capacitance at the top.");
            if (double.IsFinite(own))
            {
                shell.Out.MarkupLineInterpolated($"The coil has {Words.Picofarad(own)}, so that is [bold]{Words.Picofarad(ratio * own)}[/].");
            }
            else
            {
                Table table = new Table().Border(TableBorder.Simple).AddColumns("own pF", "added pF");
                foreach (double pF in (ReadOnlySpan<double>)[5, 7.5, 10, 15, 20])
                {
                    table.AddRow(Words.Number(pF, 1), Words.Number(pF * ratio, 1));
                }

                shell.Out.Write(table);
            }

            if (ratio < 0)
            {
                shell.Say("The reading with it is the higher one: nothing that hangs on a coil raises its frequency. Check which reading is which.");
            }
        }

        return Math.Max(without.Warn(shell), with.Warn(shell));
    }

    private int Foretell(ParseResult parsed, FieldModel? model, Mode? mode, FrequencySource? without, double own)
    {
        double lead = parsed.GetValue(_lead) is double mm
            ? CoilWork.Run(() => Probe.LeadF(mm / 1e3, (parsed.GetValue(_leadDiameter) ?? 1) / 1e3, (parsed.GetValue(_leadHeight) ?? 1000) / 1e3))
            : 0;
        double added = ((parsed.GetValue(_pf) ?? 0) * 1e-12) + lead;
        if (!double.IsFinite(own))
        {
            throw new UserError("Name a coil, or give its own capacitance with --own-pf: a probe's pull depends on it.");
        }

        double before = without?.F0Hz ?? mode?.FrequencyHz ?? throw new UserError("Give the reading without the probe with --without, or name a coil.");
        // The coil's own model where there is one: a large probe changes the voltage along the winding too.
        double after = CoilWork.Run(() => model is null
            ? Probe.WouldReadHz(before, own, added)
            : before * ModeSolver.Lowest(model, 1, added)[0].FrequencyHz / mode!.FrequencyHz);
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.Figure("without_hz", before);
                json.Figure("with_hz", after);
                json.Figure("added_f", added);
                json.Figure("lead_f", lead);
                json.Figure("own_f", own);
            }));
        }
        else
        {
            shell.Out.MarkupLineInterpolated($"A coil of {Words.Kilohertz(before)} with {Words.Picofarad(own)} of its own reads [bold]{Words.Kilohertz(after)}[/] ({Words.Percent((after / before) - 1)}) with {Words.Picofarad(added)} on its top.");
            if (lead > 0)
            {
                shell.Out.MarkupLineInterpolated($"[dim]{Words.Picofarad(lead)} of that is the lead.[/]");
            }
        }

        return without?.Warn(shell) ?? ExitCode.Ok;
    }
}
