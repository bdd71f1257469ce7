using Looseloop.Procedures.Checks;
using Looseloop.Procedures.Survey;
using Looseloop.Procedures.Uncertainty;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>What a measurement makes of a reading: figures, budget, reasons, verdict. Pure.</summary>
internal static class ReadingJudge
{
    /// <summary>Fills a document in.</summary>
    /// <param name="document">When, by which box, of what; its figures are replaced.</param>
    /// <param name="measurement">The measurement.</param>
    public static ReadOutcome Judge(Reading document, Measurement measurement)
    {
        List<Reason> reasons = ReadingChecks.All(measurement);
        bool figures = measurement.Fit.IsFitted && reasons.All(reason => reason.AtBest != Verdict.None);
        Budget budget = figures ? BudgetMaker.Make(measurement) : new Budget([]);
        if (figures)
        {
            reasons.AddRange(BudgetReasons.Of(measurement, budget));
        }

        ResonanceFit fit = measurement.Fit;
        ReadOptions options = measurement.Options;
        double clock = 1 + ((options.Clock?.Ppm ?? 0) * 1e-6);
        double pull = options.Pull?.F0Relative ?? 0;
        Reading reading = document with
        {
            F0Hz = figures ? fit.F0Hz * clock * (1 - pull) : double.NaN,
            Q = figures ? 1 / ((1 / fit.Q) - (options.Pull?.LossAdded ?? 0)) : double.NaN,
            PeakCounts = figures ? fit.PeakAmplitude : double.NaN,
            FeedThrough = figures ? fit.FeedThrough.Ratio : double.NaN,
            Budget = budget,
            Verdict = reasons.Select(reason => reason.AtBest).Append(figures ? Verdict.Sound : Verdict.None).Min(),
            Reasons = reasons,
            Basis = BasisOf(measurement),
        };
        return new ReadOutcome(reading, fit, measurement.FitPoints, measurement.Survey);
    }

    private static FitBasis BasisOf(Measurement measurement) => new()
    {
        Law = measurement.Options.Law,
        PrefactorExponent = measurement.Options.PrefactorExponent,
        Clock = measurement.Options.Clock,
        Pull = measurement.Options.Pull,
        Commissioned = measurement.Options.Commissioned,
        PlannedF0Hz = measurement.Target.F0Hz,
        PlannedQ = measurement.Target.Q,
        PlannedDuty = measurement.Target.Duty,
        DwellUs = measurement.Plan.DwellUs,
        Samples = measurement.Plan.Samples,
        SpacingUs = measurement.Plan.SpacingUs,
        Harmonics = [.. measurement.Points.Select(point => measurement.Plan.Harmonics[point.Setting])],
        OtherDuty = measurement.OtherDuty,
        AtOtherDuty = measurement.AtOtherDuty,
        AfterLongerDwell = [.. measurement.DwellPairs.Select(pair => pair.Longer.Raw)],
        MissingInSweep = measurement.MissingInSweep,
        MissingInChecks = measurement.Missing - measurement.MissingInSweep,
        Saturated = measurement.Saturated,
        Survey = measurement.Survey is { } survey
            ? new SurveySeen(measurement.Options.LowHz, [.. survey.Responses.Select(Seen)])
            : null,
    };

    private static SeenResponse Seen(Response response) =>
        new(response.Kind.ToString().ToLowerInvariant(), response.FrequencyHz, response.Amplitude, response.Harmonic);
}
