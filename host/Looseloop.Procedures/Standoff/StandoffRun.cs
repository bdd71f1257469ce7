using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Standoff;

/// <summary>Readings at several distances, one thing moved at a time, and the pull that follows from them.</summary>
/// <param name="PickupMoves">Readings between which only the pickup was moved; the first at its usual place.</param>
/// <param name="LoopMoves">Readings between which only the loop was moved; the first at its usual place.</param>
public sealed record StandoffRun(IReadOnlyList<Reading> PickupMoves, IReadOnlyList<Reading> LoopMoves)
{
    /// <summary>Amplitudes over Q must differ by this factor, else the line is drawn from its own length's distance.</summary>
    public const double LeastRatio = 1.4;

    /// <summary>Budget lines that are alike at all distances, or speak of something else than this line.</summary>
    private static readonly HashSet<string> _common = ["clock", "pull", "temperature", "fit model", "detector law", "harmonics"];

    /// <summary>The pull at the usual places, or why it cannot be told.</summary>
    /// <param name="utc">When it was found.</param>
    public StandoffFinding Evaluate(DateTimeOffset utc)
    {
        if (Refusal(PickupMoves, "pickup") is string pickup)
        {
            return StandoffFinding.Refused(pickup);
        }

        if (Refusal(LoopMoves, "loop") is string loop)
        {
            return StandoffFinding.Refused(loop);
        }

        Part near = Line(PickupMoves, StandoffMove.Pickup);
        Part far = Line(LoopMoves, StandoffMove.Loop);
        if (!near.Determined || !far.Determined)
        {
            return StandoffFinding.Refused("The readings do not lie on a line that could be extended to no coupling. Take them again, everything else left alone.");
        }

        double f0 = PickupMoves[0].F0Hz;
        double f0Standard = double.Hypot(near.F0StandardHz, far.F0StandardHz);
        double pullHz = near.F0Hz + far.F0Hz;
        var pull = new Pull(
            pullHz / (f0 - pullHz), f0Standard / f0, far.Loss, far.LossStandard, utc);
        return new StandoffFinding(pull, near.F0Hz, near.F0StandardHz, far.F0Hz, far.F0StandardHz, near.Misfit, far.Misfit, null);
    }

    private static string? Refusal(IReadOnlyList<Reading> readings, string moved)
    {
        if (readings.Count < 2)
        {
            return $"At least two readings with the {moved} at different distances are wanted; there are {readings.Count}.";
        }

        if (readings.FirstOrDefault(reading => !double.IsFinite(reading.F0Hz)) is not null)
        {
            return $"A reading of the {moved}'s series has no figures. Take the series again.";
        }

        if (readings.Any(reading => reading.Budget.Lines.Any(line => line is { Term: "pull", Origin: "standoff" })))
        {
            return $"A reading of the {moved}'s series already had a pull taken off. Take readings without one.";
        }

        double[] couplings = [.. readings.Select(reading => reading.PeakCounts / reading.Q).Order()];
        return couplings[^1] < LeastRatio * couplings[0]
            ? $"The {moved} was moved too little: the amplitude over Q changed by a factor of {couplings[^1] / couplings[0]:0.00}; {LeastRatio:0.0} is the least, 2 is good."
            : null;
    }

    /// <summary>What one thing pulls at its usual place.</summary>
    private static Part Line(IReadOnlyList<Reading> readings, StandoffMove moved)
    {
        StandoffReading[] points = [.. readings.Select(reading => new StandoffReading(
            reading.PeakCounts, reading.F0Hz, Standard(reading, line => line.F0Hz), reading.Q, Standard(reading, line => line.QRelative)))];
        if (!StandoffRegression.TryExtrapolate(points, moved, out StandoffResult result))
        {
            return default;
        }

        // Scatter beyond what the readings state (a hand, a cable) widens all; with two readings nothing shows it.
        double misfit = result.DegreesOfFreedom > 0 ? Math.Sqrt(Math.Max(result.ChiSquare / result.DegreesOfFreedom, 1)) : 1;
        double abscissa = StandoffRegression.Abscissa(points[0], moved);
        double pullHz = result.F0PullPerUnit * abscissa;

        // Feed-through makes the amplitude, and so the abscissa, uncertain by its own share.
        double share = readings.Max(reading => double.IsNaN(reading.FeedThrough) ? 0.05 : reading.FeedThrough) * (moved == StandoffMove.Loop ? 2 : 1);
        double loss = moved == StandoffMove.Loop ? result.InverseQPerUnit * abscissa : 0;
        return new Part(
            true, pullHz, double.Hypot(result.F0PullStandard * abscissa * misfit, pullHz * share),
            loss, double.Hypot(result.InverseQStandard * abscissa * misfit, loss * share), misfit);
    }

    private static double Standard(Reading reading, Func<BudgetLine, double> term)
    {
        double variance = reading.Budget.Lines.Where(line => !_common.Contains(line.Term)).Sum(line => term(line) * term(line));
        return Math.Sqrt(Math.Max(variance, 1e-12));
    }

    private readonly record struct Part(
        bool Determined, double F0Hz, double F0StandardHz, double Loss, double LossStandard, double Misfit);
}
