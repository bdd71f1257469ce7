using Looseloop.Readings;
using Looseloop.RecordBench;

namespace Looseloop.Record.Tests;

public sealed class ImportTests : IDisposable
{
    private static readonly DateTimeOffset _now = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);

    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private static RunStart Fill(RecordStore store, string coil, int from, int count, bool stop = true)
    {
        RunStart start = SampleReadings.Start("log", coil);
        store.Append(start);
        for (int n = from; n < from + count; n++)
        {
            store.Append(start.Id, SampleReadings.At(n, coil, $"note {n}") with { Basis = n == 1 ? RoundTripTests.SomeBasis() : null });
        }

        store.Append(new RunEvent
        {
            Id = Guid.CreateVersion7(),
            RunId = start.Id,
            Utc = _now,
            Kind = RunEventKind.Note,
            Detail = "something",
        });
        if (stop)
        {
            store.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", count));
        }

        return start;
    }

    [Fact]
    public void Another_record_is_merged_without_doubles()
    {
        string other = _folder.File("other.db");
        Reading refitted;
        using (RecordStore their = RecordStore.Open(other, _now))
        {
            Fill(their, "tall", 0, 3);
            RunStart refit = SampleReadings.Start("refit");
            their.Append(refit);
            refitted = their.Reader.Reading(2) with { Id = Guid.CreateVersion7(), F0Hz = 150002 };
            their.AppendRefit(refit.Id, refitted, 2);
            their.Append(new RunStop(refit.Id, _now, RunStatus.Completed, "done", 1));
            their.Append(new Fact(Guid.CreateVersion7(), FactSubject.Coil, "tall", "pull", _now, "0.1.0", "{}"));
        }

        using RecordStore own = RecordStore.Open(_folder.File("own.db"), _now);
        Fill(own, "short", 50, 2);
        ImportResult first = own.Import(other, _now);
        Assert.Equal(new ImportResult(2, 4, 1, 1, 0), first);
        Assert.Equal(new ImportResult(0, 0, 0, 0, 4), own.Import(other, _now));
        Assert.Equal(6, own.Reader.CountReadings());

        using RecordReader theirs = RecordReader.Open(other);
        for (long number = 1; number <= 3; number++)
        {
            RoundTripTests.Same(theirs.Reading(number), own.Reader.Reading(own.Reader.Find($"note {number - 1}")));
        }

        ReadingSummary moved = own.Reader.Readings(new HistoryQuery()).Single(r => r.RefitOf is not null);
        Assert.Equal(own.Reader.Find("note 1"), moved.RefitOf);
        RoundTripTests.Same(refitted, own.Reader.Reading(moved.Number));
        Assert.Empty(own.Reader.CheckIntegrity());
        Assert.NotNull(own.Reader.LatestFact(FactSubject.Coil, "tall", "pull"));
    }

    [Fact]
    public void A_run_that_went_on_after_it_was_merged_is_completed_by_the_next_merge()
    {
        string other = _folder.File("other.db");
        using RecordStore own = RecordStore.Open(_folder.File("own.db"), _now);
        using (RecordStore their = RecordStore.Open(other, _now))
        {
            RunStart start = Fill(their, "tall", 0, 2, stop: false);
            own.Import(other, _now);
            Assert.True(own.Reader.Run(1).StopAssumed);
            Assert.Equal(RunStatus.Interrupted, own.Reader.Run(1).Stop!.Status);

            their.Append(start.Id, SampleReadings.At(9, "tall"));
            their.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", 3));
        }

        ImportResult second = own.Import(other, _now);
        Assert.Equal(1, second.Readings);
        Assert.Equal(2, second.AlreadyThere);
        Assert.False(own.Reader.Run(1).StopAssumed);
        Assert.Equal(RunStatus.Completed, own.Reader.Run(1).Stop!.Status);
        Assert.Equal(3, own.Reader.ReadingsOf(1).Count);
    }

    [Fact]
    public void A_record_is_not_merged_into_itself_and_what_is_no_record_changes_nothing()
    {
        using RecordStore own = RecordStore.Open(_folder.File("own.db"), _now);
        Fill(own, "tall", 0, 1);
        Assert.Throws<RecordException>(() => own.Import(own.Path, _now));
        string text = _folder.File("text");
        File.WriteAllText(text, "not a record");
        Assert.Equal(RecordProblem.NotARecord, Assert.Throws<RecordException>(() => own.Import(text, _now)).Problem);
        Assert.Equal(1, own.Reader.CountReadings());
    }

    [Fact]
    public void Names_with_blanks_and_signs_are_no_obstacle()
    {
        string other = _folder.File("their record #1 100%?.db");
        using (RecordStore their = RecordStore.Open(other, _now))
        {
            Fill(their, "tall", 0, 1);
        }

        using RecordStore own = RecordStore.Open(_folder.File("own.db"), _now);
        Assert.Equal(1, own.Import(other, _now).Readings);
    }
}
