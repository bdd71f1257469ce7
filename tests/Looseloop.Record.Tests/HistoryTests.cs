using Looseloop.Readings;
using Looseloop.RecordBench;

namespace Looseloop.Record.Tests;

public sealed class HistoryTests : IDisposable
{
    private static readonly DateTimeOffset _now = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);

    private readonly TemporaryFolder _folder = new();
    private readonly RecordStore _store;

    public HistoryTests()
    {
        _store = RecordStore.Open(_folder.File("a.db"), _now);
        Run("read", "tall", "before", 1);
        Run("log", "tall", null, 10, 11, 12);
        Run("read", "short", "first look", 20);
        Run("read", "tall", "after Top load", 30);
    }

    public void Dispose()
    {
        _store.Dispose();
        _folder.Dispose();
    }

    private void Run(string procedure, string coil, string? note, params int[] readings)
    {
        RunStart start = SampleReadings.Start(procedure, coil, note) with { Utc = SampleReadings.At(readings[0]).Utc };
        _store.Append(start);
        foreach (int n in readings)
        {
            _store.Append(start.Id, SampleReadings.At(n, coil, note));
        }

        _store.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", readings.Length));
    }

    [Fact]
    public void Runs_come_newest_first_with_their_last_reading()
    {
        IReadOnlyList<RunSummary> runs = _store.Reader.Runs(new HistoryQuery());
        Assert.Equal([4L, 3, 2, 1], runs.Select(r => r.Number));
        Assert.Equal(3, runs[2].Count);
        Assert.Equal(SampleReadings.At(12).F0Hz, runs[2].Last!.F0Hz);
    }

    [Fact]
    public void Filters_narrow_runs_and_readings()
    {
        RecordReader reader = _store.Reader;
        Assert.Equal([4L, 2, 1], reader.Runs(new HistoryQuery { Coil = "tall" }).Select(r => r.Number));
        Assert.Equal([2L], reader.Runs(new HistoryQuery { Procedure = "log" }).Select(r => r.Number));
        Assert.Equal([4L, 3, 2], reader.Readings(new HistoryQuery { Procedure = "log" }).Select(r => r.Number));
        Assert.Equal([4L], reader.Runs(new HistoryQuery { Note = "top LOAD" }).Select(r => r.Number));
        Assert.Equal([6L, 5], reader.Readings(new HistoryQuery { Since = SampleReadings.At(20).Utc }).Select(r => r.Number));
        Assert.Equal([1L], reader.Readings(new HistoryQuery { Until = SampleReadings.At(9).Utc }).Select(r => r.Number));
        Assert.Equal(2, reader.Readings(new HistoryQuery { Limit = 2 }).Count);
        Assert.Equal([3L, 4], reader.RunNumbers(new HistoryQuery { Limit = 2 }));
    }

    [Theory]
    [InlineData("3", 3)]
    [InlineData("last", 6)]
    [InlineData("LAST", 6)]
    [InlineData("previous", 4)]
    [InlineData("before", 1)]
    [InlineData("First Look", 5)]
    [InlineData("after top", 6)]
    public void A_reading_is_found_by_number_word_or_note(string words, long number) => Assert.Equal(number, _store.Reader.Find(words));

    [Theory]
    [InlineData("99")]
    [InlineData("nothing of the kind")]
    public void What_is_not_there_is_said_not_to_be(string words) =>
        Assert.Equal(RecordProblem.NotFound, Assert.Throws<RecordException>(() => _store.Reader.Find(words)).Problem);

    [Fact]
    public void An_empty_record_has_no_last_reading()
    {
        using RecordStore empty = RecordStore.Open(_folder.File("empty.db"), _now);
        Assert.Equal(RecordProblem.NotFound, Assert.Throws<RecordException>(() => empty.Reader.Find("last")).Problem);
        Assert.Empty(empty.Reader.Runs(new HistoryQuery()));
    }

    [Fact]
    public void Track_gives_times_by_the_monotonic_clock_and_bridges_a_restart_by_UTC()
    {
        RunStart start = SampleReadings.Start();
        Reading one = SampleReadings.At(100);
        _store.Append(start);
        _store.Append(start.Id, one with { MonotonicS = 50 });

        // UTC was set back by an hour; the monotonic clock knows better.
        _store.Append(start.Id, one with { Id = Guid.CreateVersion7(), MonotonicS = 60, Utc = one.Utc.AddHours(-1) });

        // Another start of the computer: the monotonic clock begins anew, 30 s later by UTC.
        _store.Append(start.Id, one with { Id = Guid.CreateVersion7(), MonotonicS = 5, Utc = one.Utc.AddHours(-1).AddSeconds(30) });
        Assert.Equal([0.0, 10, 40], _store.Reader.Track(5).Select(p => p.TimeS));
    }

    [Fact]
    public void Readers_look_on_while_the_writer_writes()
    {
        using RecordReader reader = RecordReader.Open(_store.Path);
        long before = reader.CountReadings();
        Run("read", "tall", null, 40);
        Assert.Equal(before + 1, reader.CountReadings());
    }
}
