using System.CommandLine;
using Looseloop.Drift.Comparison;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>compare</c>: whether f0 or Q changed between two readings, and what it means.</summary>
internal sealed class CompareCommand(Shell shell)
{
    private readonly Argument<string> _first = new("FIRST")
    {
        Description = "The earlier reading: its number, last, previous, or a note.",
        DefaultValueFactory = _ => "previous",
    };

    private readonly Argument<string> _second = new("SECOND")
    {
        Description = "The later reading, likewise.",
        DefaultValueFactory = _ => "last",
    };

    private readonly Option<bool> _moved = new("--moved")
    {
        Description = "Loop, pickup, cable or people stood elsewhere at the second reading: their terms no longer cancel.",
    };

    public static Command Create(Shell shell) => new CompareCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("compare", "Tell whether f0 or Q changed between two readings.")
        {
            Arguments = { _first, _second },
            Options = { _moved, RecordChoice.RecordOption },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        using RecordReader record = RecordChoice.OpenForReading(shell, parsed);
        long first = record.Find(parsed.GetValue(_first)!);
        long second = record.Find(parsed.GetValue(_second)!);
        if (first == second)
        {
            throw new UserError($"Both are reading {first}. Name two readings by number, last, previous, or a note.");
        }

        Reading a = record.Reading(first);
        Reading b = record.Reading(second);
        if (ReadingComparison.Of(a, b, new CompareOptions { Untouched = !parsed.GetValue(_moved) }) is not { } compared)
        {
            long without = double.IsFinite(a.F0Hz) && a.Verdict != Verdict.None ? second : first;
            throw new UserError($"Reading {without} has no figures (verdict none): there is nothing to compare.", ExitCode.NotTrustworthy);
        }

        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => ComparisonJson.Write(json, first, second, compared)));
        }
        else
        {
            ComparisonText.Write(shell, (first, a), (second, b), compared);
        }

        bool told = compared.F0.Verdict != ChangeVerdict.CannotTell && compared.Q.Verdict != ChangeVerdict.CannotTell;
        return told ? ExitCode.Ok : ExitCode.NotTrustworthy;
    }
}
