using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>couple</c>: coupling of primary and secondary from two readings.</summary>
internal sealed class CoupleCommand(Shell shell)
{
    private readonly Argument<string> _open = new("OPEN") { Description = "Reading with the primary open: a frequency with its unit, or a reading of the record." };
    private readonly Argument<string> _shorted = new("SHORTED") { Description = "Reading with the primary shorted at its terminals." };
    private readonly Option<double?> _uncertainty = NumberOption.Create("--u-hz", "Standard uncertainty of each reading, Hz, where they are given as figures.");

    public static Command Create(Shell shell) => new CoupleCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("couple", "Coupling coefficient k from readings of the secondary with the primary open and shorted.")
        {
            Arguments = { _open, _shorted },
            Options = { _uncertainty, RecordChoice.RecordOption },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        FrequencySource open = FrequencySource.Of(shell, parsed, parsed.GetValue(_open)!);
        FrequencySource shorted = FrequencySource.Of(shell, parsed, parsed.GetValue(_shorted)!);
        if (open.IsOfPrimary || shorted.IsOfPrimary)
        {
            throw new UserError("Both readings must be of the secondary; one of these is of the primary tank.");
        }

        open.WarnOfPrimary(shell, "open");
        shorted.WarnOfPrimary(shell, "shorted");
        double given = parsed.GetValue(_uncertainty) ?? double.NaN;
        double uOpen = double.IsFinite(open.RepeatabilityHz) ? open.RepeatabilityHz : given;
        double uShorted = double.IsFinite(shorted.RepeatabilityHz) ? shorted.RepeatabilityHz : given;
        bool known = double.IsFinite(uOpen) && double.IsFinite(uShorted);
        // Clock and pull are common to both readings and drop out of their ratio: repeatability is what counts.
        Coupling coupling = CoilWork.Run(() => Coupling.FromOpenAndShorted(open.F0Hz, shorted.F0Hz, known ? uOpen : 0, known ? uShorted : 0));
        (double lower, double upper) = Coupling.SplitHz(open.F0Hz, open.F0Hz, coupling.K);
        double spread = known ? 2 * coupling.Uncertainty : double.NaN;
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.Figure("open_hz", open.F0Hz);
                json.Figure("shorted_hz", shorted.F0Hz);
                json.Figure("k", coupling.K);
                json.Figure("k_standard", known ? coupling.Uncertainty : double.NaN);
                json.Figure("split_lower_hz", lower);
                json.Figure("split_upper_hz", upper);
                Cautions.Write(json, Cautions.Energise);
            }));
        }
        else
        {
            string k = known ? $"{Words.Number(coupling.K, 4)} ± {Words.Digits(spread, 2)} (95 %)" : Words.Number(coupling.K, 4);
            shell.Out.MarkupLineInterpolated($"[bold]k = {k}[/]");
            shell.Out.MarkupLineInterpolated($"Open {Words.Kilohertz(open.F0Hz, 3)} ({open.From}), shorted {Words.Kilohertz(shorted.F0Hz, 3)} ({shorted.From}).");
            shell.Out.MarkupLineInterpolated($"A primary tuned to the open reading would split it into {Words.Kilohertz(lower)} and {Words.Kilohertz(upper)}.");
        }

        if (!known)
        {
            shell.Say("Without --u-hz the uncertainty of k is not known: at small k it is large.");
        }
        else if (coupling.Uncertainty > 0.1 * coupling.K)
        {
            shell.Say("The two readings lie too close together for their uncertainty: k is known to no better than a tenth.");
        }

        Cautions.Say(shell, Cautions.Energise);
        return Math.Max(open.Warn(shell), shorted.Warn(shell));
    }
}
