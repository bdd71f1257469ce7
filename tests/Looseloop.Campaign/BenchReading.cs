using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Procedures;
using Looseloop.Procedures.Ladder;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Campaign;

/// <summary>One reading of a virtual world, as the program takes it.</summary>
public static class BenchReading
{
    public static ReadOutcome Take(World world, ulong seed, Func<ReadOptions, ReadOptions>? change = null)
    {
        using var link = new VirtualBox(world, seed);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        Interlock.Set(box, Laws.Of(world));
        var options = new ReadOptions { Law = Laws.Of(world), HostVersion = "campaign", Time = link.Time };
        return new ReadProcedure(box, change?.Invoke(options) ?? options, NoWatch.Instance, CancellationToken.None).Run();
    }

    /// <summary>The law that a ladder on the world gives, as the program stores it; the declared one where it is refused.</summary>
    public static DetectorLaw Ladder(World world, ulong seed)
    {
        using var link = new VirtualBox(world, seed);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        Interlock.Set(box, Laws.Of(world));
        var options = new ReadOptions { Law = Laws.Of(world), NearHz = Truth.Loaded(world).F0Hz, HostVersion = "campaign", Time = link.Time };
        return new LadderProcedure(box, options, NoWatch.Instance, CancellationToken.None).Run().Law ?? options.Law;
    }
}
