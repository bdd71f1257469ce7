using Looseloop.Box;
using Looseloop.Readings;
using DecayOutcome = Looseloop.Resonance.RingOutcome;
using DecayResult = Looseloop.Resonance.RingResult;

namespace Looseloop.Procedures.Ring;

/// <summary>
/// Q from free decays: drive at the setting nearest f0, stop, follow. No grid and no feed-through touch it, since the drive
/// is off; the detector's time constant does, and where it hides the ring no figure is given.
/// </summary>
public sealed class RingProcedure(BoxSession box, DetectorLaw law, IWatch watch, CancellationToken cancel)
{
    private const int DarkMs = 100;
    private const int QuickRepeats = 16;
    private const int Repeats = 64;
    private const int Tries = 4;

    /// <summary>A conversion with its call, seconds, until the box has shown its own.</summary>
    private const double UsualSampleS = 130e-6;

    /// <summary>Fewer sample intervals than this in a ring time and jitter decides.</summary>
    private const double LeastIntervals = 0.5;

    /// <summary>Takes the rings.</summary>
    /// <param name="f0Hz">Resonant frequency as read, hertz.</param>
    /// <param name="q">Quality factor, about; within a factor of five.</param>
    /// <param name="duty">A duty whose level suits the converter, 0..1/2.</param>
    public RingOutcome Run(double f0Hz, double q, double duty)
    {
        double begun = box.BoardSeconds;
        Setting setting = box.Grid.Nearest(f0Hz, duty);
        DarkLevel dark = box.Dark(DarkMs, cancel: cancel);
        var estimate = new DecayEstimate(law, setting, dark);
        var outcome = new RingOutcome { At = setting, F0Hz = f0Hz, Reasons = [] };
        double tau = q / (Math.PI * f0Hz);
        double sampleS = UsualSampleS;
        watch.Begin("finding the ring time", 0.5);
        bool settled = false;
        for (int i = 0; i < Tries && !settled; i++)
        {
            RingRequest quick = RingPlan.For(setting, tau, RingPlan.RingsFollowed * tau, law, sampleS, QuickRepeats);
            IReadOnlyList<DecaySample> samples = box.Ring(quick, cancel).Samples;
            sampleS = Interval(samples) ?? sampleS;
            DecayResult seen = estimate.Plain(estimate.Usable(samples, box.Identity.FullCounts));
            double next = seen.Outcome == DecayOutcome.Found ? seen.TauS : i % 2 == 0 ? tau / 3 : tau * 9;
            settled = seen.Outcome == DecayOutcome.Found && Math.Abs(Math.Log(next / tau)) < 0.35;
            tau = next;
        }

        if (!settled || tau < LeastIntervals * sampleS)
        {
            return Refuse(outcome, begun, settled
                ? $"The ring lasts {tau * 1e6:0} us, a sample takes {sampleS * 1e6:0} us."
                : $"No decay could be followed: detector ({law.TimeConstantS * 1e6:0} us) or sampling ({sampleS * 1e6:0} us) hides a ring of some {q / (Math.PI * f0Hz) * 1e6:0} us.");
        }

        RingRequest request = RingPlan.For(setting, tau, RingPlan.RingsFollowed * tau, law, sampleS, Repeats);
        watch.Begin($"following {Repeats} rings of {tau * 1e6:0} us", Repeats * 1e-6 * (request.DriveUs + request.DelayUs + 30_000));
        IReadOnlyList<DecaySample> decay = estimate.Usable(box.Ring(request, cancel).Samples, box.Identity.FullCounts);
        DecayResult result = estimate.Plain(decay);
        if (result.Outcome != DecayOutcome.Found)
        {
            return Refuse(outcome, begun, $"The detector's time constant of {law.TimeConstantS * 1e6:0} us hides a ring of some {tau * 1e6:0} us.");
        }

        double relative = double.Hypot(result.QRelativeStandard, estimate.Systematic(decay, result));
        return outcome with
        {
            TauS = result.TauS,
            TauUncertaintyS = result.TauS * relative,
            Samples = decay.Count,
            BoardSeconds = box.BoardSeconds - begun,
        };
    }

    private RingOutcome Refuse(RingOutcome outcome, double begun, string why) => outcome with
    {
        Reasons = [new Reason(ReasonCode.RingTooShort, why)],
        BoardSeconds = box.BoardSeconds - begun,
    };

    /// <summary>The usual time from sample to sample of one ring, seconds; null where no ring has two.</summary>
    private static double? Interval(IReadOnlyList<DecaySample> samples)
    {
        long[] steps = [.. samples.GroupBy(sample => sample.Repeat)
            .SelectMany(ring => ring.Zip(ring.Skip(1), (a, b) => b.SinceStopUs - a.SinceStopUs)).Where(step => step > 0).Order()];
        return steps.Length > 0 ? steps[steps.Length / 2] * 1e-6 : null;
    }
}
