using Looseloop.Box;
using Looseloop.Link;
using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Ladder;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Survey;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>
/// Finds out whether a box does what it should, step by step (hardware-notes/commissioning.md). Whatever breaks it off, what was
/// found until then is given back.
/// </summary>
/// <param name="box">The box.</param>
/// <param name="options">How the coil is read; its law is the declared one.</param>
/// <param name="steps">The steps to do; they are done in their own order.</param>
/// <param name="attendant">Who reads the instruments.</param>
/// <param name="watch">Who follows.</param>
/// <param name="cancel">Halts.</param>
public sealed class CommissioningProcedure(
    BoxSession box, ReadOptions options, IReadOnlySet<CommissioningStep> steps, IAttendant attendant, ICommissioningWatch watch,
    CancellationToken cancel)
{
    private const int Darks = 3;
    private const int DarkMs = 1000;
    private const int HoldSamples = 1000;
    private const double NoCoilHz = 150_000;

    private readonly List<StepFinding> _findings = [];
    private ReadOptions _options = options;
    private LadderOutcome? _ladder;
    private Target? _target;
    private DetectorLaw? _law;
    private Reading? _reading;

    /// <summary>Every step.</summary>
    public static IReadOnlyList<CommissioningStep> All { get; } = Enum.GetValues<CommissioningStep>();

    /// <summary>Does the steps. A fault of the box fails its step; a lost box or an interruption ends the procedure.</summary>
    public CommissioningOutcome Run()
    {
        DateTimeOffset begun = _options.Time.GetUtcNow();
        Exception? brokenBy = null;
        bool worthless = false;
        foreach (CommissioningStep step in All.Where(steps.Contains))
        {
            StepFinding finding = brokenBy is not null ? new StepFinding(step, StepResult.NotDone, "It was not reached.")
                : worthless ? new StepFinding(step, StepResult.Skipped, "The frequencies are wrong: no figure of this board would mean anything.")
                : Do(step, ref brokenBy);
            worthless |= finding is { Step: CommissioningStep.Frequency, Result: StepResult.Failed };
            _findings.Add(finding);
            watch.Ended(finding);
        }

        var record = new CommissioningRecord(begun, box.Identity.Board, box.Identity.FirmwareVersion, _findings, brokenBy is not null);
        return new CommissioningOutcome(record, _law, _reading, brokenBy);
    }

    private StepFinding Do(CommissioningStep step, ref Exception? brokenBy)
    {
        watch.BeginStep(step);
        try
        {
            cancel.ThrowIfCancellationRequested();
            return step switch
            {
                CommissioningStep.Frequency => Frequency(),
                CommissioningStep.Duty => Duty(),
                CommissioningStep.Dark => Dark(),
                CommissioningStep.Ladder => LadderSteps.Law(Ladder()),
                CommissioningStep.Direct => Direct(),
                CommissioningStep.Settling => Settling(),
                CommissioningStep.Watchdog => WatchdogStep.Judge(WatchdogStep.Take(box, AboutHz(), cancel)),
                CommissioningStep.Interlock => new InterlockStep(box, attendant, watch, cancel).Run(AboutHz()),
                _ => FirstCoil(),
            };
        }
        catch (BoxException fault) when (fault.Trouble == BoxTrouble.Fault)
        {
            return new StepFinding(step, StepResult.Failed, fault.Message);
        }
        catch (Exception broken) when (broken is OperationCanceledException or BoxException or LinkLostException)
        {
            brokenBy = broken;
            return new StepFinding(step, StepResult.NotDone, broken is OperationCanceledException ? "It was interrupted." : broken.Message);
        }
    }

    private StepFinding Frequency()
    {
        attendant.Prepare("Connect the counter to the driver's output, the loop connected. The coil is not needed.");
        IReadOnlyList<Setting> settings = FrequencyStep.Settings(box.Grid);
        List<double> counts = Held(settings, attendant.CounterHz);
        return counts.Count < settings.Count
            ? new StepFinding(CommissioningStep.Frequency, StepResult.Skipped, $"{counts.Count} of {settings.Count} counter readings were given.")
            : FrequencyStep.Judge(settings, counts, attendant.CounterDigitHz);
    }

    private StepFinding Duty()
    {
        attendant.Prepare("Connect the DC voltmeter to the driver's output through 10 kohm into 1 uF, the loop connected; measure the driver's supply with it too.");
        IReadOnlyList<Setting> settings = DutyStep.Settings(box.Grid);
        List<double> shares = Held(settings, attendant.MeanShare);
        return shares.Count < settings.Count
            ? new StepFinding(CommissioningStep.Duty, StepResult.Skipped, $"{shares.Count} of {settings.Count} meter readings were given.")
            : DutyStep.Judge(settings, shares);
    }

    /// <summary>Readings of an instrument at settings; fewer than settings where one could not be had.</summary>
    private List<double> Held(IReadOnlyList<Setting> settings, Func<Setting, double?> read)
    {
        var readings = new List<double>();
        foreach (Setting setting in settings)
        {
            attendant.Driving(setting);
            int spacingUs = (int)Math.Clamp(attendant.Hold.TotalMicroseconds / HoldSamples, 1, 1_000_000);
            box.Sweep(new SweepRequest([setting], 0, HoldSamples) { SpacingUs = spacingUs }, cancel: cancel);
            if (read(setting) is not double reading)
            {
                break;
            }

            readings.Add(reading);
        }

        return readings;
    }

    private StepFinding Dark()
    {
        attendant.Prepare("Loop and antenna in their places, nothing live near them.");
        return DarkStep.Judge([.. Enumerable.Range(0, Darks).Select(_ => box.Dark(DarkMs, cancel: cancel))]);
    }

    private LadderOutcome Ladder()
    {
        attendant.Prepare("Set up a coil that is not energised: loop at its foot, antenna some coil lengths away.");
        _ladder = new LadderProcedure(box, _options, watch, cancel).Run();
        if (LadderSteps.IsGood(_ladder))
        {
            _law = _ladder.Law;
            _options = _options with { Law = _law! };
        }

        return _ladder;
    }

    private StepFinding Direct()
    {
        if (!DirectCheck.IsPossible(box.Identity))
        {
            return new StepFinding(CommissioningStep.Direct, StepResult.NotApplicable, "The box has no direct input.");
        }

        // The ladder takes it, at two of its rungs.
        return LadderSteps.Direct(_ladder ?? Ladder());
    }

    private StepFinding Settling()
    {
        if (Found() is not Target target)
        {
            return new StepFinding(CommissioningStep.Settling, StepResult.Failed, "No coil's response was found to settle on.");
        }

        watch.Begin("doubling the dwell", 2);
        return SettlingStep.Judge(SettlingStep.Take(box, target, _options.Law, cancel), target, _options.Law);
    }

    private StepFinding FirstCoil()
    {
        _reading = new ReadProcedure(box, _options, watch, cancel).Run().Reading;
        var figures = new Dictionary<string, double>
        {
            ["f0_hz"] = _reading.F0Hz,
            ["q"] = _reading.Q,
            ["peak_counts"] = _reading.PeakCounts,
            ["feed_through_ratio"] = _reading.FeedThrough,
        };
        Reason[] against = [.. _reading.Reasons.Where(reason => reason.AtBest < Verdict.Sound)];
        return _reading.Verdict == Verdict.Sound
            ? new StepFinding(CommissioningStep.FirstCoil, StepResult.Passed, FormattableString.Invariant($"f0 {_reading.F0Hz:0.0} Hz, Q {_reading.Q:0.0}, sound."), figures)
            : new StepFinding(CommissioningStep.FirstCoil, StepResult.Failed, string.Join(" ", against.Select(reason => $"{reason.Detail} {reason.Advice}")), figures);
    }

    /// <summary>Where the coil answers, or a frequency at all where none does: what needs no coil does without.</summary>
    private double AboutHz() => _target?.F0Hz ?? _ladder?.At?.FrequencyHz ?? _options.NearHz ?? NoCoilHz;

    /// <summary>A first f0 and Q of the coil, looked for once.</summary>
    private Target? Found()
    {
        if (_target is null)
        {
            double? about = _options.NearHz ?? _ladder?.At?.FrequencyHz
                ?? SurveyProcedure.Run(box, _options.Law, _options.LowHz, _options.HighHz, watch, cancel).F0?.FrequencyHz;
            if (about is double hertz)
            {
                var maker = new AmplitudeMaker(new DetectorScale(_options.Law), box.Dark(DarkMs / 5, cancel: cancel).Mean);
                _target = TargetSearch.Run(box, maker, hertz, _options, cancel).Target;
            }
        }

        return _target;
    }
}
