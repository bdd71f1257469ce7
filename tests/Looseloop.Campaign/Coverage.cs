using System.Diagnostics;
using Looseloop.Bench;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;
using Looseloop.Statistics;

namespace Looseloop.Campaign;

/// <summary>
/// Many readings of one world under different noise. Their mean is what the world reads without noise (the noise is
/// wider than a converter step, so rounding averages out); the 95 % repeatability interval should hold it 95 times in 100.
/// </summary>
public static class Coverage
{
    public static int Run(World world, int seeds)
    {
        var clock = Stopwatch.StartNew();
        var readings = new Reading[seeds];
        Parallel.For(0, seeds, i => readings[i] = BenchReading.Take(world, (ulong)(i + 1)).Reading);
        double seconds = clock.Elapsed.TotalSeconds;
        Reading[] good = [.. readings.Where(reading => double.IsFinite(reading.F0Hz))];
        Console.WriteLine($"{world.Name}: {seeds} readings in {seconds:0.0} s; sound {readings.Count(r => r.Verdict == Verdict.Sound)}, doubtful {readings.Count(r => r.Verdict == Verdict.Doubtful)}, none {readings.Count(r => r.Verdict == Verdict.None)}");
        foreach (var reason in readings.SelectMany(r => r.Reasons).Where(r => r.AtBest < Verdict.Sound).GroupBy(r => r.Code))
        {
            Console.WriteLine($"  {reason.Key} {reason.Count()}: {reason.First().Detail}");
        }

        if (good.Length < 3)
        {
            return 0;
        }

        Truth loaded = Truth.Loaded(world);
        Truth unloaded = Truth.Unloaded(world);
        Report("f0 Hz", good, r => r.F0Hz, r => r.Budget.F0Hz(false), r => r.Budget.F0DegreesOfFreedom(false), r => r.Budget.F0Hz(true), loaded.F0Hz, unloaded.F0Hz);
        Report("Q", good, r => r.Q, r => r.Q * r.Budget.QRelative(false), r => r.Budget.QDegreesOfFreedom(false), r => r.Q * r.Budget.QRelative(true), loaded.Q, unloaded.Q);
        foreach (IGrouping<string, BudgetLine> term in good.SelectMany(r => r.Budget.Lines).GroupBy(line => line.Term))
        {
            string kind = term.First().Repeatability ? "repeatability" : "absolute";
            Console.WriteLine($"    {kind} {term.Key}: f0 {term.Average(line => line.F0Hz):0.0000} Hz, Q {term.Average(line => line.QRelative):P4}");
        }

        int plans = good.Select(r => string.Join(' ', r.Points.Select(point => point.Setting))).Distinct().Count();
        Console.WriteLine($"  {plans} different choices of settings");
        Console.WriteLine($"  board time {good.Average(r => r.BoardSeconds):0.00} s");
        return 0;
    }

    private static void Report(
        string name, Reading[] readings, Func<Reading, double> value, Func<Reading, double> repeatability, Func<Reading, double> freedom, Func<Reading, double> absolute, double loaded, double unloaded)
    {
        double mean = readings.Average(value);
        double spread = Math.Sqrt(readings.Sum(r => (value(r) - mean) * (value(r) - mean)) / (readings.Length - 1));
        double stated = Math.Sqrt(readings.Average(r => repeatability(r) * repeatability(r)));
        double covered = readings.Average(r => Math.Abs(value(r) - mean) <= CoverageFactor.TwoSided(freedom(r), 0.95) * repeatability(r) ? 1.0 : 0.0);
        double held = readings.Average(r => Math.Abs(value(r) - unloaded) <= 2 * absolute(r) ? 1.0 : 0.0);
        Console.WriteLine(
            $"  {name}: mean {mean:0.000}, spread {spread:0.0000}, stated {stated:0.0000}, held {covered:P1}; as it stands {loaded:0.000} ({mean - loaded:+0.000;-0.000}), alone {unloaded:0.000}, absolute u {readings.Average(absolute):0.00} held {held:P1}");
    }
}
