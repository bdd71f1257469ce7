using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Procedures;
using Looseloop.Procedures.Ladder;
using Looseloop.Procedures.Read;

namespace Looseloop.Campaign;

/// <summary>One ladder on a virtual world, rung by rung.</summary>
public static class Ladders
{
    public static int Show(World world, ulong seed)
    {
        using var link = new VirtualBox(world, seed);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        var options = new ReadOptions { Law = Laws.Of(world), NearHz = world.Coil.Modes[0].F0Hz, HostVersion = "campaign", Time = link.Time };
        LadderOutcome outcome = new LadderProcedure(box, options, NoWatch.Instance, CancellationToken.None).Run();
        Console.WriteLine($"{outcome.Law}");
        foreach (LadderFit fit in outcome.Choice?.All ?? [])
        {
            Console.WriteLine($"{fit.Law.Kind,-15} chi2 {fit.ChiSquare,12:0.0} / {fit.DegreesOfFreedom}  pedestal {fit.Law.PedestalCounts:0.00} ({fit.Law.PedestalUncertainty:0.00}) shape {fit.Law.Shape:0.00} ({fit.Law.ShapeUncertainty:0.00}) duty +{fit.DutyError:0.00000} feed-through {fit.FeedThrough:0.000} bow {fit.Bow:0.00000} ({fit.BowUncertainty:0.00000}) worst {fit.WorstResidual:0.00000} amplitude {fit.Amplitude:0.0}");
        }

        for (int i = 0; i < (outcome.Rungs?.Points.Count ?? 0); i++)
        {
            Readings.RawPoint point = outcome.Rungs!.Points[i];
            Console.WriteLine($"{point.Setting.DutyCount,5} {point.Setting.Duty:0.0000} {point.Mean,9:0.00} +- {outcome.Rungs.Sigmas[i]:0.00}");
        }

        Console.WriteLine($"dark {outcome.DarkBefore.Mean:0.00} {outcome.DarkAfter.Mean:0.00}, board {outcome.BoardSeconds:0.0} s, reasons {string.Join("; ", outcome.Reasons.Select(reason => reason.Detail))}");
        return 0;
    }
}
