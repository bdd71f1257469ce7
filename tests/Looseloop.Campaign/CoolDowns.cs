using System.Diagnostics;
using Looseloop.Bench;
using Looseloop.Drift;
using Looseloop.Link;
using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Statistics;

namespace Looseloop.Campaign;

/// <summary>
/// Many coils that an energised run has warmed: how often the interval of f0 and Q at the end of the field holds the truth,
/// and whether the field was seen. The truth is the bench's own, of the coil as it stands with loop and pickup.
/// </summary>
public static class CoolDowns
{
    public static int Run(int worlds)
    {
        var clock = Stopwatch.StartNew();
        var results = new Result[worlds];
        Parallel.For(0, worlds, i => results[i] = One(i + 1));
        Result[] extrapolated = [.. results.Where(r => r.Extrapolated)];
        Console.WriteLine($"{worlds} worlds in {clock.Elapsed.TotalSeconds:0} s; field seen in {results.Count(r => r.Seen)}, extrapolated in {extrapolated.Length}, driven in the field in {results.Count(r => r.DrivenInField)}");
        Console.WriteLine($"  f0: held {Share(extrapolated, r => r.F0Held)}; interval {Middle(extrapolated, r => r.F0IntervalHz):0.00} Hz, largest {extrapolated.Max(r => r.F0IntervalHz):0.00} Hz, error {Middle(extrapolated, r => r.F0ErrorHz):+0.000;-0.000} Hz (medians), worst {extrapolated.Max(r => Math.Abs(r.F0ErrorHz)):0.00} Hz, cooled by {extrapolated.Average(r => r.CooledHz):0} Hz");
        foreach (Result far in extrapolated.Where(r => Math.Abs(r.F0ErrorHz) > 2 * r.F0IntervalHz))
        {
            Console.WriteLine($"  far off, seed {far.Seed}: {far.F0ErrorHz:+0.00;-0.00} Hz of {far.F0IntervalHz:0.00} Hz, {far.Model}; {far.Still}");
        }

        Console.WriteLine($"  Q: held {Share(extrapolated, r => r.QHeld)}");
        return 0;
    }

    private static string Share(Result[] results, Func<Result, bool> held) => $"{results.Average(r => held(r) ? 1.0 : 0):P1}";

    private static string Describe(World still)
    {
        Reading reading = BenchReading.Take(still, 1, o => o with { NearHz = still.Coil.Modes[0].F0Hz }).Reading;
        return $"a full reading of it standing still errs by {reading.F0Hz - Truth.Loaded(still).F0Hz:+0.00;-0.00} Hz at {reading.F0Hz:0} Hz, Q {reading.Q:0}, feed-through {reading.FeedThrough:P1}";
    }

    private static double Middle(Result[] results, Func<Result, double> value) => results.Select(value).Order().ElementAt(results.Length / 2);

    private static Result One(int seed)
    {
        var random = new Random(seed);
        double stopS = 20 + (100 * random.NextDouble());
        double periodS = Math.Pow(10, -2 + (1.5 * random.NextDouble()));
        var warmUp = new WarmUp
        {
            StartPpm = -300 - (1200 * random.NextDouble()),
            TimeS = 300 + (900 * random.NextDouble()),
            StartQPercent = -2 - (4 * random.NextDouble()),
        };
        var still = new World
        {
            Coil = new VirtualCoil { Modes = [new CoilMode(140_000 + (20_000 * random.NextDouble()), 150 + (100 * random.NextDouble()))] },
            FeedThrough = new FeedThrough { Fraction = 0.02 + (0.05 * random.NextDouble()), PhaseDeg = 360 * random.NextDouble() },
        };
        World world = still with
        {
            Room = new Room
            {
                WarmUp = warmUp,
                Carriers = [new Carrier { FrequencyHz = 149_300, Volts = 1, PeriodS = periodS, OnS = 0.05 * periodS, FromS = 0, ToS = stopS }],
            },
        };
        using var box = new VirtualBox(world, (ulong)seed);
        var sink = new EventSink();
        var watch = new Watch(box, stopS);
        var options = new LogOptions
        {
            Read = new ReadOptions { Law = Laws.Of(world), NearHz = still.Coil.Modes[0].F0Hz, HostVersion = "campaign", Time = box.Time },
            For = TimeSpan.FromMinutes(35),
            Every = TimeSpan.FromSeconds(15),
            BetweenRuns = true,
        };
        new LogProcedure(new Source(box), options, sink, watch, CancellationToken.None).Run();
        bool seen = sink.Kinds.Contains(RunEventKind.PausedFieldPresent);
        if (watch.End is not { } end)
        {
            return new Result { Seen = seen, DrivenInField = watch.DrivenInField };
        }

        var truth = Truth.Loaded(world, stopS);
        double k = CoverageFactor.TwoSided(end.F0.DegreesOfFreedom, 0.95);
        double f0 = k * end.F0StandardHz;
        double q = k * end.QStandard;
        return new Result
        {
            Seen = seen,
            DrivenInField = watch.DrivenInField,
            Extrapolated = true,
            Seed = seed,
            Still = Describe(still),
            Model = string.Join(" + ", end.F0.Model.Terms.Select(term => $"{term.Amplitude:0.0} Hz exp(-t/{term.TauS:0.0} s)")) + $", first after {end.F0.FirstReadingAfterS:0} s, {end.Readings} readings",
            F0Held = Math.Abs(end.F0.AtStop - truth.F0Hz) <= f0,
            QHeld = end.Q is not null && Math.Abs(end.Q.AtStop - truth.Q) <= q,
            F0IntervalHz = f0,
            F0ErrorHz = end.F0.AtStop - truth.F0Hz,
            CooledHz = Truth.Loaded(world, 1e6).F0Hz - truth.F0Hz,
        };
    }

    private readonly record struct Result
    {
        public int Seed { get; init; }

        public string Model { get; init; }

        public string Still { get; init; }

        public bool Seen { get; init; }

        public bool DrivenInField { get; init; }

        public bool Extrapolated { get; init; }

        public bool F0Held { get; init; }

        public bool QHeld { get; init; }

        public double F0IntervalHz { get; init; }

        public double F0ErrorHz { get; init; }

        public double CooledHz { get; init; }
    }

    private sealed class Source(VirtualBox box) : IBoxSource
    {
        public string Name => box.Name;

        public TimeProvider Time => box.Time;

        public IByteLink Open() => box;

        public void Pause(TimeSpan duration, CancellationToken cancel) => box.Pause(duration);
    }

    private sealed class EventSink : IRunSink
    {
        public List<RunEventKind> Kinds { get; } = [];

        public void Append(RunStart document)
        {
        }

        public void Append(Guid runId, Reading reading)
        {
        }

        public void Append(RunEvent document) => Kinds.Add(document.Kind);

        public void Append(RunStop document)
        {
        }
    }

    private sealed class Watch(VirtualBox box, double stopS) : ILogWatch
    {
        public FieldEnd? End { get; private set; }

        public bool DrivenInField { get; private set; }

        public void Begin(string task, double boardSeconds)
        {
        }

        public void Progress(double share)
        {
        }

        public void Started(RunStart start)
        {
        }

        public void Kept(Reading reading, LogState state) => DrivenInField |= reading.MonotonicS < stopS;

        public void Kept(RunEvent document)
        {
        }

        public void CoolDown(FieldEnd fieldEnd) => End = fieldEnd;

        public void Waiting(LogState state) => DrivenInField |= box.Board.IsDriving && box.Clock.Seconds < stopS;

        public void Stopped(LogSummary summary)
        {
        }
    }
}
