using System.Buffers;
using System.Text;
using System.Text.Json;
using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>
/// Runs as JSON lines: each document (start, reading, event, stop) is one object on a line of its own, in the order it was kept,
/// with "document" and "schema" first, units in the names, and null where a figure is not known (or a degree of freedom is
/// infinite).
/// </summary>
public static class JsonLinesExport
{
    /// <summary>The version of the form of these lines.</summary>
    public const int Schema = 1;

    /// <summary>Writes some runs and returns how many readings they had.</summary>
    public static long Write(RecordReader record, IEnumerable<long> runs, TextWriter output)
    {
        ArrayBufferWriter<byte> buffer = new();
        using Utf8JsonWriter json = new(buffer);
        long count = 0;
        foreach (long run in runs)
        {
            RunDocument document = record.Run(run);
            Line("start", () => Start(json, document));
            Queue<RunEvent> events = new(document.Events);
            foreach (long number in record.AllReadingsOf(run))
            {
                ReadingSummary figures = record.Figures(number);
                while (events.TryPeek(out RunEvent? next) && next.Utc <= figures.Utc)
                {
                    Line("event", () => Event(json, run, events.Dequeue()));
                }

                Line("reading", () => ReadingJson.Write(json, figures, record.Reading(number)));
                count++;
            }

            while (events.Count > 0)
            {
                Line("event", () => Event(json, run, events.Dequeue()));
            }

            if (document.Stop is { } stop)
            {
                Line("stop", () => Stop(json, run, stop, document.StopAssumed));
            }
        }

        return count;

        void Line(string kind, Action body)
        {
            buffer.ResetWrittenCount();
            json.Reset();
            json.WriteStartObject();
            json.WriteString("document", kind);
            json.WriteNumber("schema", Schema);
            body();
            json.WriteEndObject();
            json.Flush();
            output.Write(Encoding.UTF8.GetString(buffer.WrittenSpan));
            output.Write('\n');
        }
    }

    private static void Start(Utf8JsonWriter json, RunDocument run)
    {
        json.WriteNumber("run", run.Number);
        json.WriteString("id", run.Start.Id);
        json.WriteString("utc", Iso.Text(run.Start.Utc));
        json.WriteString("procedure", run.Start.Procedure);
        json.WriteString("host_version", run.Start.HostVersion);
        json.WriteString("coil", run.Start.Coil);
        json.WriteString("note", run.Start.Note);
        ReadingJson.Map(json, "options", run.Start.Options);
        if (run.Start.Box is { } box)
        {
            ReadingJson.Box(json, box);
        }
    }

    private static void Event(Utf8JsonWriter json, long run, RunEvent happened)
    {
        json.WriteNumber("run", run);
        json.WriteString("id", happened.Id);
        json.WriteString("utc", Iso.Text(happened.Utc));
        ReadingJson.Number(json, "monotonic_s", happened.MonotonicS);
        json.WriteString("kind", JsonNamingPolicy.SnakeCaseLower.ConvertName(happened.Kind.ToString()));
        json.WriteString("from", happened.From is { } from ? Iso.Text(from) : null);
        json.WriteString("to", happened.To is { } to ? Iso.Text(to) : null);
        json.WriteString("detail", happened.Detail);
    }

    private static void Stop(Utf8JsonWriter json, long run, RunStop stop, bool assumed)
    {
        json.WriteNumber("run", run);
        json.WriteString("utc", Iso.Text(stop.Utc));
        json.WriteString("status", JsonNamingPolicy.SnakeCaseLower.ConvertName(stop.Status.ToString()));
        json.WriteString("reason", stop.Reason);
        json.WriteNumber("count", stop.Count);
        json.WriteBoolean("assumed", assumed);
    }
}
