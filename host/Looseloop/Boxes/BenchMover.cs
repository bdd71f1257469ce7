using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Boxes;

/// <summary>On the bench the program moves things itself: each place halves the coupling.</summary>
internal sealed class BenchMover(World world, ulong seed, CancellationToken cancel) : IMover
{
    private static readonly TimeSpan _patience = TimeSpan.FromSeconds(5);
    private BoxSession? _session;
    private ulong _seed = seed;

    public DetectorLaw? Law => BoxChoice.LawOf(world);

    public BoxSession Place(StandoffMove moved, int place)
    {
        double share = Math.Pow(0.6, place);
        World at = moved == StandoffMove.Pickup
            ? world with { Pickup = world.Pickup with { CouplingPf = world.Pickup.CouplingPf * share } }
            : world with { Loop = world.Loop with { Coupling = world.Loop.Coupling * share } };
        _session?.Dispose();
        return _session = BoxSession.Open(new VirtualBox(at, _seed++), _patience, cancel);
    }

    public void Dispose() => _session?.Dispose();
}
