using System.Globalization;
using Looseloop.Readings;

namespace Looseloop.Resonance;

/// <summary>How far a bare fit may be trusted, judged from its points and nothing else.</summary>
/// <param name="Verdict">The worst that the reasons leave.</param>
/// <param name="Reasons">What stands against it, and notes; empty where nothing does.</param>
public sealed record FitVerdict(Verdict Verdict, IReadOnlyList<Reason> Reasons)
{
    /// <summary>Equal amplitudes at the top over more than this part of a bandwidth mean a detector at its end.</summary>
    private const double FlatTopBandwidths = 0.15;
    private const int FlatTopPoints = 3;

    /// <summary>Judges a fit.</summary>
    /// <param name="points">What was fitted.</param>
    /// <param name="fit">What came out.</param>
    /// <param name="normalizedResiduals">The fitter's, in the order of the points; empty where they are gone.</param>
    /// <param name="limits">Where it stops being good enough; null for the defaults.</param>
    public static FitVerdict Judge(
        ReadOnlySpan<FitPoint> points, in ResonanceFit fit, ReadOnlySpan<double> normalizedResiduals = default,
        VerdictLimits? limits = null)
    {
        limits ??= new VerdictLimits();
        var reasons = new List<Reason>();
        if (fit.IsFitted)
        {
            FitPoint[] ordered = [.. points];
            Array.Sort(ordered, (a, b) => a.FrequencyHz.CompareTo(b.FrequencyHz));
            JudgeRange(ordered, fit, limits, reasons);
            JudgeTop(ordered, fit, reasons);
            JudgeFeedThrough(fit, limits, reasons);
            JudgeResidual(points, fit, normalizedResiduals, limits, reasons);
            if (!fit.VariancesStated)
            {
                reasons.Add(new Reason(
                    ReasonCode.NoiseFromResiduals, "The uncertainties come from the scatter of the points about the curve."));
            }
        }
        else
        {
            reasons.Add(Failure(points, fit));
        }

        Verdict worst = fit.IsFitted ? Verdict.Sound : Verdict.None;
        foreach (Reason reason in reasons)
        {
            worst = reason.AtBest < worst ? reason.AtBest : worst;
        }

        return new FitVerdict(worst, reasons);
    }

    private static Reason Failure(ReadOnlySpan<FitPoint> points, in ResonanceFit fit) => fit.Outcome switch
    {
        FitOutcome.TooFewPoints => new Reason(
            ReasonCode.TooFewPoints, Text($"{points.Length} points are fewer than the curve has unknowns, or too many share a frequency.")),
        FitOutcome.BadPoint => new Reason(
            ReasonCode.FitFailed, "A frequency or an amplitude is not a finite number, or a frequency is not above zero."),
        FitOutcome.NoPeak => new Reason(ReasonCode.NoPeak, "The points show no resonance: constants explain them as well."),
        FitOutcome.PeakOutside => new Reason(
            ReasonCode.PeakAtEdge, Text($"The curve that fits best has its peak at {fit.F0Hz / 1e3:F2} kHz, outside the points.")),
        _ => new Reason(ReasonCode.FitFailed, "No curve of one resonance is determined by the points."),
    };

    private static void JudgeRange(FitPoint[] ordered, in ResonanceFit fit, VerdictLimits limits, List<Reason> reasons)
    {
        double below = (fit.F0Hz - ordered[0].FrequencyHz) / fit.BandwidthHz;
        double above = (ordered[^1].FrequencyHz - fit.F0Hz) / fit.BandwidthHz;
        if (Math.Min(below, above) < limits.EdgeBandwidths)
        {
            reasons.Add(new Reason(
                ReasonCode.PeakAtEdge,
                Text($"The points reach {below:F2} bandwidths below the peak and {above:F2} above it.")));
        }

        int inside = 0;
        double lastHz = 0;
        foreach (FitPoint point in ordered)
        {
            if (Math.Abs(point.FrequencyHz - fit.F0Hz) <= fit.BandwidthHz && point.FrequencyHz > lastHz)
            {
                inside++;
                lastHz = point.FrequencyHz;
            }
        }

        double qRelative = fit.QRelativeStandard;
        if (inside < limits.PointsInside)
        {
            reasons.Add(new Reason(
                ReasonCode.GridTooCoarse,
                Text($"{inside} of the points lie within one bandwidth ({fit.BandwidthHz:F0} Hz) of the peak; Q is known to {100 * qRelative:F1} %.")));
        }
        else if (!(qRelative <= limits.QRelative))
        {
            reasons.Add(new Reason(
                ReasonCode.TooLittleSignal, Text($"The noise leaves Q uncertain by {100 * qRelative:F0} % (one standard deviation).")));
        }
    }

    /// <summary>A detector at its end gives several equal largest readings where the curve should still change.</summary>
    private static void JudgeTop(FitPoint[] ordered, in ResonanceFit fit, List<Reason> reasons)
    {
        double largest = ordered.Max(point => point.Amplitude);
        FitPoint[] top = [.. ordered.Where(point => point.Amplitude >= largest * (1 - 1e-9))];
        double spanHz = top[^1].FrequencyHz - top[0].FrequencyHz;
        int within = ordered.Count(p => p.FrequencyHz >= top[0].FrequencyHz && p.FrequencyHz <= top[^1].FrequencyHz);
        bool steady = within < top.Length + FlatTopPoints && top.Length >= FlatTopPoints;
        if (steady && spanHz > FlatTopBandwidths * fit.BandwidthHz)
        {
            reasons.Add(new Reason(
                ReasonCode.Saturated,
                Text($"{top.Length} points over {spanHz:F0} Hz at the top have exactly the same amplitude.")));
        }
    }

    private static void JudgeFeedThrough(in ResonanceFit fit, VerdictLimits limits, List<Reason> reasons)
    {
        if (fit.FeedThrough.Ratio > limits.FeedThroughRatio || !(fit.FeedThrough.OtherAmplitude > 0))
        {
            reasons.Add(new Reason(
                ReasonCode.FeedThroughLarge,
                double.IsFinite(fit.FeedThrough.Ratio)
                    ? Text($"The feed-through may be {100 * fit.FeedThrough.Ratio:F0} % of the peak.")
                    : "The feed-through may be as large as the peak itself."));
        }
    }

    private static void JudgeResidual(
        ReadOnlySpan<FitPoint> points, in ResonanceFit fit, ReadOnlySpan<double> residuals, VerdictLimits limits, List<Reason> reasons)
    {
        if (!(fit.ResidualRatio > limits.NegligibleResidual))
        {
            return;
        }

        bool improbable = fit.VariancesStated
            ? fit.ChiSquareProbability < limits.ChiSquareProbability
            : fit.ResidualRatio > limits.LargeResidual;
        double order = residuals.Length == points.Length ? Order(points, residuals) : 0;
        if (improbable || order > limits.ResidualOrder)
        {
            string how = order > limits.ResidualOrder ? " and follow a pattern" : "";
            reasons.Add(new Reason(
                ReasonCode.ResidualTooLarge,
                Text($"The points miss the curve by {100 * fit.ResidualRatio:F2} % of the peak (root mean square){how}.")));
        }
    }

    /// <summary>
    /// How far the residuals of neighbours in frequency follow one another, in standard deviations: the lag-one correlation times
    /// the square root of the number (J. Durbin and G. S. Watson, Biometrika 37 (1950) 409).
    /// </summary>
    private static double Order(ReadOnlySpan<FitPoint> points, ReadOnlySpan<double> residuals)
    {
        double[] hz = new double[points.Length];
        for (int i = 0; i < hz.Length; i++)
        {
            hz[i] = points[i].FrequencyHz;
        }

        double[] r = residuals.ToArray();
        Array.Sort(hz, r);
        double product = 0;
        double square = r[0] * r[0];
        for (int i = 1; i < r.Length; i++)
        {
            product += r[i] * r[i - 1];
            square += r[i] * r[i];
        }

        return square > 0 ? product / square * Math.Sqrt(r.Length) : 0;
    }

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
