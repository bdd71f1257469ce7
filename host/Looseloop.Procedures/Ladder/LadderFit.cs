using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Ladder;

/// <summary>A law fitted to the rungs.</summary>
/// <param name="Law">With the pedestal and shape that fit best; uncertainties widened by the misfit.</param>
/// <param name="ChiSquare">Sum of the squared residuals over their uncertainties, what was known beforehand counted in.</param>
/// <param name="DegreesOfFreedom">Rungs less what was fitted.</param>
/// <param name="Amplitude">Amplitude at duty 1/2, counts of a linear detector.</param>
/// <param name="DutyError">By how much the drive is high for longer than its timer makes it, a share of the period.</param>
/// <param name="DutyErrorUncertainty">Standard uncertainty of that.</param>
/// <param name="FeedThrough">Feed-through over the response, amplitudes, as the harmonics at small duties show it.</param>
/// <param name="Bow">Bow of the middle of the range beside the law, a share of the largest amplitude.</param>
/// <param name="BowUncertainty">Standard uncertainty of that.</param>
/// <param name="WorstResidual">Largest stray of a pair of rungs from law, a share of the largest amplitude.</param>
public sealed record LadderFit(
    DetectorLaw Law, double ChiSquare, int DegreesOfFreedom, double Amplitude, double DutyError, double DutyErrorUncertainty,
    double FeedThrough, double Bow, double BowUncertainty, double WorstResidual)
{
    private const int MostParameters = 12;

    /// <summary>Fits a law.</summary>
    /// <param name="rungs">What was measured.</param>
    /// <param name="declared">The kind, its pedestal with uncertainty, and a first shape.</param>
    /// <returns>The fit, or null where the rungs do not determine it.</returns>
    public static LadderFit? Of(LadderRungs rungs, DetectorLaw declared)
    {
        if (Solve(rungs, declared, withBow: false) is not Solution plain)
        {
            return null;
        }

        int freedom = Math.Max(rungs.Points.Count - plain.Values.Length, 1);
        double misfit = Math.Sqrt(Math.Max(plain.ChiSquare / freedom, 1));
        LadderParameters p = plain.Parameters;
        DetectorLaw law = declared with { PedestalCounts = p.Pedestal, Shape = Math.Exp(p.LogShape) };
        if (LadderProblem.FreePedestal(law.Kind))
        {
            law = law with { PedestalUncertainty = Math.Min(plain.Standard(LadderProblem.Always) * misfit, declared.PedestalUncertainty) };
        }

        if (LadderProblem.FreeShape(law.Kind))
        {
            law = law with { ShapeUncertainty = law.Shape * plain.Standard(plain.Values.Length - 1) * misfit };
        }

        // With everything else free beside it: a bow that pedestal or harmonics could have swallowed is not called excluded.
        Solution? bowed = Solve(rungs, declared, withBow: true);
        int last = (bowed?.Values.Length ?? 0) - 1;
        return new LadderFit(
            law, plain.ChiSquare, freedom, Math.Exp(p.LogAmplitude), p.DutyError, plain.Standard(1) * misfit,
            Math.Sqrt(Math.Max(p.Higher, 0)), bowed?.Parameters.Bow ?? double.NaN, bowed?.Standard(last) * misfit ?? double.NaN, Worst(rungs, law, p));
    }

    private sealed record Solution(double[] Values, LadderParameters Parameters, double[] Covariance, double ChiSquare)
    {
        public double Standard(int index) => Math.Sqrt(Covariance[(index * Values.Length) + index]);
    }

    private static Solution? Solve(LadderRungs rungs, DetectorLaw declared, bool withBow)
    {
        var problem = new LadderProblem(rungs, declared, withBow);
        if (rungs.Points.Count <= problem.ParameterCount)
        {
            return null;
        }

        double[] values = problem.Start();
        var minimiser = new LevenbergMarquardt(MostParameters, problem.ResidualCount);
        MinimiserResult result = minimiser.Minimise(ref problem, values, tolerance: 1e-9, mostIterations: 60, goodGuess: true);
        double[] covariance = new double[values.Length * values.Length];
        return result.Outcome == MinimiserOutcome.BadStart || !minimiser.TryCovariance(covariance)
            ? null
            : new Solution(values, problem.Unpack(values), covariance, result.SumOfSquares);
    }

    /// <summary>Rungs at the same duty count are taken together, so that noise does not pass for misfit.</summary>
    private static double Worst(LadderRungs rungs, DetectorLaw law, LadderParameters p)
    {
        var scale = new Detector.DetectorScale(law);
        double[] counts = new double[rungs.Points.Count];
        LadderModel.Counts(law, p, rungs.Points, rungs.DarkCounts, counts);
        return rungs.Points
            .Select((point, i) => (point.Setting.DutyCount, Stray: scale.Amplitude(point.Mean) - scale.Amplitude(counts[i])))
            .GroupBy(rung => rung.DutyCount)
            .Max(group => Math.Abs(group.Average(rung => rung.Stray))) / Math.Exp(p.LogAmplitude);
    }
}
