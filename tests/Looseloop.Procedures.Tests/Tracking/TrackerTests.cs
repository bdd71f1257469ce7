using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;
using Xunit.Abstractions;

namespace Looseloop.Procedures.Tests.Tracking;

public class TrackerTests(ITestOutputHelper output)
{
    private static readonly TimeSpan _patience = TimeSpan.FromSeconds(5);

    [Fact]
    public void A_tracked_reading_takes_less_than_a_quarter_of_a_second_of_board_time()
    {
        using var link = new VirtualBox(BenchTracking.World());
        using BoxSession box = BoxSession.Open(link, _patience);
        ReadOptions options = BenchTracking.Options(link.Time);
        var tracker = new Tracker(options);
        Assert.True(tracker.Begin(BenchTracking.Full(box, options)));
        tracker.Step(box, CancellationToken.None); // sends the plan
        double before = link.Clock.Seconds;
        Reading reading = Assert.Single(tracker.Step(box, CancellationToken.None).Readings);
        output.WriteLine($"board {reading.BoardSeconds:0.000} s, on the link {link.Clock.Seconds - before:0.000} s");
        Assert.InRange(reading.BoardSeconds, 0.1, 0.25);
        Assert.InRange(link.Clock.Seconds - before, 0.1, 0.25);
    }

    // The truth is the bench's own, from the poles of its circuits at the middle of each reading. The error of the full reading
    // (the fit's model, its noise) is common to all and taken off; what then strays beyond the repeatability intervals of the two
    // would be a sawtooth.
    [Theory]
    [InlineData(0, 1)]
    [InlineData(90, 2)]
    [InlineData(225, 3)]
    public void A_slow_drift_over_four_steps_shows_no_sawtooth(double phaseDeg, ulong seed)
    {
        const double PpmPerHour = 18_000; // four steps of .375 % in some 50 minutes
        World world = BenchTracking.World(0.05, phaseDeg, new WarmUp { PpmPerHour = PpmPerHour });
        using var link = new VirtualBox(world, seed);
        using BoxSession box = BoxSession.Open(link, _patience);
        ReadOptions options = BenchTracking.Options(link.Time);
        var tracker = new Tracker(options);
        ReadOutcome full = BenchTracking.Full(box, options);
        Assert.True(tracker.Begin(full));
        var fullTruth = Truth.Loaded(world, full.Reading.BoardTimeUs * 1e-6);
        double common = full.Reading.F0Hz - fullTruth.F0Hz;
        double commonQ = (full.Reading.Q / fullTruth.Q) - 1;
        var errors = new List<(double Error, double Expanded, double Bandwidth)>();
        var qErrors = new List<(double Error, double Expanded)>();
        int changes = 0;
        while (changes < 4 || link.Clock.Seconds < 3600)
        {
            Assert.True(link.Clock.Seconds < 7200, "the settings never changed four times");
            TrackStep step = tracker.Step(box, CancellationToken.None);
            Assert.Equal(TrackEnd.None, step.End);
            changes += step.SettingsChanged ? 1 : 0;
            foreach (Reading reading in step.Readings)
            {
                var truth = Truth.Loaded(world, reading.BoardTimeUs * 1e-6);
                errors.Add((reading.F0Hz - truth.F0Hz, 2 * double.Hypot(reading.Budget.F0Hz(absolute: false), full.Reading.Budget.F0Hz(absolute: false)), truth.F0Hz / truth.Q));
                qErrors.Add(((reading.Q / truth.Q) - 1, 2 * double.Hypot(reading.Budget.QRelative(absolute: false), full.Reading.Budget.QRelative(absolute: false))));
            }

            link.Pause(TimeSpan.FromSeconds(15));
        }

        double worst = errors.Max(e => Math.Abs(e.Error - common));
        double ratio = errors.Max(e => Math.Abs(e.Error - common) / e.Expanded);
        double beyond = errors.Average(e => Math.Abs(e.Error - common) > e.Expanded ? 1.0 : 0);
        double qBeyond = qErrors.Average(e => Math.Abs(e.Error - commonQ) > e.Expanded ? 1.0 : 0);
        output.WriteLine(
            $"{errors.Count} readings, {changes} changes; common {common:0.00} Hz, worst {worst:0.000} Hz = {worst / errors[0].Bandwidth:0.00000} BW, "
            + $"interval {errors.Average(e => e.Expanded):0.000} Hz, worst ratio {ratio:0.00}, beyond {beyond:P1}; "
            + $"Q common {commonQ:P3}, worst {qErrors.Max(e => Math.Abs(e.Error - commonQ)):P3}, interval {qErrors.Average(e => e.Expanded):P3}, beyond {qBeyond:P1}");
        Assert.True(beyond <= 0.05, $"{beyond:P1} of f0 beyond the stated interval");
        Assert.True(qBeyond <= 0.05, $"{qBeyond:P1} of Q beyond the stated interval");
        Assert.True(ratio < 2, $"a reading strays by {ratio:0.0} intervals");
    }

    // At 156.25 kHz the timer's period goes from 512 counts to 256, and 1/3 comes out as 171/512 on one side and 85/256 on the
    // other: sines of .8670 and .8640. The truth is the bench's, whose timer counts in its own words.
    [Theory]
    [InlineData(155_700)]
    [InlineData(156_250)]
    [InlineData(156_000)]
    public void A_change_of_the_duty_bits_among_the_settings_makes_no_step(double f0Hz)
    {
        World world = BenchTracking.World(f0Hz: f0Hz) with { Board = new BoardParameters { MostDutyBits = 13 } };
        using var link = new VirtualBox(world);
        using BoxSession box = BoxSession.Open(link, _patience);
        ReadOptions options = BenchTracking.Options(link.Time, f0Hz);
        var tracker = new Tracker(options);
        ReadOutcome full = BenchTracking.Full(box, options);
        Assert.True(tracker.Begin(full));
        Reading reading = Assert.Single(tracker.Step(box, CancellationToken.None).Readings);
        Assert.True(tracker.Settings.Select(setting => setting.DutyBits).Distinct().Count() == 2, "the settings lie on one side");
        output.WriteLine($"error {reading.F0Hz - Truth.Loaded(world).F0Hz:0.000} Hz of {2 * reading.Budget.F0Hz(false):0.000}, Q {reading.Q / Truth.Loaded(world).Q:0.0000}");
        Assert.Equal(Truth.Loaded(world).F0Hz, reading.F0Hz, 0.6);
        Assert.Equal(1, reading.Q / Truth.Loaded(world).Q, 0.004);
        Assert.Equal(full.Reading.PeakCounts, reading.PeakCounts, 0.01 * full.Reading.PeakCounts);
    }

    [Theory]
    [InlineData(1.03)]
    [InlineData(0.9)]
    public void A_peak_that_has_left_is_noticed_and_found_again(double jump)
    {
        World world = BenchTracking.World();
        World moved = BenchTracking.World(f0Hz: 150_000 * jump);
        using var link = new VirtualBox(world);
        using BoxSession box = BoxSession.Open(link, _patience);
        ReadOptions options = BenchTracking.Options(link.Time);
        var tracker = new Tracker(options);
        Assert.True(tracker.Begin(BenchTracking.Full(box, options)));
        Assert.Equal(TrackEnd.None, tracker.Step(box, CancellationToken.None).End);

        using var movedLink = new VirtualBox(moved);
        using BoxSession movedBox = BoxSession.Open(movedLink, _patience);
        TrackStep step = tracker.Step(movedBox, CancellationToken.None);
        Assert.NotEqual(TrackEnd.None, step.End);
        Assert.Empty(step.Readings);

        Assert.True(tracker.Begin(BenchTracking.Full(movedBox, BenchTracking.Options(movedLink.Time) with { NearHz = null })));
        Reading again = Assert.Single(tracker.Step(movedBox, CancellationToken.None).Readings);
        Assert.Equal(Truth.Loaded(moved).F0Hz, again.F0Hz, 5.0);
    }

    [Fact]
    public void A_coil_that_is_gone_gives_no_reading()
    {
        using var link = new VirtualBox(BenchTracking.World());
        using BoxSession box = BoxSession.Open(link, _patience);
        ReadOptions options = BenchTracking.Options(link.Time);
        var tracker = new Tracker(options);
        Assert.True(tracker.Begin(BenchTracking.Full(box, options)));
        World world = BenchTracking.World();
        using var empty = new VirtualBox(world with { Pickup = world.Pickup with { Gain = 0.01 } });
        using BoxSession emptyBox = BoxSession.Open(empty, _patience);
        TrackStep step = tracker.Step(emptyBox, CancellationToken.None);
        Assert.NotEqual(TrackEnd.None, step.End);
        Assert.Empty(step.Readings);
    }
}
