using Looseloop.Statistics;

namespace Looseloop.Drift;

/// <summary>
/// Fits f(t) = End + sum of Amplitude exp(-(t - origin)/Tau) to a series, weighted by the stated uncertainties. Time constants
/// are searched by variable projection and all parameters polished together by Levenberg-Marquardt. The covariance is
/// s^2 (J'WJ)^-1 with s^2 = max(1, chi^2/(N - p)), widened where neighbouring residuals are alike.
/// </summary>
public static class WarmUpFit
{
    /// <summary>A time constant longer than this many durations of the run is a straight line to it.</summary>
    public const double LongestInDurations = 30;

    /// <summary>A further term must be this improbable by chance (F test).</summary>
    public const double TermProbability = 1e-3;

    private const int SearchBlocks = 300;

    private const int ChoiceBlocks = 2000;

    /// <summary>
    /// The model with as many terms (0, 1 or 2) as the data ask for: a term is added where an F test (with N thinned by the
    /// correlation of neighbours) gives it less than <see cref="TermProbability"/> by chance and Akaike's criterion falls by
    /// more than 10. Null for fewer than 3 readings.
    /// </summary>
    public static WarmUpModel? Choose(DriftSeries series, double? originS = null)
    {
        DriftSeries thin = Thinning.Of(series, ChoiceBlocks);
        WarmUpModel? best = Fit(thin, 0, originS);
        for (int terms = 1; terms <= 2 && best is not null; terms++)
        {
            if (thin.Count < 6 * terms || Fit(thin, terms, originS) is not { } richer || !Earned(best, richer))
            {
                break;
            }

            best = richer;
        }

        return best is null || ReferenceEquals(thin, series) ? best : Polish(series, originS ?? series.TimeS[0], Taus(best));
    }

    /// <summary>The model with exactly <paramref name="terms"/> terms (0..2), or null where it cannot be fitted.</summary>
    /// <param name="series">The readings.</param>
    /// <param name="terms">0, 1 or 2.</param>
    /// <param name="originS">The time to which amplitudes belong; the first reading's where null.</param>
    public static WarmUpModel? Fit(DriftSeries series, int terms, double? originS = null)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThan((uint)terms, 2u, nameof(terms));
        if (series.Count < 3 + (2 * terms) - (terms == 0 ? 1 : 0))
        {
            return null;
        }

        double origin = originS ?? series.TimeS[0];
        if (terms == 0)
        {
            return Polish(series, origin, []);
        }

        DriftSeries few = Thinning.Of(series, SearchBlocks);
        (double shortest, double longest) = Bounds(series);
        if (TauSearch.Best(few, terms, 2 * shortest, longest) is not { } taus)
        {
            return null;
        }

        // Polishing the means first leaves one or two steps over all readings.
        if (!ReferenceEquals(few, series) && Polish(few, origin, taus) is { } near)
        {
            taus = Taus(near);
        }

        return Polish(series, origin, taus);
    }

    private static WarmUpModel? Polish(DriftSeries series, double originS, double[] taus)
    {
        (double shortest, double longest) = Bounds(series);
        return LevenbergMarquardt.Polish(series, originS, series.Value[series.Count / 2], taus, shortest, longest);
    }

    private static double[] Taus(WarmUpModel model) => [.. model.Terms.Select(term => term.TauS)];

    private static (double ShortestS, double LongestS) Bounds(DriftSeries series) =>
        (Math.Max(series.DurationS / 4000, MedianSpacing(series) / 4), LongestInDurations * series.DurationS);

    private static bool Earned(WarmUpModel plain, WarmUpModel rich)
    {
        if (rich.Terms.Count == 2 && (rich.AtBound || rich.Terms[1].TauS < 2 * rich.Terms[0].TauS))
        {
            return false;
        }

        double thinned = rich.Count * (1 - rich.Neighbours) / (1 + rich.Neighbours);
        double freedom = thinned - rich.Parameters;
        if (freedom < 1)
        {
            return false;
        }

        double extra = rich.Parameters - plain.Parameters;
        double f = (plain.ChiSquare - rich.ChiSquare) / rich.ChiSquare * freedom / extra;
        double akaike = (thinned * Math.Log(plain.ChiSquare / rich.ChiSquare)) - Penalty(rich) + Penalty(plain);
        return akaike > 10 && FisherF.UpperTail(f, extra, freedom) < TermProbability;

        // Akaike's criterion with the correction for small samples (Hurvich and Tsai, Biometrika 76 (1989) 297; from memory).
        double Penalty(WarmUpModel model)
        {
            double k = model.Parameters + 1;
            return (2 * k) + (2 * k * (k + 1) / Math.Max(0.5, thinned - k - 1));
        }
    }

    private static double MedianSpacing(DriftSeries series)
    {
        // A thousand of them give the median well enough.
        int stride = Math.Max(1, series.Count / 1000);
        List<double> spacing = [];
        for (int i = 1; i < series.Count; i += stride)
        {
            spacing.Add(series.TimeS[i] - series.TimeS[i - 1]);
        }

        spacing.Sort();
        return spacing[spacing.Count / 2];
    }
}
