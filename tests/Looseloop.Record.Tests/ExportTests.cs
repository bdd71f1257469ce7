using System.Globalization;
using System.Text.Json;
using Looseloop.Readings;
using Looseloop.RecordBench;

namespace Looseloop.Record.Tests;

public sealed class ExportTests : IDisposable
{
    private static readonly DateTimeOffset _now = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);

    private readonly TemporaryFolder _folder = new();
    private readonly RecordStore _store;
    private readonly Reading _reading = SampleReadings.At(3, "tall", "a \"note\", with all\nof it") with { RingQ = double.NaN };

    public ExportTests()
    {
        _store = RecordStore.Open(_folder.File("a.db"), _now);
        RunStart start = SampleReadings.Start();
        _store.Append(start);
        _store.Append(start.Id, _reading);
        _store.Append(new RunEvent { Id = Guid.CreateVersion7(), RunId = start.Id, Utc = _now, Kind = RunEventKind.PausedFieldPresent, Detail = "a field" });
        _store.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", 1));
    }

    public void Dispose()
    {
        _store.Dispose();
        _folder.Dispose();
    }

    // A small reader of RFC 4180, written for this test.
    private static List<List<string>> Parse(string text)
    {
        List<List<string>> rows = [[]];
        bool quoted = false;
        System.Text.StringBuilder field = new();
        for (int i = 0; i < text.Length; i++)
        {
            char c = text[i];
            if (quoted && c == '"' && i + 1 < text.Length && text[i + 1] == '"')
            {
                field.Append(c);
                i++;
            }
            else if (c == '"')
            {
                quoted = !quoted;
            }
            else if (!quoted && c is ',' or '\n')
            {
                rows[^1].Add(field.ToString().TrimEnd('\r'));
                field.Clear();
                if (c == '\n')
                {
                    rows.Add([]);
                }
            }
            else
            {
                field.Append(c);
            }
        }

        rows.RemoveAt(rows.Count - 1);
        return rows;
    }

    [Theory]
    [InlineData("en-US")]
    [InlineData("de-DE")]
    public void Readings_as_CSV_give_back_the_very_figures_in_any_culture(string culture)
    {
        CultureInfo.CurrentCulture = new CultureInfo(culture);
        StringWriter output = new();
        Assert.Equal(1, CsvExport.WriteReadings(_store.Reader, [1], output));
        List<List<string>> rows = Parse(output.ToString());
        Assert.Equal(2, rows.Count);
        Assert.Equal(rows[0].Count, rows[1].Count);
        Assert.Equal(_reading.F0Hz, double.Parse(Field("f0_hz"), CultureInfo.InvariantCulture));
        Assert.Equal(_reading.Note, Field("note"));
        Assert.Equal("", Field("ring_q"));
        Assert.Equal("2026-03-01T08:00:03.000000Z", Field("utc"));
        Assert.Equal("pull-not-measured", Field("reasons"));

        string Field(string name) => rows[1][rows[0].IndexOf(name)];
    }

    [Fact]
    public void Points_as_CSV_are_all_there()
    {
        StringWriter output = new();
        Assert.Equal(13, CsvExport.WritePoints(_store.Reader, [1], output));
        List<List<string>> rows = Parse(output.ToString());
        Assert.Equal(14, rows.Count);
        int sum = rows[0].IndexOf("sum_counts");
        Assert.Equal(_reading.Points.Select(p => p.Sum), rows.Skip(1).Select(r => long.Parse(r[sum], CultureInfo.InvariantCulture)));
    }

    [Fact]
    public void JSON_lines_hold_every_document_in_order()
    {
        StringWriter output = new();
        Assert.Equal(1, JsonLinesExport.Write(_store.Reader, [1], output));
        JsonElement[] lines = [.. output.ToString().TrimEnd('\n').Split('\n').Select(line => JsonDocument.Parse(line).RootElement)];
        Assert.Equal(["start", "reading", "event", "stop"], lines.Select(l => l.GetProperty("document").GetString()));
        Assert.All(lines, l => Assert.Equal(1, l.GetProperty("schema").GetInt32()));
        JsonElement reading = lines[1];
        Assert.Equal(_reading.F0Hz, reading.GetProperty("f0_hz").GetDouble());
        Assert.Equal(JsonValueKind.Null, reading.GetProperty("ring_q").ValueKind);
        Assert.Equal(13, reading.GetProperty("points").GetArrayLength());
        Assert.Equal(JsonValueKind.Null, reading.GetProperty("budget")[1].GetProperty("degrees_of_freedom").ValueKind);
        Assert.Equal(_reading.Points[4].Sum, reading.GetProperty("points")[4].GetProperty("sum_counts").GetInt64());
        Assert.Equal("paused_field_present", lines[2].GetProperty("kind").GetString());
        Assert.Equal("completed", lines[3].GetProperty("status").GetString());
    }
}
