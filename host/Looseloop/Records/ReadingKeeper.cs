using System.CommandLine;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Terminal;

namespace Looseloop.Records;

/// <summary>Keeps a single reading as a run of its own.</summary>
internal static class ReadingKeeper
{
    /// <summary>
    /// Keeps it and says its number. A reading of the virtual bench is practice: it is kept only where a record is named.
    /// What cannot be kept is said, and the reading is still shown.
    /// </summary>
    /// <returns>False where it should have been kept and was not.</returns>
    public static bool Keep(Shell shell, ParseResult parsed, string procedure, Reading reading)
    {
        bool named = parsed.GetValue(RecordChoice.RecordOption) is not null || shell.Environment(RecordChoice.Variable) is not null;
        if (!named && reading.Box.Port.StartsWith("bench", StringComparison.Ordinal))
        {
            return true;
        }

        try
        {
            using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
            RunStart start = new()
            {
                Id = Guid.CreateVersion7(reading.Utc),
                Utc = reading.Utc,
                Procedure = procedure,
                HostVersion = reading.HostVersion,
                Box = reading.Box,
                Coil = reading.Coil,
                Note = reading.Note,
            };
            store.Append(start);
            store.Append(start.Id, reading);
            store.Append(new RunStop(start.Id, shell.Time.GetUtcNow(), RunStatus.Completed, "done", 1));
            if (!parsed.GetValue(Commands.CommonOptions.Quiet))
            {
                shell.Say($"Kept as reading {store.Reader.Find("last")}.");
            }

            return true;
        }
        catch (RecordException error)
        {
            shell.Error($"the reading was not kept. {error.Message}");
            return false;
        }
    }
}
