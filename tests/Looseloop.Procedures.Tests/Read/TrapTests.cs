using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Campaign;
using Looseloop.Procedures.Read;
using Looseloop.Protocol;
using Looseloop.Readings;
using BenchDetector = Looseloop.Bench.DetectorKind;

namespace Looseloop.Procedures.Tests.Read;

/// <summary>
/// One world for each trap: the reading must not be sound and must say why. What is wrong with each world is set here; what
/// an untroubled instrument would find comes from the bench's own poles, not from the fit.
/// </summary>
public class TrapTests
{
    private static readonly World _plain = WorldShelf.Load("wren");

    [Fact]
    public void Nothing_wrong_is_sound_and_right()
    {
        Reading reading = Take(_plain);
        Truth loaded = Truth.Loaded(_plain);
        Assert.Equal(Verdict.Sound, reading.Verdict);
        Assert.True(Math.Abs(reading.F0Hz - loaded.F0Hz) < 4 * reading.Budget.F0Hz(absolute: false) + 0.1);
        Assert.True(Math.Abs((reading.Q / loaded.Q) - 1) < (4 * reading.Budget.QRelative(absolute: false)) + 1e-4);
    }

    [Fact]
    public void Too_little_signal() =>
        Expect(_plain.WithPeakCounts(310 + 12), ReasonCode.TooLittleSignal, ReasonCode.NoPeak);

    [Fact]
    public void Saturation() => Expect(WorldShelf.Load("bittern"), ReasonCode.Saturated);

    [Fact]
    public void Feed_through_too_large() =>
        Expect((_plain with { FeedThrough = new FeedThrough { Fraction = 0.6, PhaseDeg = 40 } }).WithPeakCounts(2_400), ReasonCode.FeedThroughLarge);

    [Fact]
    public void A_second_coil_that_is_heard_as_much()
    {
        var other = new Neighbour { F0Hz = 150_900, Q = 180, CouplingToCoil = 0.002, CouplingToLoop = 0.003, PickupShare = 0.9 };
        Expect((_plain with { Room = _plain.Room with { Neighbours = [other] } }).WithPeakCounts(2_000), ReasonCode.ResidualTooLarge, ReasonCode.TwoResponses);
    }

    [Fact]
    public void A_primary_left_in() => Expect(WorldShelf.Load("jackdaw"), ReasonCode.TwoResponses);

    [Fact]
    public void A_weak_carrier() => Expect(WorldShelf.Load("owl"), ReasonCode.Carrier);

    [Fact]
    public void Bursts()
    {
        var bursts = new Bursts { PerSecond = 150, OutputMv = 20, LengthUs = 400 };
        Expect(_plain with { Room = _plain.Room with { Bursts = bursts } }, ReasonCode.HumOrBursts);
    }

    [Fact]
    public void Drift_within_the_reading()
    {
        var warm = new WarmUp { StartPpm = 9_000, TimeS = 20 };
        Expect(_plain with { Room = _plain.Room with { WarmUp = warm } }, ReasonCode.Drift, ReasonCode.ResidualTooLarge);
    }

    [Fact]
    public void A_detector_slower_than_declared()
    {
        World slow = _plain with { Detector = _plain.Detector with { TimeConstantUs = 4_000 } };
        Reading reading = BenchReading.Take(slow, 1, options => options with { Law = options.Law with { TimeConstantS = 50e-6 } }).Reading;
        Assert.NotEqual(Verdict.Sound, reading.Verdict);
        Assert.Contains(reading.Reasons, reason => reason.Code is ReasonCode.SweepTooFast or ReasonCode.ResidualTooLarge or ReasonCode.HarmonicsAtDetector);
    }

    [Fact]
    public void A_Q_beyond_the_settings_and_their_vernier()
    {
        CoilMode[] modes = [new CoilMode(150_000, 6_000), .. _plain.Coil.Modes.Skip(1)];
        World sharp = (_plain with { Coil = _plain.Coil with { Modes = modes } }).WithPeakCounts(2_500);
        Reading reading = Take(sharp);
        Truth loaded = Truth.Loaded(sharp);
        bool right = double.IsFinite(reading.Q) && Math.Abs((reading.Q / loaded.Q) - 1) < 3 * reading.Budget.QRelative(absolute: true);
        Assert.True(reading.Verdict != Verdict.Sound || right, $"{reading.Verdict}: Q {reading.Q:0} of {loaded.Q:0}");
    }

    [Fact]
    public void An_overtone_on_the_third_harmonic_of_a_drive_at_one_half()
    {
        CoilMode[] modes = [_plain.Coil.Modes[0], new CoilMode(450_300, 160) { LoopShare = 0.9, PickupShare = 0.5 }];
        World world = (_plain with
        {
            Coil = _plain.Coil with { Modes = modes },
            Detector = _plain.Detector with { Kind = BenchDetector.MeanAbsolute },
        }).WithPeakCounts(2_000);
        Expect(world, ReasonCode.OvertoneOnThird, ReasonCode.HarmonicsAtDetector, ReasonCode.ResidualTooLarge);
    }

    [Fact]
    public void The_same_overtone_does_no_harm_to_a_power_detector_at_one_third()
    {
        Reading reading = Take(WorldShelf.Load("magpie"));
        Truth loaded = Truth.Loaded(WorldShelf.Load("magpie"));
        Assert.Equal(Verdict.Sound, reading.Verdict);
        Assert.Equal(loaded.Q, reading.Q, 0.005 * loaded.Q);
    }

    [Theory]
    [InlineData("kestrel", FaultCode.FieldPresent)]
    [InlineData("nightjar", FaultCode.FieldPresent)]
    [InlineData("coot", FaultCode.PickupBelowRange)]
    public void A_live_or_deaf_box_is_not_driven(string world, int faultCode)
    {
        BoxException refusal = Assert.Throws<BoxException>(() => Take(WorldShelf.Load(world)));
        Assert.Equal(faultCode, refusal.FaultCode);
    }

    [Fact]
    public void A_ghost_is_not_taken_for_f0_by_survey_nor_near_a_given_frequency()
    {
        Assert.InRange(Take(_plain).F0Hz, 149_000, 151_000);
        foreach (double ghostHz in new[] { 50_000.0, 30_000.0 })
        {
            Reading reading = BenchReading.Take(_plain, 1, options => options with { NearHz = ghostHz }).Reading;
            Assert.Equal(Verdict.None, reading.Verdict);
            Assert.Contains(reading.Reasons, reason => reason.Code == ReasonCode.Ghost);
        }
    }

    // The second mode of the world, asked for by name or by a range without f0: real, and not f0.
    [Fact]
    public void An_overtone_that_was_asked_for_says_that_nothing_lower_was_looked_at()
    {
        double overtoneHz = _plain.Coil.Modes[1].F0Hz;
        Reading near = BenchReading.Take(_plain, 1, options => options with { NearHz = overtoneHz }).Reading;
        Assert.Contains(near.Reasons, reason => reason.Code == ReasonCode.NotSurveyed && reason.Detail.Contains("overtone", StringComparison.Ordinal));
        Reading range = BenchReading.Take(_plain, 1, options => options with { LowHz = 300_000 }).Reading;
        Assert.Equal(overtoneHz, range.F0Hz, 0.01 * overtoneHz);
        Assert.Contains(range.Reasons, reason => reason.Code == ReasonCode.NotSurveyed);
        Assert.DoesNotContain(Take(_plain).Reasons, reason => reason.Code == ReasonCode.NotSurveyed);
    }

    private static Reading Take(World world) => BenchReading.Take(world, 1).Reading;

    private static void Expect(World world, params ReasonCode[] anyOf)
    {
        Reading reading = Take(world);
        Assert.NotEqual(Verdict.Sound, reading.Verdict);
        Assert.Contains(reading.Reasons, reason => anyOf.Contains(reason.Code));
        Assert.All(reading.Reasons, reason => Assert.EndsWith(".", reason.Advice));
    }
}
