using Looseloop.Readings;

namespace Looseloop.Record.Tests;

// What is kept is given back: the oracle is what went in.
public sealed class RecordFactsTests : IDisposable
{
    private static readonly DateTimeOffset _now = new(2026, 3, 1, 12, 0, 0, TimeSpan.FromHours(2));
    private static readonly Dictionary<string, string> _ring = new() { ["top"] = "ring", ["earth"] = "rod" };
    private static readonly Dictionary<string, string> _bare = new() { ["top"] = "none" };

    private readonly TemporaryFolder _folder = new();
    private readonly RecordStore _store;
    private readonly RecordFacts _facts;

    public RecordFactsTests()
    {
        _store = RecordStore.Open(_folder.File("a.db"), _now);
        _facts = new RecordFacts(_store, "0.1.0");
    }

    public void Dispose()
    {
        _store.Dispose();
        _folder.Dispose();
    }

    [Fact]
    public void A_law_comes_back_whole_and_the_newest_counts()
    {
        DetectorLaw old = new(DetectorKind.DiodeKnee, 401.5, 0.4, 120, 3, 2000, 1e-4, _now.AddDays(-1)) { BowBound = 0.01 };
        DetectorLaw law = new(DetectorKind.RmsLog, 400.25, 0.3, 41.2, 0.2, 1990, 2e-4, _now) { HighExtraS = 5e-8 };
        _facts.Keep("port a", law);
        _facts.Keep("port a", old);
        Assert.Equal(law, _facts.LawOf("port a"));
        Assert.Null(_facts.LawOf("port b"));
        Assert.Throws<ArgumentException>(() => _facts.Keep("port a", law with { ReadOn = null }));
    }

    [Fact]
    public void A_clock_comes_back()
    {
        ClockTrim trim = new(-12.5, 0.3, _now);
        _facts.Keep("port a", trim);
        Assert.Equal(trim, _facts.ClockOf("port a"));
    }

    [Fact]
    public void A_pull_belongs_to_its_coil_and_exactly_its_set_up()
    {
        Pull pull = new(-640e-6, 20e-6, 1e-5, 2e-6, _now);
        _facts.Keep("tall", _ring, pull);
        _facts.Keep("tall", _bare, pull with { F0Relative = -1e-3 });
        Assert.Equal(pull, _facts.PullOf("tall", new Dictionary<string, string> { ["earth"] = "rod", ["top"] = "ring" }));
        Assert.Null(_facts.PullOf("tall", new Dictionary<string, string> { ["top"] = "ring" }));
        Assert.Null(_facts.PullOf("short", _ring));
    }

    [Fact]
    public void A_set_up_comes_back()
    {
        Assert.Empty(_facts.SetUpOf("tall"));
        _facts.Keep("tall", _ring, _now);
        Assert.Equal(_ring.OrderBy(p => p.Key), _facts.SetUpOf("tall").OrderBy(p => p.Key));
    }

    [Fact]
    public void Commissionings_come_back_whole_and_in_order_and_none_replaces_another()
    {
        StepFinding dark = new(
            CommissioningStep.Dark, StepResult.Failed, "No pedestal.", new Dictionary<string, double> { ["mean_counts"] = 0.5, ["moved_counts"] = double.NaN });
        CommissioningRecord first = new(_now, "esp32", "0.1.0", [dark, new StepFinding(CommissioningStep.Ladder, StepResult.NotDone, "-")], true);
        CommissioningRecord second = first with { Utc = _now.AddHours(1), Steps = [dark with { Result = StepResult.Passed }], Interrupted = false };
        Assert.Empty(_facts.CommissioningsOf("port a"));
        _facts.Keep("port a", first);
        _facts.Keep("port a", second);
        IReadOnlyList<CommissioningRecord> kept = _facts.CommissioningsOf("port a");
        Assert.Equal([first.Utc, second.Utc], kept.Select(one => one.Utc));
        Assert.Equal([true, false], kept.Select(one => one.Interrupted));
        Assert.Equal(("esp32", "0.1.0"), (kept[0].Board, kept[0].FirmwareVersion));
        Assert.Equal([StepResult.Failed, StepResult.NotDone], kept[0].Steps.Select(one => one.Result));
        Assert.Equal(dark.Figures, kept[0].Steps[0].Figures);
        Assert.Equal("No pedestal.", kept[0].Steps[0].Detail);
        Assert.Empty(_facts.CommissioningsOf("port b"));
    }

    [Fact]
    public void A_step_stands_as_last_found_out_on_this_board_with_this_firmware()
    {
        StepFinding[] all = [.. Enum.GetValues<CommissioningStep>().Select(step => new StepFinding(step, StepResult.Passed, ""))];
        CommissioningRecord whole = new(_now, "esp32", "0.1.0", all, false);
        CommissioningRecord Redone(StepResult result) => whole with { Steps = [new StepFinding(CommissioningStep.Interlock, result, "")] };
        bool Stands(params CommissioningRecord[] records) => CommissioningStanding.Of(records, "esp32", "0.1.0").IsComplete;
        Assert.True(Stands(whole));
        Assert.True(Stands(whole, Redone(StepResult.Skipped)));
        Assert.False(Stands(whole, Redone(StepResult.Failed)));
        Assert.True(Stands(whole, Redone(StepResult.Failed), Redone(StepResult.Passed)));
        Assert.False(Stands(Redone(StepResult.Passed)));
        Assert.False(CommissioningStanding.Of([whole], "esp32", "0.2.0").IsComplete);
        Assert.False(CommissioningStanding.Of([whole], "esp32s3", "0.1.0").IsComplete);
    }
}
