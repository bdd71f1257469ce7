using Looseloop.Bench;
using Looseloop.Campaign;
using Looseloop.Procedures.Standoff;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Standoff;

/// <summary>Standoffs in worlds whose pulls are exact: the bench solves the coupled meshes, the test only moves things.</summary>
public class StandoffTests
{
    private static readonly double[] _pickups = [0.02, 0.01, 0.005];
    private static readonly double[] _loops = [0.03, 0.02, 0.012];

    private static World World(double resistance = 47, double inductance = 8) => new()
    {
        Coil = new VirtualCoil { Modes = [new(150_000, 200)] },
        Loop = new DriveLoop { Coupling = _loops[0], ResistanceOhm = resistance, InductanceUh = inductance },
        Pickup = new PickupAntenna { CouplingPf = _pickups[0], Gain = 6 },
        FeedThrough = new FeedThrough { Fraction = 0.005 },
    };

    private static Reading Read(World world, ulong seed) =>
        BenchReading.Take(world, seed, options => options with { NearHz = 150_000 }).Reading;

    private static StandoffRun Take(World world, ulong seed) => new(
        [.. _pickups.Select((pf, i) => Read(world with { Pickup = world.Pickup with { CouplingPf = pf } }, seed + (ulong)i))],
        [.. _loops.Select((k, i) => Read(world with { Loop = world.Loop with { Coupling = k } }, seed + 10 + (ulong)i))]);

    [Theory]
    [InlineData(47, 8)]
    [InlineData(10, 30)]
    public void The_coil_without_loop_and_pickup_lies_in_the_interval(double resistance, double inductance)
    {
        World world = World(resistance, inductance);
        Truth alone = Truth.Unloaded(world);
        int heldF0 = 0;
        int heldQ = 0;
        const int Worlds = 5;
        for (ulong seed = 1; seed <= Worlds; seed++)
        {
            StandoffRun run = Take(world, 100 * seed);
            StandoffFinding finding = run.Evaluate(DateTimeOffset.UnixEpoch);
            Assert.True(finding.Pull is not null, finding.Why);
            Reading first = run.PickupMoves[0];
            double f0 = first.F0Hz * (1 - finding.Pull.F0Relative);
            double q = 1 / ((1 / first.Q) - finding.Pull.LossAdded);
            double f0Standard = double.Hypot(f0 * finding.Pull.F0Uncertainty, first.Budget.F0Hz(false));
            double qStandard = q * Math.Sqrt(Math.Pow(finding.Pull.LossUncertainty * q, 2)
                + first.Budget.Lines.Where(line => line.Term is not ("pull" or "clock" or "temperature")).Sum(line => line.QRelative * line.QRelative));

            // A bench line for the loop's own prefactor: measurement-notes E leave some 16 ppm to a resistive loop at k = 0.03.
            heldF0 += Math.Abs(f0 - alone.F0Hz) <= (2 * f0Standard) + (16e-6 * f0) ? 1 : 0;
            heldQ += Math.Abs(q - alone.Q) <= 2 * qStandard ? 1 : 0;
            Assert.InRange(Math.Abs(f0 - alone.F0Hz) / f0, 0, 60e-6);
            Assert.InRange(Math.Abs((q / alone.Q) - 1), 0, 0.02);
        }

        Assert.InRange(heldF0, Worlds - 1, Worlds);
        Assert.InRange(heldQ, Worlds - 1, Worlds);
    }

    [Fact]
    public void The_pull_is_far_larger_than_what_is_left_of_it()
    {
        World world = World();
        Truth alone = Truth.Unloaded(world);
        Truth loaded = Truth.Loaded(world);
        StandoffRun run = Take(world, 7);
        StandoffFinding finding = run.Evaluate(DateTimeOffset.UnixEpoch);
        double truePull = (loaded.F0Hz - alone.F0Hz) / alone.F0Hz;
        Assert.InRange(Math.Abs(finding.Pull!.F0Relative - truePull), 0, 0.15 * Math.Abs(truePull));
        Assert.InRange(Math.Abs(finding.PickupPullHz), 5 * finding.PickupStandardHz, double.PositiveInfinity);
    }

    [Fact]
    public void Moves_too_small_or_too_few_are_refused_with_what_to_do()
    {
        World world = World();
        Reading once = Read(world, 1);
        Reading again = Read(world, 2);
        StandoffFinding small = new StandoffRun([once, again], [once, again]).Evaluate(DateTimeOffset.UnixEpoch);
        Assert.Null(small.Pull);
        Assert.Contains("too little", small.Why);
        StandoffFinding few = new StandoffRun([once], [once, again]).Evaluate(DateTimeOffset.UnixEpoch);
        Assert.Null(few.Pull);
        Assert.Contains("two readings", few.Why);
    }
}
