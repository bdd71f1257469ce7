using Looseloop.Procedures.Detector;
using Looseloop.Readings;

namespace Looseloop.Procedures.Ladder;

/// <summary>What makes a ladder worthless.</summary>
public static class LadderChecks
{
    /// <summary>Beyond half power the fundamental no longer rules, and a small drift of f0 passes for a bend.</summary>
    public const double LargestDetuning = 1;

    /// <summary>A law is wanted over at least this ratio of amplitudes.</summary>
    private const double LeastSpan = 6;

    private const int LeastRungs = 8;
    private const double LeastTopToNoise = 100;
    private const double LargestDrift = 0.01;
    private const double Sigmas = 5;

    /// <summary>Reasons against rungs; none if they are good.</summary>
    /// <param name="rungs">The rungs that are left.</param>
    /// <param name="leftOut">How many were not.</param>
    /// <param name="maker">By any law: only ratios at equal duty are looked at.</param>
    public static IEnumerable<Reason> Reasons(LadderRungs rungs, int leftOut, AmplitudeMaker maker)
    {
        double[] shares = [.. rungs.Points.Select(point => Math.Sin(Math.PI * point.Setting.Duty)).Order()];
        if (shares.Distinct().Count() < LeastRungs || shares[^1] < LeastSpan * shares[0])
        {
            yield return leftOut > 0
                ? new Reason(ReasonCode.Saturated, $"{leftOut} rungs are at the converter's upper end; those left do not span a ratio of {LeastSpan:0}.")
                : new Reason(ReasonCode.GridTooCoarse, $"The timer has too few duties at this frequency: they do not span a ratio of {LeastSpan:0}.");
            yield break;
        }

        RawPoint top = rungs.Points.MaxBy(point => point.Mean);
        double over = (top.Mean - rungs.DarkCounts) / Math.Sqrt(double.IsNaN(top.SampleVariance) ? 1 : top.SampleVariance);
        if (over < LeastTopToNoise)
        {
            yield return new Reason(ReasonCode.TooLittleSignal, $"The highest rung is {over:0} times the noise of a sample over the dark; {LeastTopToNoise:0} is wanted.");
        }

        if (Drift(rungs, maker) is double drift && drift > 0)
        {
            yield return new Reason(ReasonCode.Drift, $"The amplitude changed by {drift:P1} from the first rung to the last.");
        }
    }

    /// <summary>Relative change of the amplitude from the first rung to the last, where it matters; else 0.</summary>
    private static double Drift(LadderRungs rungs, AmplitudeMaker maker)
    {
        double sum = 0;
        double weights = 0;
        foreach (IGrouping<int, RawPoint> same in rungs.Points.GroupBy(point => point.Setting.DutyCount).Where(group => group.Count() > 1))
        {
            // The palindrome puts pairs at every distance in time: what is wanted is the change in a second.
            AmplitudePoint there = maker.Make(same.First());
            AmplitudePoint back = maker.Make(same.Last());
            double seconds = (same.Last().BoardTimeUs - same.First().BoardTimeUs) * 1e-6;
            double mean = (there.Amplitude + back.Amplitude) / 2;
            double weight = mean * mean / (there.Variance + back.Variance);
            if (mean > 0 && seconds > 0)
            {
                sum += weight * seconds * (back.Amplitude - there.Amplitude) / mean;
                weights += weight * seconds * seconds;
            }
        }

        double whole = (rungs.Points.Max(point => point.BoardTimeUs) - rungs.Points.Min(point => point.BoardTimeUs)) * 1e-6;
        double change = weights > 0 ? Math.Abs(sum / weights) * whole : 0;
        return change > LargestDrift + (Sigmas * whole / Math.Sqrt(Math.Max(weights, 1e-9))) ? change : 0;
    }
}
