using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>expect</c>: what a coil of this geometry should read, and whether a reading agrees with it.</summary>
internal sealed class ExpectCommand(Shell shell)
{
    private readonly CoilArgument _coil = new(shell, required: true);
    private readonly Option<string?> _against = new("--against")
    {
        Description = "Set a reading beside it: last, previous, a number, a note, or a frequency with its unit.",
        HelpName = "READING",
    };

    private readonly Option<string?> _sweep = new("--sweep") { Description = "Table and draw f1 against a dimension.", HelpName = "KEY=FROM..TO:STEP" };
    private readonly Option<double?> _target = Quantity.HertzOption("--target", "Find the value of a dimension (--vary, or that of --sweep) that gives this f1.");
    private readonly Option<string?> _vary = new("--vary") { Description = "The dimension to vary for --target.", HelpName = "KEY" };
    private readonly Option<bool> _profile = new("--profile") { Description = "Show voltage and current along the winding." };
    private readonly Option<bool> _sensitivities = new("--sensitivities") { Description = "Show how each dimension moves f1." };

    public static Command Create(Shell shell) => new ExpectCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("expect", "From a coil's geometry: f1 and overtones, L, C, the bound on Q, and how sure that is.")
        {
            Options = { _against, RecordChoice.RecordOption, _sweep, _target, _vary, _profile, _sensitivities },
        };
        _coil.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        CoilGeometry coil = _coil.Load(parsed)!;
        bool json = parsed.GetValue(CommonOptions.Json);
        SweepRange? sweep = parsed.GetValue(_sweep) is string text ? SweepRange.Parse(text) : null;
        double? target = parsed.GetValue(_target);
        if (sweep is not null || target is not null)
        {
            return new DimensionSearch(shell, coil).Run(sweep, target, parsed.GetValue(_vary), json);
        }

        if (parsed.GetValue(_vary) is not null)
        {
            throw new UserError("--vary goes with --target: say which f1 is wanted.");
        }

        CoilExpectation expectation = CoilWork.Run(() => Expectations.Of(coil));
        FrequencySource? source = parsed.GetValue(_against) is string words ? FrequencySource.Of(shell, parsed, words) : null;
        if (source is { IsOfPrimary: true })
        {
            throw new UserError($"{source.From} is a reading of the primary tank, not of the secondary: set it beside `tank`.");
        }

        source?.WarnOfPrimary(shell, "absent", "open");
        Comparison? comparison = source is null
            ? null
            : CoilWork.Run(() => Comparison.Of(expectation, source.F0Hz, double.IsFinite(source.AbsoluteHz) ? source.AbsoluteHz : 0));
        if (json)
        {
            shell.OutText.WriteLine(JsonText.Object(writer => ExpectationJson.Write(writer, expectation, comparison, source)));
        }
        else
        {
            ExpectationText.Write(shell.Out, expectation);
            if (parsed.GetValue(_sensitivities))
            {
                ExpectationText.WriteSensitivities(shell.Out, expectation);
            }

            if (parsed.GetValue(_profile))
            {
                ExpectationText.WriteProfile(shell.Out, expectation.Modes[0]);
            }

            if (comparison is not null)
            {
                ExpectationText.WriteComparison(shell.Out, expectation, comparison, source!);
            }
        }

        Cautions.Say(shell, CoilExpectation.Caution);
        return source?.Warn(shell) ?? ExitCode.Ok;
    }
}
