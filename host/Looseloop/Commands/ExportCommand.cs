using System.CommandLine;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>export</c>: readings of the record for other programs.</summary>
internal sealed class ExportCommand(Shell shell)
{
    private readonly HistoryFilter _filter = new();
    private readonly Argument<long[]> _runs = new("RUN") { Description = "Numbers of runs; all that fit the options where none is given.", Arity = ArgumentArity.ZeroOrMore };
    private readonly Option<bool> _points = new("--points") { Description = "One row for each raw point instead of each reading." };
    private readonly Option<string?> _to = new("--to") { Description = "A file that is not there yet: .csv, or .jsonl for all documents as JSON lines.", HelpName = "FILE" };

    public static Command Create(Shell shell) => new ExportCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("export", "Write readings of the record as CSV, or whole runs as JSON lines (--json), with units.")
        {
            Arguments = { _runs },
            Options = { _points, _to, RecordChoice.RecordOption },
        };
        _filter.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        HistoryQuery query = _filter.Query(shell, parsed, int.MaxValue);
        using RecordReader record = RecordChoice.OpenForReading(shell, parsed);
        long[] given = parsed.GetValue(_runs) ?? [];
        foreach (long run in given)
        {
            // Says that there is no such run before the first line is written.
            record.Run(run);
        }

        IReadOnlyList<long> runs = given.Length > 0 ? given : record.RunNumbers(query);
        string? path = parsed.GetValue(_to);
        bool lines = parsed.GetValue(CommonOptions.Json) || (path?.EndsWith(".jsonl", StringComparison.OrdinalIgnoreCase) ?? false);
        if (path is null)
        {
            Write(record, runs, shell.OutText, lines, parsed.GetValue(_points));
            return ExitCode.Ok;
        }

        long count;
        using (TextWriter file = Create(path))
        {
            count = Write(record, runs, file, lines, parsed.GetValue(_points));
        }

        shell.Say($"{count} {(parsed.GetValue(_points) && !lines ? "points" : "readings")} of {runs.Count} runs are in {path}.");
        return ExitCode.Ok;
    }

    private static StreamWriter Create(string path)
    {
        try
        {
            return new StreamWriter(new FileStream(path, FileMode.CreateNew, FileAccess.Write));
        }
        catch (IOException) when (File.Exists(path))
        {
            throw new UserError($"{path} exists already and was left as it is. Name another file.", ExitCode.Failure);
        }
    }

    private static long Write(RecordReader record, IReadOnlyList<long> runs, TextWriter output, bool lines, bool points) =>
        lines ? JsonLinesExport.Write(record, runs, output)
        : points ? CsvExport.WritePoints(record, runs, output)
        : CsvExport.WriteReadings(record, runs, output);
}
