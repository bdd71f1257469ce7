using Looseloop.Bench;
using Looseloop.Campaign;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Refit;
using Looseloop.Procedures.Tests.Logging;
using Looseloop.Procedures.Tests.Tracking;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Refit;

/// <summary>What is fitted again with what it was made with must come out the same: the oracle is the first fit.</summary>
public class ReadingRefitTests
{
    [Theory]
    [InlineData("wren")]
    [InlineData("swift")]
    [InlineData("jackdaw")]
    [InlineData("magpie")]
    [InlineData("owl")]
    public void The_same_fit_gives_the_same_figures_reasons_and_budget(string world)
    {
        Reading kept = BenchReading.Take(WorldShelf.Load(world), 1).Reading;
        Reading again = Again(kept, kept.Basis!);
        Assert.Equal(kept.F0Hz, again.F0Hz);
        Assert.Equal(kept.Q, again.Q);
        Assert.Equal(kept.Budget.Lines, again.Budget.Lines);
        Assert.Equal(kept.Verdict, again.Verdict);
        Assert.Equal(kept.Reasons, again.Reasons);
        Assert.Equal(kept.Points, again.Points);
        Assert.NotEqual(kept.Id, again.Id);
        Assert.Equal("today", again.HostVersion);
        Assert.True(RefitChanges.Between(kept, again).Same);
    }

    [Fact]
    public void A_reading_near_a_given_frequency_is_fitted_again_as_one()
    {
        Reading kept = BenchReading.Take(WorldShelf.Load("wren"), 3, options => options with { NearHz = 150_000 }).Reading;
        Reading again = Again(kept, kept.Basis!);
        Assert.Equal(kept.Reasons, again.Reasons);
        Assert.True(RefitChanges.Between(kept, again).Same);
    }

    [Fact]
    public void Clock_and_pull_are_taken_off_as_they_were_the_first_time()
    {
        var clock = new ClockTrim(25, 1, DateTimeOffset.UnixEpoch);
        var pull = new Pull(4e-4, 1e-5, 2e-5, 1e-6, DateTimeOffset.UnixEpoch);
        Reading kept = BenchReading.Take(WorldShelf.Load("wren"), 2, options => options with { Clock = clock, Pull = pull, Commissioned = true }).Reading;
        Assert.True(RefitChanges.Between(kept, Again(kept, kept.Basis!)).Same);
        Reading without = Again(kept, kept.Basis! with { Pull = null });

        // f0 = read (1 - pull): without it, higher by 4e-4 of f0.
        Assert.Equal(kept.F0Hz / (1 - 4e-4), without.F0Hz, 1e-6);
        Assert.Contains(RefitChanges.Between(kept, without).NewReasons, reason => reason.Code == ReasonCode.PullNotMeasured);
    }

    [Fact]
    public void Another_law_of_the_detector_gives_other_figures_and_says_so()
    {
        Reading kept = BenchReading.Take(WorldShelf.Load("wren"), 1).Reading;
        DetectorLaw law = kept.Basis!.Law;
        Reading again = Again(kept, kept.Basis with { Law = law with { PedestalCounts = law.PedestalCounts - 60, PedestalUncertainty = 1 } });
        RefitChanges changes = RefitChanges.Between(kept, again);
        Assert.False(changes.Same);
        Assert.NotEqual(0, changes.QRelative);

        // Sixty counts above the pedestal with the drive off look like a carrier.
        Assert.Contains(changes.NewReasons, reason => reason.Code == ReasonCode.Carrier);
        Assert.NotEqual(Verdict.Sound, again.Verdict);
    }

    [Fact]
    public void What_the_survey_saw_beside_f0_still_stands_against_it()
    {
        Reading kept = BenchReading.Take(WorldShelf.Load("wren"), 1).Reading;
        Reading again = Again(kept, kept.Basis! with
        {
            Survey = kept.Basis.Survey! with { Responses = [.. kept.Basis.Survey.Responses, new SeenResponse("neighbour", kept.F0Hz * 1.02, 500, 1)] },
        });
        Assert.Contains(again.Reasons, reason => reason.Code == ReasonCode.TwoResponses);
        Assert.NotEqual(Verdict.Sound, again.Verdict);
    }

    [Fact]
    public void A_second_opinion_by_ring_down_stands_and_is_judged_anew()
    {
        Reading plain = BenchReading.Take(WorldShelf.Load("wren"), 1).Reading;
        Reading agreed = plain with { RingQ = plain.Q, RingQRelative = 0.004 };
        Reading again = Again(agreed, agreed.Basis!);
        Assert.Equal(agreed.RingQ, again.RingQ, 1e-9 * agreed.RingQ);
        Assert.Equal(Verdict.Sound, again.Verdict);
        Reading apart = Again(plain with { RingQ = 0.7 * plain.Q, RingQRelative = 0.004 }, plain.Basis!);
        Assert.Contains(apart.Reasons, reason => reason.Code == ReasonCode.RingDisagrees);
        Assert.NotEqual(Verdict.Sound, apart.Verdict);
    }

    [Fact]
    public void Tracked_readings_come_out_the_same_on_the_curve_of_their_full_reading()
    {
        using var socket = new BenchSocket(BenchTracking.World(), 5);
        var sink = new MemorySink();
        LogRun.Run(socket, sink, new TestWatch(), LogRun.Options(socket.Time, TimeSpan.FromMinutes(2), TimeSpan.FromSeconds(10)));
        Reading full = sink.Readings[0];
        Reading[] tracked = [.. sink.Readings.Skip(1)];
        Assert.True(tracked.Length > 8);
        Assert.All(tracked, reading => Assert.Null(reading.Basis));
        ReadOutcome fullAgain = ReadingRefit.Full(full, full.Basis!, "today", TimeProvider.System);
        foreach (Reading kept in tracked)
        {
            Assert.True(TrackedReading.Is(kept));
            Reading again = ReadingRefit.Tracked(kept, fullAgain, "today", TimeProvider.System);
            Assert.True(RefitChanges.Between(kept, again).Same, $"{kept.F0Hz} became {again.F0Hz}, u {kept.Budget.F0Hz(false)} became {again.Budget.F0Hz(false)}");
        }
    }

    [Fact]
    public void Tracked_points_that_no_longer_lie_on_the_curve_give_no_figure()
    {
        using var socket = new BenchSocket(BenchTracking.World(), 5);
        var sink = new MemorySink();
        LogRun.Run(socket, sink, new TestWatch(), LogRun.Options(socket.Time, TimeSpan.FromMinutes(1), TimeSpan.FromSeconds(10)));
        ReadOutcome full = ReadingRefit.Full(sink.Readings[0], sink.Readings[0].Basis!, "today", TimeProvider.System);
        Reading kept = sink.Readings[^1];
        Reading bent = kept with { Points = [.. kept.Points.Select((point, i) => i % 2 == 0 ? point with { Sum = point.Sum * 6 / 10 } : point)] };
        Assert.Throws<RefitException>(() => ReadingRefit.Tracked(bent, full, "today", TimeProvider.System));
    }

    [Fact]
    public void Without_points_there_is_nothing_to_fit()
    {
        Reading kept = BenchReading.Take(WorldShelf.Load("wren"), 1).Reading;
        RefitException refused = Assert.Throws<RefitException>(() => Again(kept with { Points = [] }, kept.Basis!));
        Assert.Contains("no raw points", refused.Message);
        Assert.Throws<RefitException>(() => Again(kept with { Points = [kept.Points[0]] }, kept.Basis!));
    }

    private static Reading Again(Reading kept, FitBasis basis) => ReadingRefit.Full(kept, basis, "today", TimeProvider.System).Reading;
}
