using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Campaign;
using Looseloop.Procedures.Ladder;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using BenchDetector = Looseloop.Bench.DetectorKind;
using Kind = Looseloop.Readings.DetectorKind;

namespace Looseloop.Procedures.Tests.Ladder;

/// <summary>Ladders on virtual boxes whose detectors are known: the bench's own parameters are the outside truth.</summary>
public class LadderTests
{
    private static LadderOutcome Take(World world, Func<DetectorLaw, DetectorLaw>? declare = null, ulong seed = 1, double nearHz = 150_000)
    {
        using var link = new VirtualBox(world, seed);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        DetectorLaw law = Laws.Of(world);
        var options = new ReadOptions { Law = declare?.Invoke(law) ?? law, NearHz = nearHz, HostVersion = "test", Time = link.Time };
        return new LadderProcedure(box, options, NoWatch.Instance, CancellationToken.None).Run();
    }

    private static World With(BenchDetector kind, double gain = 5, double pickupGain = 25) => new()
    {
        Detector = new DetectorParameters { Kind = kind, Gain = gain },
        Pickup = new PickupAntenna { Gain = pickupGain },
    };

    [Fact]
    public void A_linear_detector_is_known_as_such_with_its_pedestal()
    {
        World world = With(BenchDetector.RmsLinear);
        LadderOutcome outcome = Take(world, law => law with { PedestalCounts = law.PedestalCounts + 2 });
        Assert.NotNull(outcome.Law);
        Assert.Equal(Kind.RmsLinear, outcome.Law.Kind);
        double truth = world.Detector.PedestalVolts * 4095 / 3.3;
        Assert.InRange(Math.Abs(outcome.Law.PedestalCounts - truth), 0, Math.Max(3 * outcome.Law.PedestalUncertainty, 0.3));
        Assert.InRange(outcome.Law.BowBound, 0, 0.004);
        Assert.NotNull(outcome.Law.ReadOn);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(50)]
    [InlineData(-80)]
    public void The_difference_of_D_and_1_minus_D_gives_the_edges(double extraNs)
    {
        World world = With(BenchDetector.RmsLinear) with { Drive = new DriveStage { HighExtraNs = extraNs } };
        LadderOutcome outcome = Take(world);
        Assert.NotNull(outcome.Law);
        double error = (outcome.Law.HighExtraS * 1e9) - extraNs;
        Assert.InRange(Math.Abs(error), 0, 3 + (4 * outcome.Law.HighExtraUncertaintyS * 1e9));
    }

    [Fact]
    public void A_logarithmic_detector_gives_its_counts_for_a_decibel()
    {
        World world = With(BenchDetector.RmsLog) with { Converter = new ConverterParameters { NoiseCounts = 3 } };
        LadderOutcome outcome = Take(world, law => law with { Shape = law.Shape * 1.15 });
        Assert.True(outcome.Law is not null, string.Join(" ", outcome.Reasons.Select(reason => reason.Detail)));
        Assert.Equal(Kind.RmsLog, outcome.Law.Kind);
        double truth = world.Detector.MvPerDb * 1e-3 * 4095 / 3.3;
        Assert.InRange(Math.Abs(outcome.Law.Shape - truth), 0, 4 * outcome.Law.ShapeUncertainty);
        Assert.InRange(outcome.Law.ShapeUncertainty / truth, 0, 0.01);
    }

    [Fact]
    public void A_square_law_is_found_where_a_linear_one_was_declared_and_said_so()
    {
        World world = With(BenchDetector.Square, gain: 10);
        LadderOutcome outcome = Take(world, law => law with { Kind = Kind.RmsLinear });
        Assert.True(outcome.Law is not null, string.Join(" ", outcome.Reasons.Select(reason => reason.Detail)));
        Assert.Equal(Kind.SquareLaw, outcome.Law.Kind);
        Assert.True(outcome.Choice!.Contradicts);
        Assert.Contains(outcome.Reasons, reason => reason.Code == ReasonCode.DetectorNotRead);
    }

    [Fact]
    public void A_grid_too_coarse_to_stand_on_the_top_is_refused()
    {
        var world = new World { Coil = new VirtualCoil { Modes = [new(150_200, 1500)] } };
        LadderOutcome[] outcomes = [.. new[] { 150_000.0, 150_150, 150_300, 150_450 }.Select(f0 =>
            Take(world with { Coil = world.Coil with { Modes = [new(f0, 1500)] } }, nearHz: f0))];
        Assert.Contains(outcomes, outcome => outcome.Law is null && outcome.Reasons.Any(reason => reason.Code == ReasonCode.GridTooCoarse));
        Assert.All(outcomes.Where(outcome => outcome.Law is not null), outcome => Assert.InRange(Math.Abs(outcome.Detuning), 0, 1));
    }

    [Fact]
    public void Too_much_signal_leaves_no_law_or_one_from_the_lower_rungs_only()
    {
        World world = With(BenchDetector.RmsLinear, pickupGain: 400);
        LadderOutcome outcome = Take(world);
        Assert.True(outcome.LeftOut > 0);
        Assert.True(outcome.Law is not null || outcome.Reasons.Any(reason => reason.Code == ReasonCode.Saturated));
        if (outcome.Rungs is LadderRungs rungs)
        {
            Assert.All(rungs.Points, point => Assert.InRange(point.Max, 0, 3700));
        }
    }

    [Fact]
    public void A_drifting_coil_is_refused()
    {
        World world = With(BenchDetector.RmsLinear) with
        {
            Room = new Room { WarmUp = new WarmUp { PpmPerHour = 0, QPercentPerHour = -3 * 3600 } },
        };
        LadderOutcome outcome = Take(world);
        Assert.Null(outcome.Law);
        Assert.Contains(outcome.Reasons, reason => reason.Code == ReasonCode.Drift);
    }

    [Fact]
    public void True_power_by_the_waveform_agrees_with_the_law()
    {
        World world = With(BenchDetector.RmsLinear) with { Board = new BoardParameters { HasDirect = true } };
        LadderOutcome outcome = Take(world);
        Assert.NotNull(outcome.Direct);
        Assert.True(outcome.Direct.Agrees);
        Assert.InRange(Math.Abs(outcome.Direct.Difference), 0, 4 * outcome.Direct.Uncertainty + 0.003);
        Assert.NotNull(outcome.Law);
    }

    [Fact]
    public void A_diode_between_square_law_and_peak_shows_its_knee()
    {
        World world = With(BenchDetector.Diode, gain: 5, pickupGain: 12) with { FeedThrough = new FeedThrough { Fraction = 0.005 } };
        LadderOutcome outcome = Take(world);
        Assert.True(outcome.Law?.Kind == Kind.DiodeKnee, string.Join("\n", outcome.Choice?.All ?? []));
        double truth = world.Detector.DiodeMv * 1e-3 * world.Detector.Gain * 4095 / 3.3;
        Assert.InRange(outcome.Law.Shape / truth, 0.9, 1.1);
    }

    [Fact]
    public void A_converter_that_bends_shows_in_the_bound()
    {
        World world = With(BenchDetector.RmsLinear) with { Converter = new ConverterParameters { BowCounts = 20 } };
        LadderOutcome outcome = Take(world);
        Assert.NotNull(outcome.Law);

        // The bench's bow over the part of the range that is used: 4 b x (1 - x) less the chord from pedestal to top.
        double top = outcome.Rungs!.Points.Max(point => point.Mean) / 4095;
        double bottom = outcome.Law.PedestalCounts / 4095;
        double sagitta = 20 * (top - bottom) * (top - bottom) / outcome.Choice!.Chosen.Amplitude;
        Assert.InRange(outcome.Law.BowBound, 0.5 * sagitta, 3 * sagitta);
    }
}
