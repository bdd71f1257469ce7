using System.CommandLine;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Terminal;

namespace Looseloop.Records;

/// <summary>What earlier ladders, trims, standoffs and statements have left in the record, put to use.</summary>
internal static class KnownFacts
{
    /// <summary>The options of a reading with the law, clock, commissioning, set-up and pull that the record knows; as they are where there is no record.</summary>
    public static ReadOptions Apply(Shell shell, ParseResult parsed, ReadOptions options, BoxIdentity box)
    {
        if (!File.Exists(RecordChoice.PathOf(shell, parsed)))
        {
            return options;
        }

        try
        {
            using RecordReader record = OpenForReading(shell, parsed);
            return Apply(options, box, new RecordedFacts(record));
        }
        catch (RecordException error) when (error.Problem == RecordProblem.Busy)
        {
            shell.Say($"What is known of this box and coil could not be looked up, and the budget is wider for it: {error.Message}");
            return options;
        }
    }

    /// <summary>The same from open facts.</summary>
    public static ReadOptions Apply(ReadOptions options, BoxIdentity box, RecordedFacts facts)
    {
        IReadOnlyDictionary<string, string> setUp = options.Coil is string name && options.SetUp.Count == 0 ? facts.SetUpOf(name) : options.SetUp;
        return options with
        {
            Law = facts.LawOf(box.Port) is DetectorLaw law && law.Kind == options.Law.Kind ? law : options.Law,
            Clock = facts.ClockOf(box.Port) ?? options.Clock,
            Commissioned = IsCommissioned(box, facts),
            SetUp = setUp,
            Pull = options.Coil is string coil ? facts.PullOf(coil, setUp) ?? options.Pull : options.Pull,
        };
    }

    /// <summary>True if every step of commissioning stands passed for this board with this firmware.</summary>
    public static bool IsCommissioned(BoxIdentity box, RecordedFacts facts) =>
        CommissioningStanding.Of(facts.CommissioningsOf(box.Port), box.Board, box.FirmwareVersion).IsComplete;

    // A look needs no writer's lock, so a log that runs meanwhile is not in the way; only a record of an older form has to be
    // brought up to date first.
    private static RecordReader OpenForReading(Shell shell, ParseResult parsed)
    {
        try
        {
            return RecordChoice.OpenForReading(shell, parsed);
        }
        catch (RecordException error) when (error.Problem == RecordProblem.OlderVersion)
        {
            RecordChoice.OpenForWriting(shell, parsed).Dispose();
            return RecordChoice.OpenForReading(shell, parsed);
        }
    }
}
