using Looseloop.Box;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Ring;

/// <summary>Adds Q by ring-down to a reading; where the two disagree, the verdict is doubtful.</summary>
public static class RingSecondOpinion
{
    private const double Sigmas = 3;

    /// <summary>Budget lines that both values of Q share, or that do not touch Q: they cannot make the two differ.</summary>
    private static readonly HashSet<string> _shared = ["pull", "clock", "temperature"];

    /// <summary>Takes the rings after a reading.</summary>
    /// <param name="box">The box that the reading came from.</param>
    /// <param name="options">As the reading had them.</param>
    /// <param name="outcome">The reading.</param>
    /// <param name="watch">Told what happens.</param>
    /// <param name="cancel">Halts.</param>
    /// <returns>The reading with its second opinion, and the rings; null where there is no resonance to ring.</returns>
    public static (ReadOutcome Outcome, RingOutcome? Ring) Add(
        BoxSession box, ReadOptions options, ReadOutcome outcome, IWatch watch, CancellationToken cancel)
    {
        if (outcome.Fit is not { IsFitted: true } fit)
        {
            return (outcome, null);
        }

        double duty = outcome.Reading.Points.Count > 0 ? outcome.Reading.Points[0].Setting.Duty : 0.5;
        RingOutcome ring = new RingProcedure(box, options.Law, watch, cancel).Run(fit.F0Hz, fit.Q, duty);
        return (outcome with { Reading = With(outcome.Reading, fit.Q, ring, options.Pull) }, ring);
    }

    /// <summary>The reading with the ring's Q beside its own.</summary>
    /// <param name="reading">By sweep.</param>
    /// <param name="sweepQ">Q by sweep as the coil stands, pull not yet taken off.</param>
    /// <param name="ring">The rings.</param>
    /// <param name="pull">Taken off from both.</param>
    public static Reading With(Reading reading, double sweepQ, RingOutcome ring, Pull? pull)
    {
        List<Reason> reasons = [.. reading.Reasons, .. ring.Reasons];
        if (ring.IsFound && double.IsFinite(reading.Q))
        {
            double sweep = Math.Sqrt(reading.Budget.Lines.Where(line => !_shared.Contains(line.Term)).Sum(line => line.QRelative * line.QRelative));
            double difference = (ring.Q / sweepQ) - 1;
            double standard = double.Hypot(sweep, ring.QRelative);
            if (Math.Abs(difference) > Sigmas * standard)
            {
                reasons.Add(new Reason(
                    ReasonCode.RingDisagrees,
                    $"By ring-down Q is {ring.Q:0.0}, {difference:+0.0%;-0.0%} from the sweep's; noise and detector explain {standard:P1}."));
            }
        }

        return reading with
        {
            RingQ = ring.IsFound ? 1 / ((1 / ring.Q) - (pull?.LossAdded ?? 0)) : double.NaN,
            RingQRelative = ring.IsFound ? ring.QRelative : double.NaN,
            Reasons = reasons,
            Verdict = reasons.Select(reason => reason.AtBest).Append(reading.Verdict).Min(),
        };
    }
}
