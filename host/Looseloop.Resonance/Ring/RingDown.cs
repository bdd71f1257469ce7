namespace Looseloop.Resonance;

/// <summary>
/// Q from the free decay after the drive has stopped: a second opinion that no grid of settings and no feed-through touches. The coil's
/// amplitude falls as exp(-t/tau), its power as exp(-2t/tau); a detector of time constant tau_d passes that on as
/// a exp(-k t/tau) + c exp(-t/tau_d), k = 2 for a power detector and 1 for one that smooths amplitude. Both a and c are free: c holds
/// whatever the feed-through was before the stop, and neither depends on when exactly the drive stopped.
/// </summary>
public static class RingDown
{
    private const int LeastSamples = 8;
    private const int Parameters = 4;

    /// <summary>The decay must be known to this part, else it is refused.</summary>
    private const double MostRelative = 0.1;

    /// <summary>
    /// The detector's time constant may be at most this part of the decay's own (tau/2 for power, tau for amplitude): beyond, the two
    /// exponentials can no longer be told apart by anything but faith in the figure for tau_d.
    /// </summary>
    private const double MostDetectorPart = 0.7;

    /// <summary>Finds the ring time.</summary>
    /// <param name="samples">In any order; several repeats at staggered delays may be mixed.</param>
    /// <param name="detector">What the detector smooths.</param>
    /// <param name="detectorTimeS">Its time constant, seconds; 0 for one that is fast against everything.</param>
    /// <param name="detectorTimeStandardS">Standard uncertainty of that, seconds.</param>
    public static RingResult Evaluate(
        ReadOnlySpan<RingSample> samples, RingDetector detector, double detectorTimeS, double detectorTimeStandardS)
    {
        double first = double.PositiveInfinity;
        double last = double.NegativeInfinity;
        double largest = 0;
        foreach (RingSample sample in samples)
        {
            if (!(double.IsFinite(sample.TimeS) && double.IsFinite(sample.Level) && sample.Variance > 0 && double.IsFinite(sample.Variance)))
            {
                return new RingResult();
            }

            first = Math.Min(first, sample.TimeS);
            last = Math.Max(last, sample.TimeS);
            largest = Math.Max(largest, sample.Level);
        }

        if (samples.Length < LeastSamples || !(last > first) || !(largest > 0) || !(detectorTimeS >= 0))
        {
            return new RingResult();
        }

        double rate = detector == RingDetector.Power ? 2 : 1;
        var problem = new DecayProblem(samples.ToArray(), first, largest, detector, detectorTimeS, detectorTimeStandardS);
        var minimiser = new LevenbergMarquardt(Parameters, samples.Length + 1);
        double[] best = new double[Parameters];
        double lowest = double.PositiveInfinity;
        foreach (double part in new[] { 0.05, 0.2, 0.7 })
        {
            double[] at = [Math.Log(part * (last - first)), 0, 1, 0];
            MinimiserResult run = minimiser.Minimise(ref problem, at, 1e-12, 200, true);
            if (run.SumOfSquares < lowest)
            {
                lowest = run.SumOfSquares;
                at.CopyTo(best, 0);
            }
        }

        if (!double.IsFinite(lowest))
        {
            return new RingResult { Outcome = RingOutcome.TooShort };
        }

        lowest = minimiser.Minimise(ref problem, best, 1e-12, 200, true).SumOfSquares;
        double[] covariance = new double[Parameters * Parameters];
        bool determined = minimiser.TryCovariance(covariance);
        int freedom = samples.Length + 1 - Parameters;
        double tau = Math.Exp(best[0]);
        double excess = Math.Max(lowest / freedom, 1);
        double relative = Math.Sqrt(covariance[0] * excess);
        double seenDetectorS = problem.DetectorTimeS(best[1]);
        bool hidden = rate * detectorTimeS > MostDetectorPart * tau || rate * seenDetectorS > MostDetectorPart * tau;
        bool found = determined && relative < MostRelative && !hidden && best[2] > 0 && Follows(samples, first, tau);
        return new RingResult
        {
            Outcome = found ? RingOutcome.Found : RingOutcome.TooShort,
            TauS = found ? tau : double.NaN,
            TauStandardS = found ? tau * relative : double.NaN,
            DetectorTimeS = found ? seenDetectorS : double.NaN,
            ChiSquare = lowest,
            DegreesOfFreedom = freedom,
        };
    }

    /// <summary>At least four different delays lie within the first two ring times: less is no decay but two levels.</summary>
    private static bool Follows(ReadOnlySpan<RingSample> samples, double first, double tau)
    {
        var delays = new HashSet<double>();
        foreach (RingSample sample in samples)
        {
            if (sample.TimeS - first < 2 * tau)
            {
                delays.Add(sample.TimeS);
            }
        }

        return delays.Count >= 4;
    }
}
