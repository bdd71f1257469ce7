using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Campaign;
using Looseloop.Procedures.Ring;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Ring;

/// <summary>Rings on the bench, whose decays come from the exact poles of its circuits.</summary>
public class RingTests
{
    private static World Coil(double q, double detectorShare)
    {
        double tauUs = 1e6 * q / (Math.PI * 150_000);
        return new World
        {
            Coil = new VirtualCoil { Modes = [new(150_000, q), new(418_000, 160) { LoopShare = 0.9, PickupShare = 0.5 }] },
            Detector = new DetectorParameters { TimeConstantUs = detectorShare * tauUs },
            Pickup = new PickupAntenna { Gain = 25 * 200 / q },
        };
    }

    private static (RingOutcome Ring, Truth Truth) Take(World world, ulong seed, double guessQ)
    {
        using var link = new VirtualBox(world, seed);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        var truth = Truth.Loaded(world);
        return (new RingProcedure(box, Laws.Of(world), NoWatch.Instance, CancellationToken.None).Run(truth.F0Hz, guessQ, 0.5), truth);
    }

    [Theory]
    [InlineData(100, 0.05)]
    [InlineData(100, 0.2)]
    [InlineData(200, 0.2)]
    [InlineData(400, 0.1)]
    [InlineData(600, 0.03)]
    [InlineData(1000, 0.2)]
    public void The_ring_holds_the_poles_Q_within_its_interval(double q, double detectorShare)
    {
        int held = 0;
        for (ulong seed = 1; seed <= 6; seed++)
        {
            (RingOutcome ring, Truth truth) = Take(Coil(q, detectorShare), seed, q * 1.3);
            Assert.True(ring.IsFound, string.Join(" ", ring.Reasons.Select(reason => reason.Detail)));
            Assert.InRange(Math.Abs((ring.Q / truth.Q) - 1), 0, 0.03);
            held += Math.Abs((ring.Q / truth.Q) - 1) <= 2 * ring.QRelative ? 1 : 0;
        }

        Assert.InRange(held, 5, 6);
    }

    [Fact]
    public void Alone_it_is_within_2_per_cent_at_Q_600()
    {
        for (ulong seed = 11; seed <= 16; seed++)
        {
            (RingOutcome ring, Truth truth) = Take(Coil(600, 0.04), seed, 350);
            Assert.InRange(Math.Abs((ring.Q / truth.Q) - 1), 0, 0.02);
            Assert.InRange(2 * ring.QRelative, 0, 0.02);
        }
    }

    [Fact]
    public void A_detector_slower_than_the_ring_is_refused()
    {
        (RingOutcome ring, _) = Take(Coil(100, 0.8), 1, 100);
        Assert.False(ring.IsFound);
        Assert.Contains(ring.Reasons, reason => reason.Code == ReasonCode.RingTooShort);
    }

    [Fact]
    public void A_ring_shorter_than_the_sampling_is_refused()
    {
        var world = new World { Coil = new VirtualCoil { Modes = [new(500_000, 60)] }, Detector = new DetectorParameters { TimeConstantUs = 4 } };
        using var link = new VirtualBox(world, 1);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        RingOutcome ring = new RingProcedure(box, Laws.Of(world), NoWatch.Instance, CancellationToken.None).Run(500_000, 60, 0.5);
        Assert.False(ring.IsFound);
        Assert.Contains(ring.Reasons, reason => reason.Code == ReasonCode.RingTooShort);
    }
}
