using System.CommandLine;
using System.Text.Json;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>history</c>: what is in the record, the newest first.</summary>
internal sealed class HistoryCommand(Shell shell)
{
    private readonly HistoryFilter _filter = new();

    private readonly Option<int> _limit = new("--limit")
    {
        Description = "At most so many.",
        DefaultValueFactory = _ => 20,
        HelpName = "N",
    };

    private readonly Option<bool> _readings = new("--readings") { Description = "Every reading on a line of its own, also those of a log." };

    public static Command Create(Shell shell) => new HistoryCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("history", "List what is in the record, the newest first.")
        {
            Options = { _limit, _readings, RecordChoice.RecordOption },
        };
        _filter.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        HistoryQuery query = _filter.Query(shell, parsed, Math.Max(1, parsed.GetValue(_limit)));
        using RecordReader record = RecordChoice.OpenForReading(shell, parsed);
        bool json = parsed.GetValue(CommonOptions.Json);
        if (parsed.GetValue(_readings))
        {
            IReadOnlyList<ReadingSummary> readings = record.Readings(query);
            if (json)
            {
                shell.OutText.WriteLine(JsonText.Object(writer => WriteReadings(writer, readings)));
            }
            else
            {
                ShowReadings(readings);
            }
        }
        else
        {
            IReadOnlyList<RunSummary> runs = record.Runs(query);
            if (json)
            {
                shell.OutText.WriteLine(JsonText.Object(writer => WriteRuns(writer, runs)));
            }
            else
            {
                ShowRuns(runs);
            }
        }

        return ExitCode.Ok;
    }

    private void ShowRuns(IReadOnlyList<RunSummary> runs)
    {
        Table table = new Table().Border(TableBorder.Simple)
            .AddColumns("run", "when", "what", "coil", "n", "last f0 in Hz", "last Q", "verdict", "note");
        foreach (RunSummary run in runs)
        {
            // Only an end that is not the usual one is worth its place on the line.
            string what = run.Stop is { Status: RunStatus.Completed } ? run.Procedure : $"{run.Procedure}, {RecordWords.Status(run.Stop)}";
            table.AddRow(
                $"{run.Number}", RecordWords.Minute(shell, run.Utc), what.EscapeMarkup(), (run.Coil ?? "").EscapeMarkup(), $"{run.Count}",
                RecordWords.F0(run.Last), RecordWords.Q(run.Last), run.Last is { } read ? Verdicts.Markup(read.Verdict) : "-",
                (run.Note ?? "").EscapeMarkup());
        }

        Narrow(table);
        shell.Out.Write(table);
        if (runs.Count == 0)
        {
            shell.Say("Nothing in the record fits.");
        }
    }

    private void ShowReadings(IReadOnlyList<ReadingSummary> readings)
    {
        Table table = new Table().Border(TableBorder.Simple).AddColumns("reading", "when", "coil", "f0 in Hz", "Q", "verdict", "note");
        foreach (ReadingSummary reading in readings)
        {
            string note = reading.RefitOf is { } of ? $"refit of {of} {reading.Note}" : reading.Note ?? "";
            table.AddRow(
                $"{reading.Number}", RecordWords.Minute(shell, reading.Utc), (reading.Coil ?? "").EscapeMarkup(),
                RecordWords.F0(reading), RecordWords.Q(reading), Verdicts.Markup(reading.Verdict), note.EscapeMarkup());
        }

        Narrow(table);
        shell.Out.Write(table);
        if (readings.Count == 0)
        {
            shell.Say("Nothing in the record fits.");
        }
    }

    // Little room between the columns, so that a usual line needs no second one at a hundred characters.
    private static void Narrow(Table table)
    {
        foreach (TableColumn column in table.Columns)
        {
            column.Padding = new Padding(0, 0, 2, 0);
        }
    }

    private static void WriteRuns(Utf8JsonWriter json, IReadOnlyList<RunSummary> runs)
    {
        json.WriteNumber("schema_version", 1);
        json.Objects("runs", runs, run =>
        {
            json.WriteNumber("run", run.Number);
            json.WriteString("id", run.Id);
            json.WriteString("utc", run.Utc);
            json.WriteString("procedure", run.Procedure);
            json.WriteString("coil", run.Coil);
            json.WriteString("note", run.Note);
            json.WriteString("status", RecordWords.Status(run.Stop).Replace(' ', '_'));
            json.WriteNumber("count", run.Count);
            if (run.Last is { } last)
            {
                json.WriteStartObject("last");
                Write(json, last);
                json.WriteEndObject();
            }
        });
    }

    private static void WriteReadings(Utf8JsonWriter json, IReadOnlyList<ReadingSummary> readings)
    {
        json.WriteNumber("schema_version", 1);
        json.Objects("readings", readings, reading => Write(json, reading));
    }

    private static void Write(Utf8JsonWriter json, ReadingSummary reading)
    {
        json.WriteNumber("reading", reading.Number);
        json.WriteString("id", reading.Id);
        json.WriteNumber("run", reading.Run);
        json.Figure("refit_of", reading.RefitOf ?? double.NaN);
        json.WriteString("utc", reading.Utc);
        json.WriteString("coil", reading.Coil);
        json.WriteString("note", reading.Note);
        json.WriteString("verdict", reading.Verdict.ToString().ToLowerInvariant());
        json.Figure("f0_hz", reading.F0Hz);
        json.Figure("f0_repeatability_95_hz", 2 * reading.F0RepeatabilityHz);
        json.Figure("f0_absolute_95_hz", 2 * reading.F0AbsoluteHz);
        json.Figure("q", reading.Q);
        json.Figure("q_repeatability_95", 2 * reading.QRepeatability);
        json.Figure("q_absolute_95", 2 * reading.QAbsolute);
    }
}
