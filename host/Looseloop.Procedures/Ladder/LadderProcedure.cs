using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Survey;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Ladder;

/// <summary>
/// Reads a detector's law in place: amplitude against sin(pi D) at one frequency, on resonance, where one harmonic rules.
/// Dark, rungs there and back, dark, fit, choice; with a direct input, a check against true power.
/// </summary>
public sealed class LadderProcedure(BoxSession box, ReadOptions options, IWatch watch, CancellationToken cancel)
{
    private const int DarkMs = 200;
    private const int SamplesAMainsPeriod = 100;

    /// <summary>Settled after a jump: dwell over (ring time + detector time).</summary>
    private const double RingsAfterJump = 9;

    /// <summary>Converters bend in the last tenth of their range.</summary>
    private const double UsableShare = 0.9;

    /// <summary>A harmonic's power over the fundamental's: where nothing is known, and the least that is ever excluded.</summary>
    private const double UnknownHarmonic = 0.005;
    private const double LeastHarmonic = 2e-5;

    private const int QuickSamples = 20;
    private const double NearShare = 0.05;
    private const double GuessedQ = 400;

    /// <summary>A share of the largest level below which no bow is claimed to be excluded.</summary>
    private const double LeastBow = 5e-4;

    /// <summary>Takes the ladder.</summary>
    /// <exception cref="BoxException">The box refused, failed or fell silent.</exception>
    public LadderOutcome Run()
    {
        double begun = box.BoardSeconds;
        if (AboutHz() is not double about)
        {
            return new LadderOutcome { Reasons = [new Reason(ReasonCode.NoPeak, "No coil's response was found to stand on.")] };
        }

        // A declaration that is wrong would spoil the first idea of f0 and Q, and with it the dwell: a few rungs show the shape.
        DetectorLaw law = Roughly(about);
        LadderOutcome outcome = Take(about, law);
        if (law.Kind != options.Law.Kind && outcome.Law is not null)
        {
            outcome = outcome with
            {
                Reasons = [.. outcome.Reasons, Contradiction(outcome.Law.Kind)],
                Choice = outcome.Choice! with { Contradicts = true },
            };
        }

        return outcome with { BoardSeconds = box.BoardSeconds - begun };
    }

    /// <summary>The declared law, or another one if a quick ladder at the largest level near by says so.</summary>
    private DetectorLaw Roughly(double aboutHz)
    {
        watch.Begin("looking at the shape of the law", 0.5);
        var guess = new Target(aboutHz, GuessedQ, 0.5);
        IReadOnlyList<Setting> near = CurveSweep.About(box.Grid, aboutHz, 4, 1, 0.5);
        int dwellUs = CurveSweep.DwellUs(guess, options.Law, RingsAfterJump);
        Setting top = box.Sweep(new SweepRequest(near, dwellUs, QuickSamples), cancel: cancel).Points.MaxBy(point => point.Mean).Setting;
        DarkLevel dark = QuietDark(guess, options.Law);
        RawPoint[] points = [.. box.Sweep(new SweepRequest(LadderPlan.Settings(top), dwellUs, QuickSamples), cancel: cancel).Points
            .Where(point => point.Max < UsableShare * box.Identity.FullCounts)];
        return points.Length > 8 && LadderChoice.Of(new LadderRungs(points, dark.Mean, HarmonicPowers.Unknown), options.Law) is { Decided: true, Contradicts: true } choice
            ? choice.Chosen.Law with { PedestalCounts = options.Law.PedestalCounts, PedestalUncertainty = options.Law.PedestalUncertainty }
            : options.Law;
    }

    /// <summary>Where the coil answers, roughly, or null.</summary>
    private double? AboutHz()
    {
        if (options.NearHz is not double near)
        {
            return SurveyProcedure.Run(box, options.Law, options.LowHz, options.HighHz, watch, cancel).F0?.FrequencyHz;
        }

        watch.Begin($"looking about {near / 1000:0.0} kHz", 0.3);
        (IReadOnlyList<RawPoint> raw, _) = SurveySweep.Run(
            box, options.Law, Math.Max(near * (1 - NearShare), box.Identity.LowestHz), Math.Min(near * (1 + NearShare), box.Identity.HighestHz),
            0.5, NoWatch.Instance, cancel);
        return raw.Count > 0 ? raw.MaxBy(point => point.Mean).Setting.FrequencyHz : null;
    }

    private LadderOutcome Take(double aboutHz, DetectorLaw law)
    {
        watch.Begin($"finding the top at {aboutHz / 1000:0.0} kHz", 0.4);
        DarkLevel zero = box.Dark(DarkMs, cancel: cancel);
        TargetSearch.Result search = TargetSearch.Run(box, new AmplitudeMaker(new DetectorScale(law), zero.Mean), aboutHz, options with { Law = law }, cancel);

        // A law that is far off can spoil the fit; the largest point then still says where to stand.
        Target target = search.Target
            ?? new Target(search.Points.Count > 0 ? search.Points.MaxBy(point => point.Mean).Setting.FrequencyHz : aboutHz, GuessedQ, 0.5);
        Setting at = box.Grid.Nearest(target.F0Hz, 0.5);
        double detuning = ResonanceModel.Detuning(at.FrequencyHz, target.F0Hz, target.Q);
        if (search.Target is not null && Math.Abs(detuning) > LadderChecks.LargestDetuning)
        {
            return new LadderOutcome
            {
                At = at,
                Detuning = detuning,
                Reasons = [new Reason(ReasonCode.GridTooCoarse, $"The setting nearest f0 ({at.FrequencyHz / 1000:0.00} kHz) is {Math.Abs(detuning) / 2:0.0} bandwidths off it: a ladder needs the top of the curve. Use a coil of lower Q, or change its load a little.")],
            };
        }

        int dwellUs = CurveSweep.DwellUs(target, law, RingsAfterJump);
        IReadOnlyList<Setting> settings = LadderPlan.Settings(at);
        int spacingUs = (int)Math.Round(1e6 / options.MainsHz / SamplesAMainsPeriod);
        watch.Begin($"climbing {settings.Count} duties there and back", settings.Count * 2e-6 * (dwellUs + (SamplesAMainsPeriod * spacingUs)));
        DarkLevel before = QuietDark(target, law);
        SweepResult sweep = box.Sweep(
            new SweepRequest(settings, dwellUs, SamplesAMainsPeriod) { SpacingUs = spacingUs, ThereAndBack = true }, cancel: cancel);
        DarkLevel after = QuietDark(target, law);
        double dark = (before.Mean + after.Mean) / 2;
        RawPoint[] usable = [.. sweep.Points.Where(point => point.Max < UsableShare * box.Identity.FullCounts)];
        var rungs = new LadderRungs(usable, dark, Harmonics(at, law, dwellUs, dark));
        var outcome = new LadderOutcome
        {
            At = at,
            Detuning = detuning,
            Rungs = rungs,
            LeftOut = sweep.Points.Count - usable.Length,
            DarkBefore = before,
            DarkAfter = after,
            Reasons = [],
        };
        return Judge(outcome, law, dwellUs);
    }

    /// <summary>
    /// What answers at twice, three, four times and beyond: each harmonic driven by itself, on a setting near its place. The
    /// square wave's own third harmonic there is nine times weaker in power and passes for part of the uncertainty.
    /// </summary>
    private HarmonicPowers Harmonics(Setting at, DetectorLaw law, int dwellUs, double darkCounts)
    {
        var maker = new AmplitudeMaker(new DetectorScale(law), darkCounts);
        double highest = Math.Min(box.Identity.HighestHz, box.Limits().HighHz);
        Setting[] settings = [at, .. Enumerable.Range(2, 5).Select(n => n * at.FrequencyHz).Where(hertz => hertz < highest * 0.998).Select(hertz => box.Grid.Nearest(hertz, 0.5))];
        IReadOnlyList<RawPoint> points = box.Sweep(new SweepRequest(settings, dwellUs, SamplesAMainsPeriod), cancel: cancel).Points;
        double full = maker.Make(points[0]).Amplitude;
        (double Power, double Standard)[] known = [.. points.Skip(1).Select(point => Power(maker.Make(point), full))];
        (double Power, double Standard) Of(int harmonic) => known.Length > harmonic - 2 ? known[harmonic - 2] : (0, UnknownHarmonic);
        double higher = known.Length > 0 ? known.Average(one => one.Power) : 0;
        double spread = known.Length > 1 ? known.Max(one => one.Power) / 2 : UnknownHarmonic;
        return new HarmonicPowers(
            Of(2).Power, Of(2).Standard, Of(3).Power, Of(3).Standard, Of(4).Power, Of(4).Standard, higher, Math.Max(spread, LeastHarmonic));
    }

    private static (double Power, double Standard) Power(AmplitudePoint point, double full)
    {
        double power = Math.Max(point.Amplitude / full, 0);
        power *= power;
        return (power, (0.25 * power) + (2 * Math.Sqrt(power * point.Variance) / full) + LeastHarmonic);
    }

    private LadderOutcome Judge(LadderOutcome taken, DetectorLaw declared, int dwellUs)
    {
        LadderRungs rungs = taken.Rungs!;
        Reason[] against = [.. LadderChecks.Reasons(rungs, taken.LeftOut, new AmplitudeMaker(new DetectorScale(declared), rungs.DarkCounts))];
        if (against.Length > 0)
        {
            return taken with { Reasons = against };
        }

        if (LadderChoice.Of(rungs, declared) is not LadderChoice choice)
        {
            return taken with { Reasons = [new Reason(ReasonCode.FitFailed, "None of the laws that a detector can have fits the rungs.")] };
        }

        if (!choice.Decided)
        {
            return taken with
            {
                Choice = choice,
                Reasons = [new Reason(ReasonCode.TooLittleSignal, $"The rungs do not decide between two laws (chi-square differs by {choice.Margin:0.0}; {LadderChoice.LeastMargin:0} is wanted).")],
            };
        }

        LadderFit fit = choice.Chosen;
        var law = fit.Law with
        {
            ReadOn = options.Time.GetUtcNow(),
            BowBound = Math.Max(Math.Max(Math.Abs(fit.Bow) + (2 * Positive(fit.BowUncertainty)), fit.WorstResidual), LeastBow),
            HighExtraS = fit.DutyError / taken.At!.Value.FrequencyHz,
            HighExtraUncertaintyS = fit.DutyErrorUncertainty / taken.At.Value.FrequencyHz,
        };
        var reasons = new List<Reason>();
        if (!law.RespondsToPower)
        {
            reasons.Add(new Reason(ReasonCode.DetectorNotPower, $"The detector is of a kind ({law.Kind}) that does not respond to power, or is not known to."));
        }

        if (choice.Contradicts)
        {
            reasons.Add(Contradiction(law.Kind));
        }

        DirectCheck? direct = DirectCheck.IsPossible(box.Identity) ? Direct(rungs, law, dwellUs) : null;
        if (direct is { Agrees: false })
        {
            // Two ways of knowing power disagree: neither is stored.
            reasons.Add(new Reason(ReasonCode.ResidualTooLarge, $"By the waveform's own scatter the ratio of two levels is {direct.ByDirect:0.000}, by this law {direct.ByLaw:0.000}."));
            return taken with { Choice = choice, Direct = direct, Reasons = reasons };
        }

        return taken with { Law = law, Choice = choice, Direct = direct, Reasons = reasons };
    }

    private DirectCheck Direct(LadderRungs rungs, DetectorLaw law, int dwellUs)
    {
        watch.Begin("checking against the waveform itself", 3);
        var maker = new AmplitudeMaker(new DetectorScale(law), rungs.DarkCounts);
        RawPoint high = rungs.Points.MaxBy(point => point.Mean);
        double third = maker.Make(high).Amplitude / 3;
        RawPoint low = rungs.Points.MinBy(point => Math.Abs(maker.Make(point).Amplitude - third));
        return DirectCheck.Take(box, high, low, maker, dwellUs, cancel);
    }

    private DarkLevel QuietDark(Target target, DetectorLaw law)
    {
        box.Pause(TimeSpan.FromSeconds(15 * (target.RingTimeS + law.TimeConstantS)));
        return box.Dark(DarkMs, cancel: cancel);
    }

    private Reason Contradiction(DetectorKind found) => new(
        ReasonCode.DetectorNotRead,
        $"The detector was declared as {options.Law.Kind}, and the ladder shows {found}: declare what is built, and take the ladder again.");

    private static double Positive(double value) => double.IsNaN(value) ? 0.01 : value;
}
