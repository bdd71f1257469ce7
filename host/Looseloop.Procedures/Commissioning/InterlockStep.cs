using Looseloop.Box;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>A tone at the pickup, drive off: the box must refuse, steady tone or chopped, and drive again when it is gone.</summary>
public sealed class InterlockStep(BoxSession box, IAttendant attendant, IWatch watch, CancellationToken cancel)
{
    /// <summary>A second sees every pulse of a chopped tone.</summary>
    private const int LookMs = 1000;

    private readonly Dictionary<string, double> _figures = [];

    /// <summary>Runs it with a source at a frequency, hertz.</summary>
    public StepFinding Run(double aboutHz)
    {
        if (!attendant.Bring(ToneSource.Steady, aboutHz))
        {
            return Finding(StepResult.Skipped, "There was no tone source. Until the interlock has been seen to refuse, the box is not commissioned.");
        }

        StepFinding? steady = Against(ToneSource.Steady, aboutHz);
        if (steady is not null)
        {
            attendant.Bring(ToneSource.Off, aboutHz);
            return steady;
        }

        bool chopped = attendant.Bring(ToneSource.Chopped, aboutHz);
        if (chopped && Against(ToneSource.Chopped, aboutHz) is StepFinding against)
        {
            attendant.Bring(ToneSource.Off, aboutHz);
            return against;
        }

        bool gone = attendant.Bring(ToneSource.Off, aboutHz);
        if (gone && Refuses(aboutHz))
        {
            return Finding(StepResult.Failed, "The box still refuses with the source away: something else is near the pickup, or the pedestal it was told is wrong.");
        }

        return Finding(
            StepResult.Passed,
            $"Refused with a steady tone{(chopped ? " and with one of 1 ms in 200" : "; a chopped tone was not tried")}{(gone ? ", and drove again when it was gone." : ".")}");
    }

    private StepFinding? Against(ToneSource tone, double aboutHz)
    {
        string name = tone == ToneSource.Steady ? "steady" : "chopped";
        watch.Begin($"asking for a sweep beside a {name} tone", 2);
        LimitsAnswer limits = box.Limits();
        DarkLevel dark = box.Dark(LookMs, cancel: cancel);
        double share = (dark.Max - limits.PedestalCounts) / (double)(box.Identity.FullCounts - limits.PedestalCounts);
        _figures[$"{name}_tone_of_range"] = share;
        if (dark.Max <= limits.PedestalCounts + limits.FieldCounts)
        {
            return Finding(StepResult.Skipped, FormattableString.Invariant($"The {name} tone shows only {100 * share:0.0} % of the detector's range: bring the source nearer, until it shows a tenth, and do this step again."));
        }

        bool refused = Refuses(aboutHz);
        _figures[$"{name}_tone_refused"] = refused ? 1 : 0;
        return refused
            ? null
            : Finding(StepResult.Failed, FormattableString.Invariant($"The box drove beside a {name} tone of {100 * share:0} % of the detector's range. Do not use it: it would drive into a live coil."));
    }

    private bool Refuses(double aboutHz)
    {
        try
        {
            box.Sweep(new SweepRequest([box.Grid.Nearest(aboutHz, 0.5)], 1000, 1), cancel: cancel);
            return false;
        }
        catch (BoxException refusal) when (refusal.FieldPresent)
        {
            return true;
        }
    }

    private StepFinding Finding(StepResult result, string detail) => new(CommissioningStep.Interlock, result, detail, _figures);
}
