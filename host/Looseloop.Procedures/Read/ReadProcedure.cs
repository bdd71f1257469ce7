using Looseloop.Box;
using Looseloop.Procedures.Checks;
using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Survey;
using Looseloop.Procedures.Uncertainty;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>
/// A reading: find the response, get a first idea of f0 and Q, measure there and back, look again at another duty and
/// after a longer dwell, fit, and judge.
/// </summary>
public sealed class ReadProcedure(BoxSession box, ReadOptions options, IWatch watch, CancellationToken cancel)
{
    /// <summary>A dark level is taken over this many whole mains periods.</summary>
    private const double DarkPeriods = 3;

    /// <summary>Ring times until what is left of the own ring is below a thousandth of a count.</summary>
    private const double RingsToDie = 15;

    private ReadOptions _options = options;

    /// <summary>Reads.</summary>
    /// <exception cref="BoxException">The box refused, failed or fell silent.</exception>
    public ReadOutcome Run()
    {
        SurveyResult? survey = null;
        double aboutHz;
        DarkLevel look;
        if (_options.NearHz is double near)
        {
            NearLook.Result found = NearLook.Run(box, _options.Law, near, watch, cancel);
            look = found.Look;
            if (found.Response.Kind != ResponseKind.F0)
            {
                return Nothing(null, look, [NearLook.WhyNot(found.Response)], found.Points);
            }

            aboutHz = found.Response.FrequencyHz;
        }
        else
        {
            survey = SurveyProcedure.Run(box, _options.Law, _options.LowHz, _options.HighHz, watch, cancel);
            look = survey.Look;
            if (survey.F0 is null || survey.Saturated)
            {
                return Nothing(survey, look, SurveyReasons.WhyNoF0(survey, _options), []);
            }

            aboutHz = survey.F0.FrequencyHz;
        }

        _options = _options with { Law = Pedestal.Settle(_options.Law, look) };
        watch.Begin($"finding the width at {aboutHz / 1000:0.0} kHz", 0.4);
        var first = new AmplitudeMaker(new DetectorScale(_options.Law), look.Mean);
        TargetSearch.Result search = TargetSearch.Run(box, first, aboutHz, _options, cancel);
        if (search.Target is null)
        {
            return Nothing(survey, look, [FitReasons.WhyNot(search.Outcome, search.Saturated)], search.Points);
        }

        Measurement measurement = Measure(search, survey);
        Reading document = Document(
            measurement.Points, [measurement.DarkBefore, measurement.DarkAfter], Verdict.None, [], new Budget([]));
        return ReadingJudge.Judge(document, measurement);
    }

    private Measurement Measure(TargetSearch.Result search, SurveyResult? survey)
    {
        Target target = search.Target!;
        DarkLevel before = QuietDark(target);
        MeasurePlan plan = MeasurePlan.For(box, search, new AmplitudeMaker(new DetectorScale(_options.Law), before.Mean), _options.MainsHz);
        double boardSeconds = plan.Settings.Count * 2e-6 * (plan.DwellUs + (plan.Samples * plan.SpacingUs));
        string vernier = plan.UsesVernier ? ", vernier settings among them" : "";
        watch.Begin($"measuring {plan.Settings.Distinct().Count()} settings there and back{vernier}", boardSeconds * 1.8);
        SweepResult sweep = box.Sweep(
            new SweepRequest(plan.Settings, plan.DwellUs, plan.Samples) { SpacingUs = plan.SpacingUs, ThereAndBack = true },
            cancel: cancel);
        watch.Begin("looking again at another duty and after a longer dwell", boardSeconds * 0.8);
        double otherDuty = OtherDuty(target.Duty);
        SweepResult other = box.Sweep(
            new SweepRequest([.. plan.Fundamental.Select(s => SettingGrid.WithDuty(s, otherDuty))], plan.DwellUs, plan.Samples) { SpacingUs = plan.SpacingUs },
            cancel: cancel);
        Setting[] flanks = Flanks(plan, target);
        SweepResult longer = box.Sweep(
            new SweepRequest(flanks, 2 * plan.DwellUs, plan.Samples) { SpacingUs = plan.SpacingUs }, cancel: cancel);
        return Fit(new SweepsTaken
        {
            Options = _options,
            Box = box.Identity,
            Target = target,
            Plan = plan,
            Survey = survey,
            Sweep = sweep,
            OtherDuty = otherDuty,
            AtOtherDuty = other,
            AfterLongerDwell = longer,
            DarkBefore = before,
            DarkAfter = QuietDark(target),
            Saturated = search.Saturated,
        });
    }

    /// <summary>Fits what was taken. Talks to no box: recorded sweeps come out the same again.</summary>
    internal static Measurement Fit(SweepsTaken taken)
    {
        ReadOptions options = taken.Options;
        Target target = taken.Target;
        MeasurePlan plan = taken.Plan;
        (SweepResult sweep, SweepResult other, SweepResult longer) = (taken.Sweep, taken.AtOtherDuty, taken.AfterLongerDwell);
        (DarkLevel before, DarkLevel after) = (taken.DarkBefore, taken.DarkAfter);
        var maker = new AmplitudeMaker(new DetectorScale(options.Law), (before.Mean + after.Mean) / 2);
        EdgeWeight edges = plan.UsesVernier ? Edges(sweep.Points, other.Points, plan, maker) : EdgeWeight.None;
        FitPoint[] points =
        [
            .. CurveSweep.FitPoints(sweep.Points, maker, plan.Harmonics)
                .Select(point => point.Group == 0 ? point with { DriveWeight = point.DriveWeight * edges.Factor } : point),
        ];
        var declared = new FitOptions { PrefactorExponent = options.PrefactorExponent, F0GuessHz = target.F0Hz, QGuess = target.Q };
        var fitter = new ResonanceFitter(Math.Max(points.Length, 16));
        ResonanceFit fit = fitter.Fit(points, declared);
        double[] residuals = fitter.NormalizedResiduals.ToArray();
        int half = points.Length / 2;
        ResonanceFit there = fitter.Fit(points.AsSpan(0, half), declared);
        double[] wayResiduals = there.IsFitted ? fitter.NormalizedResiduals.ToArray() : [];
        ResonanceFit back = fitter.Fit(points.AsSpan(half), declared);
        bool paired = there.IsFitted && back.IsFitted && sweep.Missing == 0;
        PairScatter scatter = paired
            ? PairScatter.Of(points, [.. wayResiduals, .. fitter.NormalizedResiduals], fit, half - there.DegreesOfFreedom)
            : PairScatter.Unknown;
        return new Measurement
        {
            Options = options,
            Box = taken.Box,
            Target = target,
            Plan = plan,
            Survey = taken.Survey,
            Points = sweep.Points,
            Maker = maker,
            FitPoints = points,
            Fit = fit,
            Residuals = residuals,
            There = there,
            Back = back,
            Pairs = scatter,
            OtherDutyFit = fitter.Fit(CurveSweep.FitPoints(other.Points, maker), declared),
            OtherDuty = taken.OtherDuty,
            AtOtherDuty = other.Points,
            Edges = edges,
            DwellPairs = Pair(sweep.Points, longer.Points, maker),
            DarkBefore = before,
            DarkAfter = after,
            Missing = sweep.Missing + other.Missing + longer.Missing,
            MissingInSweep = sweep.Missing,
            Saturated = taken.Saturated,
        };
    }

    /// <summary>1/2 beside 1/3, whose third harmonics differ most; beside a duty that was lowered for the level, a lower one.</summary>
    private static double OtherDuty(double duty) => duty switch
    {
        >= 0.45 => 1 / 3.0,
        >= 0.3 => 0.5,
        _ => duty * 2 / 3,
    };

    /// <summary>Dark after the own ring has died, over whole mains periods.</summary>
    private DarkLevel QuietDark(Target target)
    {
        double seconds = RingsToDie * (target.RingTimeS + _options.Law.TimeConstantS);
        box.Pause(TimeSpan.FromSeconds(seconds));
        return box.Dark((int)Math.Round(1000 * DarkPeriods / _options.MainsHz), cancel: cancel);
    }

    /// <summary>Two settings on either flank, where a sweep that is too fast shows most, and the one nearest the top.</summary>
    private static Setting[] Flanks(MeasurePlan plan, Target target)
    {
        double[] at = [-1, -0.4, 0, 0.4, 1];
        return [.. at.Select(u => plan.Fundamental.MinBy(s => Math.Abs(s.FrequencyHz - target.F0Hz - (u * target.BandwidthHz)))).Distinct()];
    }

    /// <summary>Against vernier settings only the drive's true strength at this duty will do.</summary>
    private static EdgeWeight Edges(
        IReadOnlyList<RawPoint> points, IReadOnlyList<RawPoint> other, MeasurePlan plan, AmplitudeMaker maker) => EdgeWeight.Of(
            points.Where(point => plan.Harmonics[point.Setting] == 1).Select(point => maker.Make(point)), other.Select(point => maker.Make(point)));

    private static List<(AmplitudePoint First, AmplitudePoint Longer)> Pair(
        IReadOnlyList<RawPoint> points, IReadOnlyList<RawPoint> longer, AmplitudeMaker maker)
    {
        // Upward points come first: those are the ones whose dwell followed a lower setting, as the longer ones do.
        var first = points.GroupBy(point => point.Setting).ToDictionary(group => group.Key, group => group.First());
        return [.. longer.Where(point => first.ContainsKey(point.Setting)).Select(point => (maker.Make(first[point.Setting]), maker.Make(point)))];
    }

    private ReadOutcome Nothing(SurveyResult? survey, DarkLevel look, IReadOnlyList<Reason> reasons, IReadOnlyList<RawPoint> points) =>
        new(Document(points.Count > 0 ? points : survey?.Raw ?? [], [look], Verdict.None, reasons, new Budget([])), null, [], survey);

    private Reading Document(
        IReadOnlyList<RawPoint> points, IReadOnlyList<DarkLevel> dark, Verdict verdict, IReadOnlyList<Reason> reasons, Budget budget)
    {
        DateTimeOffset now = _options.Time.GetUtcNow();
        return new Reading
        {
            Id = Guid.CreateVersion7(now),
            Utc = now,
            BoardTimeUs = points.Count > 0 ? (points[0].BoardTimeUs + points[^1].BoardTimeUs) / 2 : box.BoardTimeUs,
            BoardSeconds = box.BoardSeconds,
            Box = box.Identity,
            HostVersion = _options.HostVersion,
            Coil = _options.Coil,
            Note = _options.Note,
            SetUp = _options.SetUp,
            F0Hz = double.NaN,
            Q = double.NaN,
            PeakCounts = double.NaN,
            Budget = budget,
            Verdict = verdict,
            Reasons = reasons,
            Points = points,
            Dark = dark,
        };
    }
}
