using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tracking;

/// <summary>The points of one tracked reading and what was made of them.</summary>
internal readonly record struct TrackedPoints(IReadOnlyList<RawPoint> Points, DarkLevel Look, double BoardSeconds, TrackedFit Fit);

/// <summary>The document of a tracked reading.</summary>
public static class TrackedReading
{
    /// <summary>The budget term of the held terms: only tracked readings have it.</summary>
    public const string HeldTerm = "held curve";

    /// <summary>The budget term of what one set of settings reads against the next.</summary>
    private const string SettingsTerm = "settings";

    /// <summary>True if a reading was tracked, false if it is a full one.</summary>
    public static bool Is(Reading reading) => reading.Budget.Lines.Any(line => line.Term == HeldTerm);

    internal static Reading Document(BoxIdentity box, ReadOptions options, TrackBasis basis, TrackedPoints taken, SetDifference difference)
    {
        TrackedFit fit = taken.Fit;
        Reading full = basis.Reading;
        double clock = 1 + ((options.Clock?.Ppm ?? 0) * 1e-6);
        double pull = options.Pull?.F0Relative ?? 0;
        DateTimeOffset now = options.Time.GetUtcNow();
        List<Reason> reasons = [.. full.Reasons.Where(reason => reason.AtBest < Verdict.Sound)];
        return full with
        {
            Id = Guid.CreateVersion7(now),
            Utc = now,
            BoardTimeUs = (taken.Points[0].BoardTimeUs + taken.Points[^1].BoardTimeUs) / 2,
            MonotonicS = options.Time.GetTimestamp() / (double)options.Time.TimestampFrequency,
            BoardSeconds = taken.BoardSeconds,
            Box = box,
            F0Hz = fit.F0Hz * clock * (1 - pull),
            Q = 1 / ((1 / fit.Q) - (options.Pull?.LossAdded ?? 0)),
            PeakCounts = full.PeakCounts * fit.Scale * fit.Q / basis.Curve.Q,
            RingQ = double.NaN,
            RingQRelative = double.NaN,
            Budget = Budget(full, fit, difference),
            Reasons = reasons,
            Points = taken.Points,
            Dark = [taken.Look],
            Basis = null,
        };
    }

    /// <summary>The difference between sets of settings that a tracked reading carries.</summary>
    internal static SetDifference DifferenceOf(Reading tracked) =>
        tracked.Budget.Lines.FirstOrDefault(line => line.Term == SettingsTerm) is { } line
            ? new SetDifference(line.F0Hz * Math.Sqrt(3), line.QRelative * Math.Sqrt(3))
            : default;

    private static Budget Budget(Reading full, TrackedFit fit, SetDifference difference)
    {
        double root3 = Math.Sqrt(3);
        BudgetLine? fullNoise = full.Budget.Lines.FirstOrDefault(line => line.Repeatability);
        double qHeld = fit.QIsHeld ? full.Budget.QRelative(absolute: false) : fit.QHeldRelative;
        List<BudgetLine> lines =
        [
            new("noise", fit.F0NoiseHz, fit.QIsHeld ? 0 : fit.QNoiseRelative, true, Math.Max(1, fit.DegreesOfFreedom), "the samples' own scatter, or the points' about the curve"),
            new(HeldTerm, fit.F0HeldHz, qHeld, true, fullNoise?.DegreesOfFreedom ?? double.PositiveInfinity, "feed-through terms of the last full reading"),
            new(SettingsTerm, difference.F0Hz / root3, difference.QRelative / root3, true, double.PositiveInfinity, "one set of settings against the next"),
            .. full.Budget.Lines.Where(line => !line.Repeatability),
        ];
        return new Budget(lines);
    }
}
