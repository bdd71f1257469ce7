using System.CommandLine;
using Looseloop.Record;
using Looseloop.Terminal;

namespace Looseloop.Records;

/// <summary>Which record a command reads or writes.</summary>
internal static class RecordChoice
{
    /// <summary>Names a record where the command line does not.</summary>
    public const string Variable = "LOOSELOOP_RECORD";

    public static readonly Option<string?> RecordOption = new("--record")
    {
        Description = $"The record (default: ${Variable}, or {RecordFolder.FileName} in the user's data folder).",
        HelpName = "FILE",
    };

    /// <summary>The record's file: flag, then environment, then the user's data folder.</summary>
    public static string PathOf(Shell shell, ParseResult parsed) =>
        parsed.GetValue(RecordOption) ?? shell.Environment(Variable) ?? RecordFolder.DefaultFile();

    /// <summary>Opens it for reading.</summary>
    public static RecordReader OpenForReading(Shell shell, ParseResult parsed)
    {
        string path = PathOf(shell, parsed);
        try
        {
            return RecordReader.Open(path);
        }
        catch (RecordException error) when (error.Problem == RecordProblem.NotFound)
        {
            throw new UserError(
                $"There is no record {path} yet: the first reading makes it. Another one is named with --record.", ExitCode.Failure);
        }
    }

    /// <summary>Opens it for writing, and says so where a run of an earlier start was found without its end.</summary>
    public static RecordStore OpenForWriting(Shell shell, ParseResult parsed)
    {
        RecordStore store = RecordStore.Open(PathOf(shell, parsed), shell.Time.GetUtcNow());
        if (store.ClosedAtOpening.Count > 0)
        {
            shell.Say(
                $"Run {string.Join(", ", store.ClosedAtOpening)} had no end: its program was stopped before it could write one. What it had saved is kept, and it is marked as interrupted.");
        }

        return store;
    }
}
