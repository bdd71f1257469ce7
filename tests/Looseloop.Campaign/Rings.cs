using System.Globalization;
using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Procedures;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Ring;
using Looseloop.Readings;

namespace Looseloop.Campaign;

/// <summary>Q by ring-down against Q by sweep, and both against the poles, over Q and the detector's time constant.</summary>
public static class Rings
{
    private static readonly double[] _qs = [100, 200, 400, 600, 800, 1000];
    private static readonly double[] _shares = [0.02, 0.1, 0.2];

    public static int Run(int worlds)
    {
        Console.WriteLine("    Q  tau_d/tau  found  ring-true rms %  u %  held 95 %  worst %   sweep read  agree 3u");
        foreach (double q in _qs)
        {
            foreach (double share in _shares)
            {
                Line(q, share, worlds);
            }
        }

        return 0;
    }

    private static void Line(double q, double share, int worlds)
    {
        var errors = new List<double>();
        var stated = new List<double>();
        int held = 0, read = 0, agree = 0;
        for (int i = 0; i < worlds; i++)
        {
            var random = new Random((int)(q * 1000) + (int)(share * 100_000) + i);
            World world = World(q, share, random);
            using var link = new VirtualBox(world, (ulong)(i + 1));
            using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
            var options = new ReadOptions { Law = Laws.Of(world), NearHz = world.Coil.Modes[0].F0Hz, Ring = true, HostVersion = "campaign", Time = link.Time };
            ReadOutcome outcome = new ReadProcedure(box, options, NoWatch.Instance, CancellationToken.None).Run();
            Truth truth = Truth.Loaded(world);
            RingOutcome ring = outcome.Fit is { IsFitted: true } fit
                ? new RingProcedure(box, options.Law, NoWatch.Instance, CancellationToken.None).Run(fit.F0Hz, fit.Q, outcome.Reading.Points[0].Setting.Duty)
                : new RingProcedure(box, options.Law, NoWatch.Instance, CancellationToken.None).Run(truth.F0Hz, q, 1 / 3.0);
            if (!ring.IsFound)
            {
                continue;
            }

            double error = (ring.Q / truth.Q) - 1;
            errors.Add(error);
            stated.Add(ring.QRelative);
            held += Math.Abs(error) <= 1.96 * ring.QRelative ? 1 : 0;
            if (double.IsFinite(outcome.Reading.Q))
            {
                read++;
                Reading both = RingSecondOpinion.With(outcome.Reading, outcome.Fit!.Value.Q, ring, null);
                agree += both.Reasons.Any(reason => reason.Code == ReasonCode.RingDisagrees) ? 0 : 1;
            }
        }

        Console.WriteLine(string.Create(
            CultureInfo.InvariantCulture,
            $"{q,5:0} {share,10:0.00} {errors.Count,4}/{worlds,-3} {100 * Math.Sqrt(errors.Average(e => e * e)),12:0.000} {100 * stated.Average(),8:0.000} {held,6}/{errors.Count,-4} {100 * errors.Max(Math.Abs),8:0.000} {read,8} {agree,8}"));
    }

    private static World World(double q, double share, Random random)
    {
        double tauUs = 1e6 * q / (Math.PI * 150_000);
        return new World
        {
            Coil = new VirtualCoil
            {
                Modes = [new(150_000 * (1 + (0.01 * (random.NextDouble() - 0.5))), q), new(418_000, 160) { LoopShare = 0.9, PickupShare = 0.5 }],
            },
            Detector = new DetectorParameters { TimeConstantUs = share * tauUs },
            Pickup = new PickupAntenna { Gain = 25 * 200 / q },
            FeedThrough = new FeedThrough { Fraction = 0.1 * random.NextDouble(), PhaseDeg = 360 * random.NextDouble() },
        };
    }
}
