using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Uncertainty;

/// <summary>
/// The uncertainty budget of a reading by the GUM (JCGM 100:2008): each term from statistics, from fitting the same points
/// again with one thing changed, or from a stated bound.
/// </summary>
public static class BudgetMaker
{
    /// <summary>An untrimmed crystal, parts per million, taken as the half-width of a rectangle (common practice, no source).</summary>
    private const double UntrimmedPpm = 40;

    /// <summary>Temperature of coil and room within a reading's meaning, kelvin, and f0's coefficient for a plastic former.</summary>
    private const double TemperatureK = 0.5;
    private const double F0PpmPerK = 40;
    private const double QPerK = 0.002;

    /// <summary>
    /// What pickup, box and people add to the coil where no standoff was taken: up to 0.1 pF on the 12 pF of a small coil,
    /// of which f0 takes half (df/f = -dC/2C); the half-width of a rectangle.
    /// </summary>
    private const double UnmeasuredPull = 4.2e-3;

    /// <summary>
    /// What a loop takes from the coil where no standoff was taken: coupling up to this, the loop's reactance equal to its
    /// resistance at worst, so 1/Q grows by k^2/2 (reflected impedance, Terman, Radio Engineers' Handbook, 1943, from memory).
    /// </summary>
    private const double UnmeasuredCoupling = 0.02;

    /// <summary>Curvature of a detector that no ladder has read: share of the peak by which the middle of its range may bow.</summary>
    private const double UnreadBow = 0.01;
    private const double ReadBow = 0.002;

    /// <summary>
    /// Directions that a smooth misfit lies in: offset, slope, bow and twist (an assumption; the campaign's second coils and
    /// coupled primaries try it).
    /// </summary>
    private const double SmoothDirections = 4;

    /// <summary>What edges that are uneven by up to 100 ns leave of a duty near 1/2 in the third and fifth harmonic.</summary>
    private const double SecondOrderOfEdges = 1e-3;

    public static Budget Make(Measurement m)
    {
        ResonanceFit fit = m.Fit;
        double root3 = Math.Sqrt(3);
        var lines = new List<BudgetLine>
        {
            Noise(m),
            Misfit(m),
            Drift(m),
            Dark(m),
            Law(m, root3),
            Prefactor(m, root3),
            FeedThroughSlope(m),
            Dwell(m),
            DriveStrength(m, "drive strength", m.Edges.Uncertainty, true, Measured(m)),
            DriveStrength(m, "grid and duty", EdgeShare(m), false, "second order of uneven edges"),
        };
        if (!m.Options.Law.RespondsToPower)
        {
            lines.Add(Harmonics(m));
        }

        lines.Add(m.Options.Clock is ClockTrim trim
            ? new("clock", fit.F0Hz * trim.UncertaintyPpm * 1e-6, 0, false, double.PositiveInfinity, "trimmed")
            : new("clock", fit.F0Hz * UntrimmedPpm * 1e-6 / root3, 0, false, double.PositiveInfinity, "never trimmed: +-40 ppm"));
        lines.Add(m.Options.Pull is Pull pull
            ? new("pull", fit.F0Hz * pull.F0Uncertainty, pull.LossUncertainty * fit.Q, false, double.PositiveInfinity, "standoff")
            : new("pull", fit.F0Hz * UnmeasuredPull / root3, UnmeasuredCoupling * UnmeasuredCoupling / 2 * fit.Q / root3, false, double.PositiveInfinity, "no standoff: up to 0.1 pF, loop up to k = 0.02"));
        lines.Add(new("temperature", fit.F0Hz * F0PpmPerK * 1e-6 * TemperatureK, QPerK * TemperatureK, false, double.PositiveInfinity, "+-0.5 K of coil and room"));
        return new Budget(lines);
    }

    /// <summary>The fit's covariance from the samples' own scatter and from what the way back reads otherwise.</summary>
    private static BudgetLine Noise(Measurement m)
    {
        (double f0, double q) = Excesses(m);
        double freedom = double.IsNaN(m.Pairs.F0.Variance) ? m.Fit.DegreesOfFreedom : Math.Min(m.Pairs.F0.BelievedFreedom, m.Pairs.Q.BelievedFreedom);
        string origin = FormattableString.Invariant(
            $"samples' scatter, and the way back: {Math.Sqrt(f0):0.00} times the former for f0, {Math.Sqrt(q):0.00} for Q");
        return new("noise", m.Fit.Noise.F0Hz * Math.Sqrt(f0), m.Fit.Noise.Q / m.Fit.Q * Math.Sqrt(q), true, freedom, origin);
    }

    /// <summary>
    /// What is left about the curve beyond what the way back repeats otherwise: the same in every reading. Unlike noise it is
    /// smooth along the curve, so its whole sum of squares is taken to lie in a few directions, the parameters' among them.
    /// </summary>
    private static BudgetLine Misfit(Measurement m)
    {
        double chi = m.Fit.ChiSquareProbability < 1e-3 ? m.Fit.SumOfSquares / m.Fit.DegreesOfFreedom : 0;
        double all = Math.Max(chi, m.Fit.RobustScale * m.Fit.RobustScale);
        double share = Math.Max(m.Fit.DegreesOfFreedom / SmoothDirections, 1);
        (double f0, double q) = Excesses(m);
        return new(
            "misfit", m.Fit.Noise.F0Hz * Math.Sqrt(Math.Max(all - f0, 0) * share), m.Fit.Noise.Q / m.Fit.Q * Math.Sqrt(Math.Max(all - q, 0) * share),
            false, m.Fit.DegreesOfFreedom, "scatter about the curve that the way back repeats");
    }

    /// <summary>Variances by both over what the samples say; by the curve's scatter where no pairs tell.</summary>
    private static (double F0, double Q) Excesses(Measurement m)
    {
        double curve = Math.Max(m.Fit.SumOfSquares / m.Fit.DegreesOfFreedom, 1);
        return double.IsNaN(m.Pairs.F0.Variance) ? (curve, curve) : (m.Pairs.F0.Believed, m.Pairs.Q.Believed);
    }

    private static BudgetLine Drift(Measurement m)
    {
        double f0 = m.Back.F0Hz - m.There.F0Hz;
        double q = (m.Back.Q / m.There.Q) - 1;
        double f0Noise = Math.Sqrt((m.Back.F0StandardHz * m.Back.F0StandardHz) + (m.There.F0StandardHz * m.There.F0StandardHz));
        double qNoise = Math.Sqrt((m.Back.QRelativeStandard * m.Back.QRelativeStandard) + (m.There.QRelativeStandard * m.There.QRelativeStandard));

        // There and back cancels a steady drift; a quarter of what stands out of the noise is left for one that is not steady.
        return new BudgetLine(
            "drift", Math.Max(Math.Abs(f0) - (2 * f0Noise), 0) / 4, Math.Max(Math.Abs(q) - (2 * qNoise), 0) / 4, true, 1,
            "the way there against the way back");
    }

    private static BudgetLine Dark(Measurement m)
    {
        double dark = (m.DarkBefore.Mean + m.DarkAfter.Mean) / 2;
        double statistical = Math.Sqrt(
            ((m.DarkBefore.SampleVariance / m.DarkBefore.Samples) + (m.DarkAfter.SampleVariance / m.DarkAfter.Samples)) / 4);
        double moved = Math.Abs(m.DarkAfter.Mean - m.DarkBefore.Mean) / Math.Sqrt(12);
        var shifted = new AmplitudeMaker(m.Maker.Scale, dark + Math.Max(statistical, moved));
        ResonanceFit zero = m.Refit(raw => shifted.Make(raw));

        // What stands above the pedestal is either power (noise, carriers) or an offset: half the difference is uncertain.
        ResonanceFit offset = m.Refit(raw => AsOffset(m, raw, dark));
        return new BudgetLine(
            "dark", Hypot(zero.F0Hz - m.Fit.F0Hz, (offset.F0Hz - m.Fit.F0Hz) / 2),
            Hypot((zero.Q / m.Fit.Q) - 1, ((offset.Q / m.Fit.Q) - 1) / 2), false, 10, "dark before and after; power or offset");
    }

    private static AmplitudePoint AsOffset(Measurement m, RawPoint raw, double dark)
    {
        AmplitudePoint made = m.Maker.Make(raw);
        if (m.Options.Law.Kind is DetectorKind.RmsLog or DetectorKind.LogOfWaveform)
        {
            return made;
        }

        double shift = Math.Clamp(dark - m.Options.Law.PedestalCounts, -m.Options.Law.PedestalUncertainty, m.Options.Law.PedestalUncertainty);
        return made with { Amplitude = m.Maker.Scale.Amplitude(raw.Mean - shift) };
    }

    private static BudgetLine Law(Measurement m, double root3)
    {
        bool read = m.Options.Law.ReadOn is not null;
        double bow = !read ? UnreadBow : m.Options.Law.BowBound > 0 ? m.Options.Law.BowBound : ReadBow;
        double peak = m.FitPoints.Max(point => point.Amplitude);
        ResonanceFit bent = m.Refit(raw =>
        {
            AmplitudePoint made = m.Maker.Make(raw);
            double share = made.Amplitude / peak;
            return made with { Amplitude = made.Amplitude + (4 * bow * peak * share * (1 - share)) };
        });
        double f0 = (bent.F0Hz - m.Fit.F0Hz) / root3;
        double q = ((bent.Q / m.Fit.Q) - 1) / root3;
        if (m.Options.Law.Kind is not (DetectorKind.RmsLinear or DetectorKind.SquareLaw or DetectorKind.Mean or DetectorKind.Peak))
        {
            ResonanceFit shaped = m.Refit(raw =>
            {
                AmplitudePoint made = m.Maker.Make(raw);
                double shape = m.Options.Law.Shape;
                double ratio = m.Maker.Scale.Amplitude(raw.Mean, shape + m.Options.Law.ShapeUncertainty) / m.Maker.Scale.Amplitude(raw.Mean, shape);
                return made with { Amplitude = made.Amplitude * ratio };
            });
            f0 = Hypot(f0, shaped.F0Hz - m.Fit.F0Hz);
            q = Hypot(q, (shaped.Q / m.Fit.Q) - 1);
        }

        return new BudgetLine("detector law", Math.Abs(f0), Math.Abs(q), false, double.PositiveInfinity, read ? "ladder" : "never read: a bow of 1 % of the peak");
    }

    private static BudgetLine Prefactor(Measurement m, double root3)
    {
        ResonanceFit other = m.Refit(raw => m.Maker.Make(raw), m.Options.PrefactorExponent - 1);
        return new BudgetLine(
            "fit model", Math.Abs(other.F0Hz - m.Fit.F0Hz) / root3, Math.Abs((other.Q / m.Fit.Q) - 1) / root3, false, double.PositiveInfinity,
            "prefactor of loop and pickup within one power of f");
    }

    private static BudgetLine FeedThroughSlope(Measurement m)
    {
        // A feed-through that grows with f changes by the span's share of f0 over the points; where it bends the curve it
        // acts like that share of itself, unmodelled (small-b rule: half a bandwidth of f0 a unit, and as much of Q).
        double share = (m.FitPoints.Max(point => point.FrequencyHz) - m.FitPoints.Min(point => point.FrequencyHz)) / 2 / m.Fit.F0Hz;
        double change = m.Fit.FeedThrough.Ratio * share / Math.Sqrt(3);
        return new BudgetLine("feed-through", change * m.Fit.BandwidthHz / 2, change, false, double.PositiveInfinity, "not constant over the points");
    }

    private static BudgetLine Dwell(Measurement m)
    {
        double bias = Math.Exp(-m.Plan.DwellUs * 1e-6 / (m.Target.RingTimeS + m.Options.Law.TimeConstantS));
        return new BudgetLine("dwell", bias * m.Fit.BandwidthHz, bias, false, double.PositiveInfinity, "what is left of the ring");
    }

    /// <summary>
    /// Within one duty a wrong drive strength drops out. Against vernier settings it does not: it was measured, and what is
    /// left is its noise and the second order of the edges.
    /// </summary>
    private static BudgetLine DriveStrength(Measurement m, string term, double change, bool repeatability, string origin)
    {
        if (!m.Plan.UsesVernier)
        {
            return new BudgetLine(term, 0, 0, repeatability, double.PositiveInfinity, "one duty: the drive's strength drops out");
        }

        ResonanceFit other = ResonanceFitter.FitOnce(
            [.. m.FitPoints.Select(point => point.Group == 0 ? point with { DriveWeight = point.DriveWeight * (1 + change) } : point)], m.FitOptions);
        return new BudgetLine(
            term, Math.Abs(other.F0Hz - m.Fit.F0Hz), Math.Abs((other.Q / m.Fit.Q) - 1), repeatability, double.PositiveInfinity, origin);
    }

    /// <summary>
    /// At duty 1/2 an edge error of d periods leaves the n-th harmonic cos(n pi d) of its strength; at f0/n that is the same
    /// for every n. Where a ladder has measured the edges, its figure counts, else the stated bound.
    /// </summary>
    private static double EdgeShare(Measurement m)
    {
        DetectorLaw law = m.Options.Law;
        if (!(law.HighExtraUncertaintyS > 0))
        {
            return SecondOrderOfEdges;
        }

        double angle = Math.PI * m.Fit.F0Hz * (Math.Abs(law.HighExtraS) + law.HighExtraUncertaintyS);
        return angle * angle / 2;
    }

    private static string Measured(Measurement m) =>
        FormattableString.Invariant($"against the vernier settings, measured: {m.Edges.Factor:0.0000} of what the duty says");

    /// <summary>
    /// What a detector that does not respond to power makes of harmonics that reach it by feed-through. Relative error of
    /// Q for a feed-through b: peak 1.0 b at duty 1/2, mean 0.3 b, logarithm 0.7 b, a diode in between (computed for
    /// fifteen harmonics of flat feed-through; in hardware-notes).
    /// </summary>
    private static BudgetLine Harmonics(Measurement m)
    {
        double b = m.Fit.FeedThrough.Ratio;
        double slope = m.Options.Law.Kind switch
        {
            DetectorKind.Peak => 2.0,
            DetectorKind.Mean => 0.5,
            DetectorKind.LogOfWaveform => 1.2,
            _ => 1.0,
        };
        double seenF0 = m.OtherDutyFit.F0Hz - m.Fit.F0Hz;
        double seenQ = (m.OtherDutyFit.Q / m.Fit.Q) - 1;
        return new BudgetLine(
            "harmonics", Hypot(slope * b * m.Fit.BandwidthHz, seenF0), Hypot(slope * b, seenQ), false, double.PositiveInfinity,
            "the detector does not respond to power; two duties");
    }

    private static double Hypot(double a, double b) => double.Hypot(a, b);
}
