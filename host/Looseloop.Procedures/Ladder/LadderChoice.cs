using Looseloop.Readings;

namespace Looseloop.Procedures.Ladder;

/// <summary>Which law the rungs speak for.</summary>
/// <param name="Chosen">The law that is taken.</param>
/// <param name="All">Every law that was tried, the best chi-square first.</param>
/// <param name="Margin">
/// By how much chi-square (over the chosen law's own, per degree of freedom, where that is above 1) the nearest other law
/// of as few parameters is worse.
/// </param>
/// <param name="Decided">True if that margin is at least <see cref="LeastMargin"/>.</param>
/// <param name="Contradicts">True if the law is of another shape than the declared one.</param>
public sealed record LadderChoice(LadderFit Chosen, IReadOnlyList<LadderFit> All, double Margin, bool Decided, bool Contradicts)
{
    /// <summary>Odds of e^8 for Gaussian residuals: a law this much worse in chi-square is out.</summary>
    public const double LeastMargin = 16;

    /// <summary>A knee must explain this many times more than none: a bend of the converter could pass for a weak one.</summary>
    private const double KneeFactor = 4;

    /// <summary>
    /// Fits the shapes that a detector can have (linear, square, logarithmic, with a knee) and chooses. What a single sine
    /// cannot tell apart, such as a mean from a root of mean power, is taken as declared; where the shape contradicts the
    /// declaration the kind that does not respond to power is assumed.
    /// </summary>
    /// <param name="rungs">What was measured.</param>
    /// <param name="declared">What the builder says of the detector.</param>
    /// <returns>The choice, or null where no law fits at all.</returns>
    public static LadderChoice? Of(LadderRungs rungs, DetectorLaw declared)
    {
        DetectorKind[] kinds =
        [
            Member(declared.Kind, DetectorKind.Mean, DetectorKind.RmsLinear, DetectorKind.Mean, DetectorKind.Peak),
            DetectorKind.SquareLaw,
            Member(declared.Kind, DetectorKind.LogOfWaveform, DetectorKind.RmsLog, DetectorKind.LogOfWaveform),
            DetectorKind.DiodeKnee,
        ];
        LadderFit[] fits = [.. kinds.SelectMany(kind => Starts(rungs, declared, kind)).OfType<LadderFit>().OrderBy(fit => fit.ChiSquare)];
        fits = [.. fits.DistinctBy(fit => fit.Law.Kind)];
        if (fits.Length == 0)
        {
            return null;
        }

        LadderFit[] simple = [.. fits.Where(fit => fit.Law.Kind != DetectorKind.DiodeKnee)];
        LadderFit chosen = simple.Length > 0 ? simple[0] : fits[0];
        if (fits[0].Law.Kind == DetectorKind.DiodeKnee
            && Distance(chosen, fits[0]) > LeastMargin && chosen.ChiSquare > KneeFactor * fits[0].ChiSquare)
        {
            chosen = fits[0];
        }

        double margin = simple.Where(fit => fit != chosen).Select(fit => Distance(fit, chosen)).DefaultIfEmpty(double.PositiveInfinity).Min();
        return new LadderChoice(chosen, fits, margin, margin >= LeastMargin, chosen.Law.Kind != declared.Kind);
    }

    private static DetectorKind Member(DetectorKind declared, DetectorKind otherwise, params ReadOnlySpan<DetectorKind> family) =>
        family.Contains(declared) ? declared : otherwise;

    /// <summary>A knee may lie anywhere in the range: from one start a fit would find only the near side.</summary>
    private static IEnumerable<LadderFit?> Starts(LadderRungs rungs, DetectorLaw declared, DetectorKind kind)
    {
        bool same = kind == declared.Kind;
        double top = rungs.Points.Max(point => point.Mean) - declared.PedestalCounts;
        double[] shapes = kind switch
        {
            DetectorKind.DiodeKnee => same ? [declared.Shape, 0.05 * top, 0.5 * top] : [0.05 * top, 0.5 * top],
            DetectorKind.RmsLog or DetectorKind.LogOfWaveform => [same ? declared.Shape : Math.Max(top / 40, 5)],
            _ => [declared.Shape],
        };
        return shapes.Select(shape => LadderFit.Of(rungs, declared with { Kind = kind, Shape = shape }));
    }

    private static double Distance(LadderFit worse, LadderFit better) =>
        (worse.ChiSquare - better.ChiSquare) / Math.Max(better.ChiSquare / better.DegreesOfFreedom, 1);
}
