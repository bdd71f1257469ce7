using Looseloop.Bench;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Campaign;

/// <summary>One drawn world in detail: what it is, what the survey saw, what the reading said.</summary>
public static class OneWorld
{
    public static int Run(ulong seed, Defect? only)
    {
        RandomWorld.Drawn drawn = RandomWorld.Draw(seed, only);
        World world = drawn.World;
        Truth truth = Truth.Unloaded(world, 6);
        Truth loaded = Truth.Loaded(world, 6);
        Console.WriteLine($"{drawn.Defect}: alone {truth.F0Hz:0.0} Hz, Q {truth.Q:0.00}; as it stands {loaded.F0Hz:0.0} Hz, Q {loaded.Q:0.00}; {world.Detector}; {world.FeedThrough}; {world.Loop}; noise {world.Converter.NoiseCounts:0.0}; bits {world.Board.MostDutyBits}");
        ReadOutcome outcome = BenchReading.Take(world, seed, options => RandomCampaign.Read(options, drawn));
        foreach (var response in outcome.Survey?.Responses ?? [])
        {
            Console.WriteLine($"  {response}");
        }

        Reading reading = outcome.Reading;
        Console.WriteLine($"  {reading.Verdict}: f0 {reading.F0Hz:0.00} u {reading.Budget.F0Hz(false):0.00}/{reading.Budget.F0Hz(true):0.00}, Q {reading.Q:0.00} u {reading.Q * reading.Budget.QRelative(false):0.00}/{reading.Q * reading.Budget.QRelative(true):0.00}, feed-through {reading.FeedThrough:P1}, peak {reading.PeakCounts:0}, {reading.BoardSeconds:0.0} s");
        foreach (Reason reason in reading.Reasons)
        {
            Console.WriteLine($"  {reason.AtBest} {reason.Name}: {reason.Detail}");
        }

        foreach (RawPoint point in reading.Points.Take(60))
        {
            Console.WriteLine($"    {point.Setting.FrequencyHz:0.0} {point.Setting.DutyCount}/{1 << point.Setting.DutyBits} mean {point.Mean:0.0} sd {Math.Sqrt(point.SampleVariance):0.0} {point.Min}..{point.Max}");
        }

        return 0;
    }
}
