using Looseloop.Readings;

namespace Looseloop.Resonance;

/// <summary>
/// Chooses settings and samples that give the smallest uncertainty of f0 and Q for the time on air, over the settings that a box can
/// make. Every chosen setting costs its dwell twice (there and back), so few settings with many samples win; two more than the model
/// has unknowns are kept, so that the fit can still be doubted. Vernier settings are taken only where they help by the stated margin.
/// </summary>
public static class SweepDesigner
{
    /// <summary>Settings more than the model has unknowns.</summary>
    private const int SpareSettings = 2;
    private const int FewestCandidates = 9;
    private const int Turns = 150;
    private const int PruningTurns = 25;

    /// <summary>Where the guesses of f0 and Q stand, in standard uncertainties.</summary>
    private const double DrawAt = 1.5;

    /// <summary>Designs a sweep.</summary>
    /// <returns>The plan, or null where the settings do not determine f0 and Q or the time does not suffice.</returns>
    public static SweepPlan? Design(PlanRequest request)
    {
        if (request.Fundamental.Count == 0)
        {
            return null;
        }

        List<CurveEstimate> draws = Draws(request);
        List<PlannedPoint> candidates = Candidates(request, request.Fundamental, 1);
        (double Cost, List<PlannedPoint> Chosen)? best = Choose(request, draws, candidates, 1);
        int groups = 1;
        foreach ((IReadOnlyList<Setting> settings, int harmonic) in new[] { (request.Third, 3), (request.Fifth, 5) })
        {
            List<PlannedPoint> more = Candidates(request, settings, harmonic);
            if (more.Count == 0)
            {
                continue;
            }

            List<PlannedPoint> wider = [.. candidates, .. more];
            (double Cost, List<PlannedPoint> Chosen)? other = Choose(request, draws, wider, groups + 1);
            double margin = 1 - request.VernierMargin;
            if (other is not null && (best is null || other.Value.Cost < margin * margin * best.Value.Cost))
            {
                best = other;
                candidates = wider;
                groups++;
            }
        }

        return best is null ? null : Assemble(request, best.Value.Chosen);
    }

    private static List<CurveEstimate> Draws(PlanRequest request)
    {
        CurveEstimate at = request.Estimate;
        List<CurveEstimate> draws = [at];
        if (request.F0StandardHz > 0)
        {
            draws.Add(at with { F0Hz = at.F0Hz + (DrawAt * request.F0StandardHz) });
            draws.Add(at with { F0Hz = at.F0Hz - (DrawAt * request.F0StandardHz) });
        }

        if (request.QRelativeStandard > 0)
        {
            double factor = Math.Exp(DrawAt * Math.Min(request.QRelativeStandard, 0.5));
            draws.Add(at with { Q = at.Q * factor });
            draws.Add(at with { Q = at.Q / factor });
        }

        return draws;
    }

    private static List<PlannedPoint> Candidates(PlanRequest request, IReadOnlyList<Setting> settings, int harmonic)
    {
        double bandwidthHz = request.Estimate.F0Hz / request.Estimate.Q;
        double reachHz = (request.ReachBandwidths * bandwidthHz) + (DrawAt * request.F0StandardHz);
        List<PlannedPoint> near =
        [
            .. settings.Select(setting => new PlannedPoint(setting, harmonic, 0, 0))
                .OrderBy(point => Math.Abs(point.FrequencyHz - request.Estimate.F0Hz)),
        ];
        int inside = near.TakeWhile(point => Math.Abs(point.FrequencyHz - request.Estimate.F0Hz) <= reachHz).Count();
        return [.. near.Take(Math.Max(inside, FewestCandidates)).OrderBy(point => point.FrequencyHz)];
    }

    /// <summary>
    /// Shares first, then the least used setting goes as long as its dwell is worth more as samples elsewhere.
    /// Cost is the weighted variance.
    /// </summary>
    private static (double Cost, List<PlannedPoint> Chosen)? Choose(
        PlanRequest request, List<CurveEstimate> draws, List<PlannedPoint> candidates, int groups)
    {
        int fewest = 4 + groups + SpareSettings;
        if (candidates.Count < fewest)
        {
            return null;
        }

        var weights = new DesignWeights(candidates, draws, request);
        Array.Fill(weights.Shares, 1.0 / weights.Count);
        double criterion = weights.Improve(Turns);
        if (!double.IsFinite(criterion))
        {
            return null;
        }

        double visitS = VisitS(request);
        int used = candidates.Count;
        double cost = Cost(criterion, request, used, visitS);
        double[] kept = [.. weights.Shares];
        while (used > fewest)
        {
            int least = -1;
            for (int i = 0; i < weights.Count; i++)
            {
                if (weights.Shares[i] > 0 && (least < 0 || weights.Shares[i] < weights.Shares[least]))
                {
                    least = i;
                }
            }

            if (least < 0)
            {
                return null;
            }

            weights.Shares[least] = 0;
            used--;
            double fewer = Cost(weights.Improve(PruningTurns), request, used, visitS);
            if (!(fewer <= cost * 1.001) && double.IsFinite(cost))
            {
                break;
            }

            cost = fewer;
            weights.Shares.CopyTo(kept, 0);
        }

        return double.IsFinite(cost) ? (cost, Share(request, candidates, kept, visitS)) : null;
    }

    private static double VisitS(PlanRequest request) => request.PointS + DwellRule.JumpS(
        ResonanceModel.RingTimeS(request.Estimate.F0Hz, request.Estimate.Q), request.DetectorTimeS);

    private static double Cost(double criterion, PlanRequest request, int used, double visitS)
    {
        double samplingS = request.TimeS - (2 * used * visitS);
        double samples = samplingS / request.SampleS;
        return samples >= 2 * used * request.LeastSamples ? criterion / samples : double.PositiveInfinity;
    }

    private static List<PlannedPoint> Share(PlanRequest request, List<PlannedPoint> candidates, double[] shares, double visitS)
    {
        int used = shares.Count(share => share > 0);
        double perVisit = (request.TimeS - (2 * used * visitS)) / request.SampleS / 2;
        var chosen = new List<PlannedPoint>();
        for (int i = 0; i < shares.Length; i++)
        {
            if (shares[i] > 0)
            {
                int samples = Math.Max((int)Math.Round(shares[i] * perVisit), request.LeastSamples);
                chosen.Add(candidates[i] with { Samples = samples });
            }
        }

        return chosen;
    }

    private static SweepPlan Assemble(PlanRequest request, List<PlannedPoint> chosen)
    {
        double ringS = ResonanceModel.RingTimeS(request.Estimate.F0Hz, request.Estimate.Q);
        double stepS = DwellRule.OrderedS(ringS, request.DetectorTimeS);
        double jumpS = DwellRule.JumpS(ringS, request.DetectorTimeS);
        List<PlannedPoint> there = [.. chosen.OrderBy(point => point.Harmonic).ThenBy(point => point.FrequencyHz)];
        List<PlannedPoint> all = [.. there, .. there.AsEnumerable().Reverse()];
        var information = new FisherInformation(request.Estimate, request.Noise);
        double timeS = 0;
        for (int i = 0; i < all.Count; i++)
        {
            // The turning point is visited twice running: nothing has to settle.
            bool jump = i == 0 || all[i].Harmonic != all[i - 1].Harmonic;
            bool same = i > 0 && all[i].Setting == all[i - 1].Setting;
            all[i] = all[i] with { DwellS = same ? 0 : jump ? jumpS : stepS };
            timeS += all[i].DwellS + request.PointS + (all[i].Samples * request.SampleS);
            information.Add(
                all[i].FrequencyHz, all[i].Samples, all[i].Group, all[i].DriveWeight,
                DesignWeights.ConstantPower(all[i], request.Estimate));
        }

        (double f0, double q) = information.Bound();
        return new SweepPlan(all, f0, q, timeS);
    }
}
