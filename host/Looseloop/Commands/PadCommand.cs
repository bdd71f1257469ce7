using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>pad</c>: L and C at the top terminal from readings with and without a known capacitor.</summary>
internal sealed class PadCommand(Shell shell)
{
    private const double DefaultRelative = 1e-4;

    private readonly Argument<string> _without = new("WITHOUT") { Description = "Reading without the capacitor: a frequency with its unit, or a reading of the record." };
    private readonly Argument<string> _with = new("WITH") { Description = "Reading with the capacitor from the top to the ground." };
    private readonly Option<double?> _pf = NumberOption.Create("--pf", "The known capacitor, pF.");
    private readonly Option<double?> _firstPf = NumberOption.Create("--first-pf", "A smaller known capacitor in the first reading, pF (0).");
    private readonly Option<double?> _padUncertainty = NumberOption.Create("--u-pf", "Standard uncertainty of the capacitor, pF (2 % of it).");
    private readonly Option<double?> _uncertainty = NumberOption.Create("--u-ppm", "Standard uncertainty of each reading, ppm, where they are given as figures (100).");

    public static Command Create(Shell shell) => new PadCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("pad", "Effective L and C at the top terminal from readings with and without a known capacitor.")
        {
            Arguments = { _without, _with },
            Options = { _pf, _firstPf, _padUncertainty, _uncertainty, RecordChoice.RecordOption },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        double pF = parsed.GetValue(_pf) ?? throw new UserError("Give the known capacitor with --pf.");
        double firstPf = parsed.GetValue(_firstPf) ?? 0;
        FrequencySource without = FrequencySource.Of(shell, parsed, parsed.GetValue(_without)!);
        FrequencySource with = FrequencySource.Of(shell, parsed, parsed.GetValue(_with)!);
        double given = parsed.GetValue(_uncertainty) is double ppm ? ppm * 1e-6 : DefaultRelative;
        double relative = Math.Max(Relative(without, given), Relative(with, given));
        double padPf = parsed.GetValue(_padUncertainty) ?? 0.02 * (pF - firstPf);
        PadMethod pad = CoilWork.Run(() => PadMethod.Of(without.F0Hz, firstPf * 1e-12, with.F0Hz, pF * 1e-12, relative, padPf * 1e-12));
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.Figure("without_hz", without.F0Hz);
                json.Figure("with_hz", with.F0Hz);
                json.Figure("inductance_top_h", pad.InductanceH);
                json.Figure("inductance_top_standard_h", pad.InductanceUncertaintyH);
                json.Figure("capacitance_top_f", pad.CapacitanceF);
                json.Figure("capacitance_top_standard_f", pad.CapacitanceUncertaintyF);
                json.Figure("error_amplification_second", pad.AmplificationOfSecond);
                json.Figure("error_amplification_first_in_l", pad.AmplificationOfFirstInL);
                json.WriteBoolean("looks_bare", pad.LooksBare);
            }));
        }
        else
        {
            shell.Out.MarkupLine("Effective at the top terminal:");
            shell.Out.MarkupLineInterpolated($"  [bold]L = {Words.Henry(pad.InductanceH)}[/] ± {Words.Percent(2 * pad.InductanceUncertaintyH / pad.InductanceH)} (95 %)");
            shell.Out.MarkupLineInterpolated($"  [bold]C = {Words.Picofarad(pad.CapacitanceF)}[/] ± {Words.Percent(2 * pad.CapacitanceUncertaintyF / pad.CapacitanceF)} (95 %)");
            shell.Out.MarkupLineInterpolated($"An error of a reading comes out {Words.Number(pad.AmplificationOfSecond, 1)} times as large in C, and up to that in L; a larger capacitor makes it smaller.");
        }

        if (pad.LooksBare)
        {
            shell.Say(PadMethod.BareCaution);
        }

        return Math.Max(without.Warn(shell), with.Warn(shell));
    }

    private static double Relative(FrequencySource source, double given) =>
        double.IsFinite(source.RepeatabilityHz) ? source.RepeatabilityHz / source.F0Hz : given;
}
