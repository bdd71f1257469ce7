using Looseloop.Readings;
using Looseloop.RecordBench;

namespace Looseloop.Record.Tests;

// What goes in comes out: the oracle is the document itself.
public sealed class RoundTripTests : IDisposable
{
    private static readonly DateTimeOffset _now = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);

    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    internal static void Same(Reading expected, Reading actual)
    {
        Assert.Equal(expected.Points, actual.Points);
        Assert.Equal(expected.Dark, actual.Dark);
        Assert.Equal(expected.Budget.Lines, actual.Budget.Lines);
        Assert.Equal(expected.Reasons, actual.Reasons);
        SameBasis(expected.Basis, actual.Basis);
        Assert.Equal(expected.SetUp.OrderBy(p => p.Key), actual.SetUp.OrderBy(p => p.Key));

        // All else by the record's own equality, with the lists taken out of it.
        Assert.Equal(Bare(expected), Bare(actual));

        static Reading Bare(Reading reading) => reading with
        {
            Points = [],
            Dark = [],
            Reasons = [],
            Budget = new Budget([]),
            SetUp = _empty,
            Basis = null,
        } with
        { Points = _noPoints, Dark = _noDark, Reasons = _noReasons, Budget = _noBudget };
    }

    private static void SameBasis(FitBasis? expected, FitBasis? actual)
    {
        Assert.Equal(expected is null, actual is null);
        if (expected is null || actual is null)
        {
            return;
        }

        Assert.Equal(expected.AtOtherDuty, actual.AtOtherDuty);
        Assert.Equal(expected.AfterLongerDwell, actual.AfterLongerDwell);
        Assert.Equal(expected.Harmonics, actual.Harmonics);
        Assert.Equal(expected.Survey?.LowHz, actual.Survey?.LowHz);
        Assert.Equal(expected.Survey?.Responses, actual.Survey?.Responses);
        Assert.Equal(Bare(expected), Bare(actual));

        static FitBasis Bare(FitBasis basis) => basis with
        {
            AtOtherDuty = _noPoints,
            AfterLongerDwell = _noPoints,
            Harmonics = _noHarmonics,
            Survey = null,
        };
    }

    /// <summary>A basis in which no figure is round.</summary>
    internal static FitBasis SomeBasis() => new()
    {
        Law = new DetectorLaw(DetectorKind.DiodeKnee, 310.1, 0.7, 123.4, 3.3, 1999.9, 51e-6, _now) { BowBound = 0.0021, HighExtraS = 3e-9, HighExtraUncertaintyS = 1e-9 },
        PrefactorExponent = -1,
        Clock = new ClockTrim(-11.3, 0.4, _now),
        Pull = new Pull(0.00031, 0.00002, 1e-5, 1e-6, _now.AddDays(-1)),
        Commissioned = true,
        PlannedF0Hz = 150000.1 / 3,
        PlannedQ = 211.7,
        PlannedDuty = 1 / 3.0,
        DwellUs = 3141,
        Samples = 100,
        SpacingUs = 200,
        Harmonics = [1, 1, 3, 5],
        OtherDuty = 0.5,
        AtOtherDuty = SampleReadings.At(3).Points,
        AfterLongerDwell = [SampleReadings.At(4).Points[0] with { SumSquares = null }],
        MissingInSweep = 2,
        MissingInChecks = 3,
        Saturated = true,
        Survey = new SurveySeen(30000, [new SeenResponse("f0", 150000.3, 1234.5, 1), new SeenResponse("carrier", 612000.9, double.NaN, 0)]),
    };

    private static readonly int[] _noHarmonics = [];
    private static readonly Dictionary<string, string> _empty = [];
    private static readonly RawPoint[] _noPoints = [];
    private static readonly DarkLevel[] _noDark = [];
    private static readonly Reason[] _noReasons = [];
    private static readonly Budget _noBudget = new(Array.Empty<BudgetLine>());

    [Fact]
    public void A_reading_comes_back_whole()
    {
        Reading reading = SampleReadings.At(7, "coil \u00e4", "note, \"quoted\"\nand on");
        RunStart start = SampleReadings.Start();
        string path = _folder.File("a.db");
        using (RecordStore store = RecordStore.Open(path, _now))
        {
            store.Append(start);
            store.Append(start.Id, reading);
            store.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", 1));
        }

        using RecordReader reader = RecordReader.Open(path);
        Same(reading, reader.Reading(1));
    }

    [Fact]
    public void What_a_fit_was_made_with_comes_back_whole_and_a_refit_has_its_own()
    {
        Reading reading = SampleReadings.At(7) with { Basis = SomeBasis() };
        RunStart start = SampleReadings.Start();
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        store.Append(start);
        store.Append(start.Id, SampleReadings.At(6));
        store.Append(start.Id, reading);
        Reading refit = reading with
        {
            Id = Guid.CreateVersion7(),
            Basis = SomeBasis() with { Law = DetectorLaw.Declared(DetectorKind.RmsLinear, 300), Clock = null, Pull = null },
        };
        store.AppendRefit(start.Id, refit, 2);
        Assert.Null(store.Reader.Reading(1).Basis);
        Same(reading, store.Reader.Reading(2));
        Same(refit, store.Reader.Reading(3));
    }

    [Fact]
    public void The_full_reading_that_a_tracked_one_rests_on_is_found_in_its_own_run()
    {
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        RunStart other = SampleReadings.Start();
        RunStart start = SampleReadings.Start();
        store.Append(other);
        store.Append(start);
        store.Append(start.Id, SampleReadings.At(1));
        store.Append(start.Id, SampleReadings.At(2) with { Basis = SomeBasis() });
        store.Append(other.Id, SampleReadings.At(3) with { Basis = SomeBasis() });
        store.Append(start.Id, SampleReadings.At(4) with { Basis = SomeBasis(), F0Hz = double.NaN });
        store.Append(start.Id, SampleReadings.At(5));
        Assert.Equal(2, store.Reader.FullReadingBefore(5));
        Assert.Null(store.Reader.FullReadingBefore(2));
    }

    [Fact]
    public void Unknown_figures_come_back_unknown()
    {
        Reading reading = SampleReadings.At(7) with
        {
            F0Hz = double.NaN,
            Q = double.NaN,
            PeakCounts = double.NaN,
            FeedThrough = double.NaN,
            MonotonicS = double.NaN,
            TemperatureC = double.NaN,
            Verdict = Verdict.None,
            Coil = null,
            Points = [SampleReadings.At(7).Points[0] with { SumSquares = null }],
        };
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        RunStart start = SampleReadings.Start();
        store.Append(start);
        store.Append(start.Id, reading);
        Same(reading, store.Reader.Reading(1));
        Assert.True(double.IsNaN(store.Reader.Figures(1).F0Hz));
    }

    [Fact]
    public void A_run_comes_back_with_its_events_and_its_stop()
    {
        RunStart start = SampleReadings.Start(note: "morning");
        RunEvent gap = new()
        {
            Id = Guid.CreateVersion7(),
            RunId = start.Id,
            Utc = _now,
            MonotonicS = 12.5,
            Kind = RunEventKind.Gap,
            From = _now.AddSeconds(-30),
            To = _now,
            Detail = "no reading for 30 s: the link was lost",
        };
        RunStop stop = new(start.Id, _now.AddMinutes(1), RunStatus.LinkLost, "the box did not come back within 60 s", 0);
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        store.Append(start);
        store.Append(gap);
        store.Append(stop);
        RunDocument run = store.Reader.Run(1);
        Assert.Equal([gap], run.Events);
        Assert.Equal(stop, run.Stop);
        Assert.False(run.StopAssumed);
        Assert.Equal(start with { Options = run.Start.Options }, run.Start);
        Assert.Equal(start.Options, run.Start.Options);
    }

    [Fact]
    public void What_is_appended_twice_is_kept_once()
    {
        RunStart start = SampleReadings.Start();
        Reading reading = SampleReadings.At(1);
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        store.Append(start);
        store.Append(start);
        store.Append(start.Id, reading);
        store.Append(start.Id, reading with { F0Hz = 1 });
        Assert.Equal(1, store.Reader.CountReadings());
        Assert.Equal(reading.F0Hz, store.Reader.Figures(1).F0Hz);
        Assert.Single(store.Reader.Runs(new HistoryQuery()));
    }

    [Fact]
    public void Nothing_is_appended_to_a_run_that_ended_or_never_began()
    {
        RunStart start = SampleReadings.Start();
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        Assert.Throws<InvalidOperationException>(() => store.Append(start.Id, SampleReadings.At(1)));
        store.Append(start);
        store.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", 0));
        Assert.Throws<InvalidOperationException>(() => store.Append(start.Id, SampleReadings.At(1)));
        Assert.Equal(0, store.Reader.CountReadings());
    }

    [Fact]
    public void A_run_without_a_stop_is_closed_as_interrupted_at_the_next_start()
    {
        string path = _folder.File("a.db");
        using (RecordStore store = RecordStore.Open(path, _now))
        {
            RunStart start = SampleReadings.Start();
            store.Append(start);
            store.Append(start.Id, SampleReadings.At(1));
            store.Append(start.Id, SampleReadings.At(2));
        }

        using (RecordReader reader = RecordReader.Open(path))
        {
            Assert.Null(reader.Run(1).Stop);
        }

        using RecordStore again = RecordStore.Open(path, _now);
        Assert.Equal([1L], again.ClosedAtOpening);
        RunDocument run = again.Reader.Run(1);
        Assert.Equal(RunStatus.Interrupted, run.Stop!.Status);
        Assert.Equal(2, run.Stop.Count);
        Assert.True(run.StopAssumed);
    }

    [Fact]
    public void A_refit_stands_beside_the_reading_it_fits_again()
    {
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        RunStart start = SampleReadings.Start("read");
        Reading original = SampleReadings.At(1);
        store.Append(start);
        store.Append(start.Id, original);
        RunStart again = SampleReadings.Start("refit");
        Reading refit = original with { Id = Guid.CreateVersion7(), F0Hz = 150001, HostVersion = "0.2.0" };
        store.Append(again);
        store.AppendRefit(again.Id, refit, 1);
        Same(original, store.Reader.Reading(1));
        Same(refit, store.Reader.Reading(2));
        Assert.Equal(1, store.Reader.Figures(2).RefitOf);
        Assert.Equal(2, Assert.Single(store.Reader.Refits(1)).Number);

        // The points are there once.
        Assert.Equal(13L, store.Reader.Connection.Command("SELECT count(*) FROM point").ExecuteScalar());
        Assert.Equal(1, store.Reader.Find("last"));
        RecordException none = Assert.Throws<RecordException>(
            () => store.AppendRefit(again.Id, refit with { Id = Guid.CreateVersion7() }, 99));
        Assert.Equal(RecordProblem.NotFound, none.Problem);
    }

    [Fact]
    public void Facts_are_kept_with_their_dates_and_the_newest_counts()
    {
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        Fact old = new(Guid.CreateVersion7(), FactSubject.Box, "bench", "clock-trim", _now, "0.1.0", """{"ppm":3.5}""");
        Fact fresh = old with { Id = Guid.CreateVersion7(), Utc = _now.AddDays(1), Json = """{"ppm":3.6}""" };
        store.Append(fresh);
        store.Append(old);
        store.Append(old with { Id = Guid.CreateVersion7(), Subject = FactSubject.Coil });
        Assert.Equal(fresh, store.Reader.LatestFact(FactSubject.Box, "bench", "clock-trim"));
        Assert.Equal([old, fresh], store.Reader.Facts(FactSubject.Box, "bench"));
        Assert.Null(store.Reader.LatestFact(FactSubject.Box, "bench", "pedestal"));
    }
}
