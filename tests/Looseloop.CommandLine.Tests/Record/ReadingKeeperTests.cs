using System.Text.Json;
using Looseloop.Readings;
using Looseloop.Record;

namespace Looseloop.CommandLine.Tests.Record;

public sealed class ReadingKeeperTests : IDisposable
{
    private readonly SampleRecord _record = new();

    public void Dispose() => _record.Dispose();

    [Fact]
    public void A_reading_of_the_bench_is_kept_where_a_record_is_named_and_shown_from_it()
    {
        string own = _record.File("own.db");
        AppRun read = AppRun.Of("read", "--box", "bench", "--note", "first", "--record", own);
        Assert.Contains("Kept as reading 1", read.Error);
        AppRun shown = AppRun.Of("show", "first", "--record", own);
        Assert.Equal(0, shown.ExitCode);
        Assert.Contains("reading 1", shown.Out);
    }

    [Fact]
    public void What_is_known_of_a_box_is_looked_up_while_another_program_writes_the_record()
    {
        string own = _record.File("own.db");
        AppRun.Of("read", "--box", "bench", "--near", "150k", "--quiet", "--record", own);
        using RecordStore writer = RecordStore.Open(own, DateTimeOffset.UtcNow);
        Reading first = writer.Reader.Reading(1);
        new RecordFacts(writer, "test").Keep(first.Box.Port, new ClockTrim(1000, 1, first.Utc));
        AppRun read = AppRun.Of("read", "--box", "bench", "--near", "150k", "--json", "--record", own);

        // Both readings are of one seed, so the clock's 1000 ppm are all that differs; keeping the second one is what fails.
        double f0 = JsonDocument.Parse(read.Out).RootElement.GetProperty("f0_hz").GetDouble();
        Assert.Equal(1.001 * first.F0Hz, f0, 1e-6 * f0);
        Assert.Contains("was not kept", read.Error);
        Assert.Equal(1, read.ExitCode);
    }

    [Fact]
    public void A_log_takes_what_is_known_as_a_reading_does()
    {
        string own = _record.File("own.db");
        AppRun.Of("read", "--box", "bench:wren", "--near", "150k", "--quiet", "--record", own);
        Reading first;
        using (RecordStore writer = RecordStore.Open(own, DateTimeOffset.UtcNow))
        {
            first = writer.Reader.Reading(1);
            new RecordFacts(writer, "test").Keep(first.Box.Port, new ClockTrim(1000, 1, first.Utc));
            new RecordFacts(writer, "test").Keep("tall", new Dictionary<string, string> { ["top"] = "ring" }, first.Utc);
        }

        AppRun.Of("log", "--box", "bench:wren", "--near", "150k", "--for", "20s", "--coil", "tall", "--quiet", "--record", own);
        using RecordReader record = RecordReader.Open(own);
        Reading logged = record.Reading(2);
        Assert.Equal(1000, logged.Basis!.Clock!.Ppm);
        Assert.Equal("ring", logged.SetUp["top"]);
        Assert.Equal(1.001 * first.F0Hz, logged.F0Hz, 1);
    }
}
