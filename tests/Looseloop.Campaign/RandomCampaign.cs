using System.Diagnostics;
using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;
using Looseloop.Statistics;

namespace Looseloop.Campaign;

/// <summary>Thousands of worlds, each with at most one thing wrong: what is called sound must be right.</summary>
public static class RandomCampaign
{
    private const int RepeatsOfSound = 4;
    private const ulong LadderSeed = 77;

    /// <summary>Repeatability is looked at in one world of this many: it costs four more readings.</summary>
    private const int RepeatEvery = 4;

    private sealed record Result(Defect Defect, ulong Seed, Verdict Verdict, double F0Z, double QZ, double F0Repeat, double QRepeat, string Reasons, World World, double BoardSeconds);

    public static int Run(int worlds, ulong firstSeed, Defect? only, bool verbose)
    {
        var clock = Stopwatch.StartNew();
        var results = new Result?[worlds];
        Parallel.For(0, worlds, new ParallelOptions { MaxDegreeOfParallelism = Environment.ProcessorCount }, i => results[i] = One(firstSeed + (ulong)i, only));
        Result[] done = [.. results.OfType<Result>()];
        Console.WriteLine($"{done.Length} worlds in {clock.Elapsed.TotalSeconds:0} s");
        Console.WriteLine($"{"defect",-20} {"worlds",7} {"sound",7} {"doubtful",9} {"none",6} {"wrong-but-sound",16}  most frequent reasons");
        foreach (IGrouping<Defect, Result> group in done.GroupBy(r => r.Defect).OrderBy(g => g.Key))
        {
            Line(group.Key.ToString(), [.. group]);
        }

        Line("all", done);
        Result[] sound = [.. done.Where(r => r.Verdict == Verdict.Sound)];
        Console.WriteLine($"sound readings, 95 % repeatability interval holds f0 {Share(sound, r => r.F0Repeat, 1):P1}, Q {Share(sound, r => r.QRepeat, 1):P1}");
        Console.WriteLine($"sound readings, 95 % absolute interval holds f0 {Share(sound, r => r.F0Z, 2):P1}, Q {Share(sound, r => r.QZ, 2):P1}");
        BoardTime("all", done);
        BoardTime("f0 from 100 kHz, Q to 400, sound", [.. sound.Where(r => Truth.Unloaded(r.World) is { F0Hz: >= 100e3, Q: <= 400 })]);
        if (verbose)
        {
            foreach (Result r in sound.Where(IsWrong).Take(40))
            {
                Truth truth = Truth.Unloaded(r.World);
                Console.WriteLine($"  seed {r.Seed} {r.Defect} f0 {truth.F0Hz:0} Q {truth.Q:0} {r.World.Detector.Kind} ft {r.World.FeedThrough.Fraction:0.00}: z(f0) {r.F0Z:0.0}, z(Q) {r.QZ:0.0}");
            }

            foreach (Result r in done.OrderByDescending(r => r.BoardSeconds).Take(12))
            {
                Truth truth = Truth.Unloaded(r.World);
                Console.WriteLine($"  seed {r.Seed} {r.Defect} f0 {truth.F0Hz:0} Q {truth.Q:0} {r.World.Detector.Kind}: {r.BoardSeconds:0.0} s");
            }

            foreach (Result r in done.Where(r => (r.Defect == Defect.Nothing || only is not null) && r.Verdict != Verdict.Sound).Take(30))
            {
                Truth truth = Truth.Unloaded(r.World);
                Console.WriteLine($"  seed {r.Seed} {r.Defect} f0 {truth.F0Hz:0} Q {truth.Q:0} {r.World.Detector.Kind} ft {r.World.FeedThrough.Fraction:0.00} {r.Verdict}: {r.Reasons}");
            }
        }

        return 0;
    }

    private static void BoardTime(string name, Result[] results)
    {
        double[] seconds = [.. results.Select(r => r.BoardSeconds).Order()];
        if (seconds.Length > 0)
        {
            Console.WriteLine(
                $"board time ({name}, {seconds.Length}): middle {seconds[seconds.Length / 2]:0.0} s, 95 % {seconds[seconds.Length * 95 / 100]:0.0} s, "
                + $"largest {seconds[^1]:0.0} s; over 12 s: {seconds.Count(s => s > 12)}");
        }
    }

    private static bool IsWrong(Result r) => Math.Abs(r.F0Z) > 3 || Math.Abs(r.QZ) > 3;

    private static double Share(Result[] results, Func<Result, double> z, double within) =>
        results.Where(r => double.IsFinite(z(r))).Select(r => Math.Abs(z(r)) <= within ? 1.0 : 0.0).DefaultIfEmpty(double.NaN).Average();

    private static void Line(string name, Result[] group)
    {
        string reasons = string.Join(", ", group.SelectMany(r => r.Reasons.Split(' ', StringSplitOptions.RemoveEmptyEntries)).GroupBy(x => x).OrderByDescending(g => g.Count()).Take(4).Select(g => $"{g.Key} {g.Count()}"));
        Console.WriteLine($"{name,-20} {group.Length,7} {group.Count(r => r.Verdict == Verdict.Sound),7} {group.Count(r => r.Verdict == Verdict.Doubtful),9} {group.Count(r => r.Verdict == Verdict.None),6} {group.Count(r => r.Verdict == Verdict.Sound && IsWrong(r)),16}  {reasons}");
    }

    private static Result One(ulong seed, Defect? only)
    {
        RandomWorld.Drawn drawn = RandomWorld.Draw(seed, only);
        Truth truth = Truth.Unloaded(drawn.World, 6);
        try
        {
            Reading reading = BenchReading.Take(drawn.World, seed, options => Read(options, drawn)).Reading;
            string reasons = string.Join(' ', reading.Reasons.Where(r => r.AtBest < Verdict.Sound).Select(r => r.Name));
            if (reading.Verdict != Verdict.Sound)
            {
                return new Result(drawn.Defect, seed, reading.Verdict, 0, 0, 0, 0, reasons, drawn.World, reading.BoardSeconds);
            }

            Reading[] again = [.. Enumerable.Range(1, seed % RepeatEvery == 0 ? RepeatsOfSound : 0)
                .Select(i => BenchReading.Take(drawn.World, seed + ((ulong)i << 32), options => Read(options, drawn)).Reading)
                .Where(r => double.IsFinite(r.F0Hz))];
            double widen = Math.Sqrt(1 + (1.0 / Math.Max(again.Length, 1)));
            double f0Half = CoverageFactor.TwoSided(reading.Budget.F0DegreesOfFreedom(false), 0.95) * reading.Budget.F0Hz(false);
            double qHalf = CoverageFactor.TwoSided(reading.Budget.QDegreesOfFreedom(false), 0.95) * reading.Q * reading.Budget.QRelative(false);
            double f0Repeat = again.Length == 0 ? double.NaN : (reading.F0Hz - again.Average(r => r.F0Hz)) / (f0Half * widen);
            double qRepeat = again.Length == 0 ? double.NaN : (reading.Q - again.Average(r => r.Q)) / (qHalf * widen);
            return new Result(
                drawn.Defect, seed, reading.Verdict, (reading.F0Hz - truth.F0Hz) / reading.Budget.F0Hz(true),
                (reading.Q - truth.Q) / (reading.Q * reading.Budget.QRelative(true)), f0Repeat, qRepeat, reasons, drawn.World, reading.BoardSeconds);
        }
        catch (BoxException refusal)
        {
            return new Result(drawn.Defect, seed, Verdict.None, 0, 0, 0, 0, refusal.FieldPresent ? "field-present" : $"box:{refusal.FaultCode}", drawn.World, 0);
        }
        catch (InvalidOperationException defect)
        {
            Console.WriteLine($"  seed {seed} {drawn.Defect} broke the program: {defect.Message}");
            return new Result(drawn.Defect, seed, Verdict.None, 0, 0, 0, 0, "broken", drawn.World, 0);
        }
    }

    /// <summary>
    /// What a ladder would have found, without the time that it takes; where the drive's edges or the converter are what is
    /// wrong, the ladder itself.
    /// </summary>
    internal static ReadOptions Read(ReadOptions options, RandomWorld.Drawn drawn) => drawn switch
    {
        { LadderRead: false } => options,
        { Defect: Defect.UnevenEdges or Defect.BentConverter } => options with { Law = BenchReading.Ladder(drawn.World, LadderSeed) },
        _ => options with { Law = options.Law with { ReadOn = DateTimeOffset.UnixEpoch, ShapeUncertainty = options.Law.Shape * 0.003 } },
    };
}
