using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Campaign;
using Looseloop.Link;
using Looseloop.Procedures.Commissioning;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Commissioning;

/// <summary>Boxes of the bench, whole and broken: what a world's parameters say is wrong must fail its own step and no other.</summary>
public class CommissioningTests
{
    private static readonly World _whole = new() { Board = new BoardParameters { HasDirect = true } };

    private static CommissioningOutcome Run(
        World world, Func<VirtualBox, IAttendant>? hands = null, CommissioningStep[]? only = null, bool keeping = false,
        Func<DetectorLaw, DetectorLaw>? declare = null, StepLog? log = null, CancellationToken cancel = default)
    {
        var bench = new VirtualBox(world, 3);
        IByteLink link = keeping ? new KeepingLink(bench) : bench;
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5), CancellationToken.None);
        DetectorLaw law = Laws.Of(world);
        Interlock.Set(box, law);
        var options = new ReadOptions { Law = declare?.Invoke(law) ?? law, NearHz = 150_000, HostVersion = "test", Time = bench.Time };
        return new CommissioningProcedure(
            box, options, (only ?? [.. CommissioningProcedure.All]).ToHashSet(), hands?.Invoke(bench) ?? new BenchHands(bench),
            log ?? new StepLog(), cancel).Run();
    }

    private static StepFinding Only(CommissioningStep step, World world, Func<VirtualBox, IAttendant>? hands = null, bool keeping = false) =>
        Assert.Single(Run(world, hands, [step], keeping).Record.Steps);

    private static StepFinding Of(CommissioningOutcome outcome, CommissioningStep step) => outcome.Record.Steps.Single(one => one.Step == step);

    [Fact]
    public void A_whole_box_passes_every_step()
    {
        CommissioningOutcome outcome = Run(_whole);
        Assert.Equal(CommissioningProcedure.All, outcome.Record.Steps.Select(one => one.Step));
        Assert.All(outcome.Record.Steps, one => Assert.True(one.Result == StepResult.Passed, $"{one.Step}: {one.Detail}"));
        Assert.NotNull(outcome.Law?.ReadOn);
        Assert.Equal(Verdict.Sound, outcome.FirstCoil?.Verdict);
        Assert.Null(outcome.BrokenBy);
        Assert.True(CommissioningStanding.Of([outcome.Record], outcome.Record.Board, outcome.Record.FirmwareVersion).IsComplete);
    }

    [Fact]
    public void Without_the_input_the_direct_check_does_not_apply_and_the_box_is_commissioned_all_the_same()
    {
        CommissioningOutcome outcome = Run(new World());
        Assert.Equal(StepResult.NotApplicable, Of(outcome, CommissioningStep.Direct).Result);
        Assert.True(CommissioningStanding.Of([outcome.Record], outcome.Record.Board, outcome.Record.FirmwareVersion).IsComplete);
    }

    [Fact]
    public void A_crystal_that_is_off_passes_with_its_figure()
    {
        StepFinding finding = Only(CommissioningStep.Frequency, new World { Board = new BoardParameters { ClockPpm = 23 } });
        Assert.Equal(StepResult.Passed, finding.Result);
        Assert.InRange(finding.Figures["at_300k_ppm"], 21, 25);
    }

    [Fact]
    public void Frequencies_off_by_different_shares_fail_and_nothing_is_done_after_them()
    {
        // A timer whose 8-bit settings are off: what a wrong model of the divider would look like.
        CommissioningOutcome outcome = Run(_whole, bench => new BenchHands(bench) { Counter = hertz => Math.Round(hertz > 200_000 ? hertz * 1.00002 : hertz) });
        Assert.Equal(StepResult.Failed, outcome.Record.Steps[0].Result);
        Assert.All(outcome.Record.Steps.Skip(1), one => Assert.Equal(StepResult.Skipped, one.Result));
    }

    [Theory]
    [InlineData(60, StepResult.Failed)]
    [InlineData(20, StepResult.Passed)]
    [InlineData(-60, StepResult.Failed)]
    public void Uneven_edges_are_found_with_their_size(double extraNs, StepResult expected)
    {
        // 0.5 % of the period at 150 kHz is 33 ns (hardware-notes/commissioning.md).
        StepFinding finding = Only(CommissioningStep.Duty, new World { Drive = new DriveStage { HighExtraNs = extraNs } });
        Assert.Equal(expected, finding.Result);
        Assert.InRange(finding.Figures["high_extra_ns"] - extraNs, -0.1, 0.1);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void One_count_that_is_wrong_beside_right_ones_fails(int which)
    {
        int asked = 0;
        StepFinding finding = Only(CommissioningStep.Duty, _whole, bench => new BenchHands(bench) { Meter = share => asked++ == which ? share - (1 / 512.0) : share });
        Assert.Equal(StepResult.Failed, finding.Result);
    }

    [Fact]
    public void A_missing_pedestal_and_a_noisy_pickup_fail_the_dark()
    {
        Assert.Contains("pedestal", Only(CommissioningStep.Dark, new World { Detector = new DetectorParameters { PedestalVolts = 0.1 } }).Detail);
        Assert.Equal(StepResult.Failed, Only(CommissioningStep.Dark, new World { Converter = new ConverterParameters { NoiseCounts = 0.2 } }).Result);
        Assert.Equal(StepResult.Failed, Only(CommissioningStep.Dark, new World { Room = new Room { Hum = new MainsHum { OutputMv = 40 } } }).Result);
    }

    [Fact]
    public void A_detector_slower_than_declared_fails_the_settling()
    {
        World slow = _whole with { Detector = new DetectorParameters { TimeConstantUs = 2000 } };
        CommissioningOutcome outcome = Run(slow, only: [CommissioningStep.Settling], declare: law => law with { TimeConstantS = 40e-6 });
        StepFinding finding = Assert.Single(outcome.Record.Steps);
        Assert.True(finding.Result == StepResult.Failed, finding.Detail);
        Assert.Equal(StepResult.Passed, Only(CommissioningStep.Settling, slow).Result);
        Assert.InRange(finding.Figures["slowest_time_constant_ms"], 1.7, 2.3);
    }

    [Fact]
    public void A_box_that_drives_on_without_its_host_fails_the_watchdog()
    {
        StepFinding deaf = Only(CommissioningStep.Watchdog, _whole, keeping: true);
        Assert.Equal(StepResult.Failed, deaf.Result);
        Assert.Contains("Do not use it", deaf.Detail);
        StepFinding whole = Only(CommissioningStep.Watchdog, _whole);
        Assert.Equal(StepResult.Passed, whole.Result);
        Assert.InRange(whole.Figures["stopped_after_s"], 1, 2);
    }

    [Fact]
    public void The_interlock_is_tried_with_both_tones_and_without()
    {
        BenchHands? hands = null;
        StepFinding finding = Only(CommissioningStep.Interlock, _whole, bench => hands = new BenchHands(bench));
        Assert.True(finding.Result == StepResult.Passed, finding.Detail);
        Assert.Equal([ToneSource.Steady, ToneSource.Chopped, ToneSource.Off], hands!.Brought);
        Assert.Equal((1, 1), (finding.Figures["steady_tone_refused"], finding.Figures["chopped_tone_refused"]));
    }

    [Theory]
    [InlineData(null)]
    [InlineData(0.002)]
    public void Without_a_source_or_with_a_weak_one_the_interlock_is_skipped_and_the_box_not_commissioned(double? toneVolts)
    {
        CommissioningOutcome outcome = Run(_whole, bench => new BenchHands(bench) { ToneVolts = toneVolts });
        Assert.Equal(StepResult.Skipped, Of(outcome, CommissioningStep.Interlock).Result);
        var standing = CommissioningStanding.Of([outcome.Record], outcome.Record.Board, outcome.Record.FirmwareVersion);
        Assert.Equal([CommissioningStep.Interlock], standing.Missing);
    }

    [Fact]
    public void A_box_told_a_threshold_above_the_tone_drives_beside_it_and_fails()
    {
        // The host believes the limits that the box reports, so a box that ignores them is made by raising them behind its back.
        var bench = new VirtualBox(_whole, 3);
        using BoxSession box = BoxSession.Open(new BlindLink(bench), TimeSpan.FromSeconds(5));
        Interlock.Set(box, Laws.Of(_whole));
        StepFinding finding = new InterlockStep(box, new BenchHands(bench), NoWatch.Instance, CancellationToken.None).Run(150_000);
        Assert.True(finding.Result == StepResult.Failed, finding.Detail);
        Assert.Contains("Do not use it", finding.Detail);
    }

    [Fact]
    public void An_interruption_keeps_what_was_done_and_says_what_was_not()
    {
        using var cancel = new CancellationTokenSource();
        var log = new StepLog(finding =>
        {
            if (finding.Step == CommissioningStep.Dark)
            {
                cancel.Cancel();
            }
        });
        CommissioningOutcome outcome = Run(_whole, log: log, cancel: cancel.Token);
        Assert.IsAssignableFrom<OperationCanceledException>(outcome.BrokenBy);
        Assert.True(outcome.Record.Interrupted);
        Assert.All(outcome.Record.Steps.Take(3), one => Assert.Equal(StepResult.Passed, one.Result));
        Assert.All(outcome.Record.Steps.Skip(3), one => Assert.Equal(StepResult.NotDone, one.Result));
    }

    [Fact]
    public void A_box_that_is_unplugged_ends_it_and_keeps_what_was_done()
    {
        VirtualBox? bench = null;
        var log = new StepLog(finding =>
        {
            if (finding.Step == CommissioningStep.Duty)
            {
                bench!.Unplug();
            }
        });
        CommissioningOutcome outcome = Run(_whole, box => new BenchHands(bench = box), log: log);
        Assert.IsType<LinkLostException>(outcome.BrokenBy);
        Assert.Equal([StepResult.Passed, StepResult.Passed, StepResult.NotDone], outcome.Record.Steps.Take(3).Select(one => one.Result));
    }
}
