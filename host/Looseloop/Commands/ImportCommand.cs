using System.CommandLine;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>import</c>: merges another machine's record into this one, without doubles.</summary>
internal sealed class ImportCommand(Shell shell)
{
    private readonly Argument<string> _other = new("RECORD") { Description = "The other record's file; it is only read." };

    public static Command Create(Shell shell) => new ImportCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("import", "Merge another record into this one; what is here already is left as it is.")
        {
            Arguments = { _other },
            Options = { RecordChoice.RecordOption },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
        ImportResult result = store.Import(parsed.GetValue(_other)!, shell.Time.GetUtcNow());
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.WriteNumber("runs", result.Runs);
                json.WriteNumber("readings", result.Readings);
                json.WriteNumber("events", result.Events);
                json.WriteNumber("facts", result.Facts);
                json.WriteNumber("readings_already_there", result.AlreadyThere);
            }));
        }
        else
        {
            shell.OutText.WriteLine(
                $"{result.Readings} readings in {result.Runs} new runs, {result.Events} events and {result.Facts} facts were added; {result.AlreadyThere} readings were here already.");
        }

        return ExitCode.Ok;
    }
}
