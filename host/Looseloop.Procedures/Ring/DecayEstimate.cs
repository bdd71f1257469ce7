using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;
using Looseloop.Resonance;
using DecayOutcome = Looseloop.Resonance.RingOutcome;
using DecayResult = Looseloop.Resonance.RingResult;

namespace Looseloop.Procedures.Ring;

/// <summary>The ring time from samples of decays, with everything that the detector's law leaves uncertain.</summary>
public sealed class DecayEstimate(DetectorLaw law, Setting setting, DarkLevel dark)
{
    /// <summary>A declared time constant is taken as known to this part.</summary>
    private const double TimeConstantKnown = 0.2;

    private const double UnreadBow = 0.01;

    /// <summary>Levels below this many times a sample's noise are left out: the root of power is no longer Gaussian there.</summary>
    private const double LeastOverNoise = 6;

    private double DarkStandard => Math.Sqrt(dark.SampleVariance / dark.Samples) + 0.1;

    /// <summary>The samples of the part of the decay that stands out of the noise, in time from the stop.</summary>
    public IReadOnlyList<DecaySample> Usable(IReadOnlyList<DecaySample> samples, int fullCounts)
    {
        // By time, not by level: choosing samples by their own noisy level would lift the tail.
        double noise = Math.Sqrt(dark.SampleVariance);
        long end = long.MaxValue;
        foreach (DecaySample[] bin in samples.OrderBy(sample => sample.SinceStopUs).Chunk(12))
        {
            if (bin.Average(sample => sample.Counts) - dark.Mean < LeastOverNoise * noise)
            {
                end = bin[0].SinceStopUs;
                break;
            }
        }

        return [.. samples.Where(sample => sample.SinceStopUs < end && sample.Counts < 0.95 * fullCounts)];
    }

    /// <summary>The ring time with its uncertainty from noise and the detector's time constant.</summary>
    public DecayResult Plain(IReadOnlyList<DecaySample> samples) => Evaluate(samples, law, dark.Mean, 0);

    /// <summary>Relative standard uncertainty of the ring time by law, dark and what a later start says.</summary>
    public double Systematic(IReadOnlyList<DecaySample> samples, DecayResult plain)
    {
        double tau = plain.TauS;
        double Change(DecayResult other) => other.Outcome == DecayOutcome.Found ? (other.TauS / tau) - 1 : 0;
        double sum = Square(Change(Evaluate(samples, law, dark.Mean + DarkStandard, 0)));
        double bow = law.ReadOn is null ? UnreadBow : double.IsNaN(law.BowBound) ? UnreadBow / 5 : law.BowBound;
        sum += Square(Change(Evaluate(samples, law, dark.Mean, bow)) / Math.Sqrt(3));
        if (law.Kind is DetectorKind.RmsLinear or DetectorKind.Mean or DetectorKind.Peak or DetectorKind.DiodeKnee)
        {
            sum += Square(Change(Evaluate(samples, law with { PedestalCounts = law.PedestalCounts + law.PedestalUncertainty }, dark.Mean, 0)));
        }

        if (law.Kind is DetectorKind.RmsLog or DetectorKind.LogOfWaveform or DetectorKind.DiodeKnee)
        {
            sum += Square(Change(Evaluate(samples, law with { Shape = law.Shape + law.ShapeUncertainty }, dark.Mean, 0)));
        }

        // Overtones and the detector's memory are gone later on: what then reads otherwise beyond noise was theirs.
        double first = samples.Min(sample => sample.SinceStopUs);
        DecayResult late = Evaluate([.. samples.Where(sample => sample.SinceStopUs > first + (1e6 * tau))], law, dark.Mean, 0);
        double unexplained = Math.Max(Math.Abs(Change(late)) - (2 * late.QRelativeStandard), 0);
        return Math.Sqrt(sum + (late.Outcome == DecayOutcome.Found ? Square(unexplained) : 0));
    }

    private DecayResult Evaluate(IReadOnlyList<DecaySample> samples, DetectorLaw assumed, double darkCounts, double bow)
    {
        var maker = new AmplitudeMaker(new DetectorScale(assumed), darkCounts);
        var ring = new RingSample[samples.Count];
        double largest = 0;
        for (int i = 0; i < ring.Length; i++)
        {
            DecaySample sample = samples[i];
            AmplitudePoint made = maker.Make(
                new RawPoint(setting, 1, sample.Counts, null, sample.Counts, sample.Counts, sample.SinceStopUs), dark.SampleVariance);
            ring[i] = new RingSample(sample.SinceStopUs * 1e-6, made.Amplitude, made.Variance);
            largest = Math.Max(largest, made.Amplitude);
        }

        for (int i = 0; i < ring.Length && bow != 0; i++)
        {
            double share = ring[i].Level / largest;
            ring[i] = ring[i] with { Level = ring[i].Level + (4 * bow * largest * share * (1 - share)) };
        }

        RingDetector smooths = assumed.RespondsToPower ? RingDetector.Power : RingDetector.Amplitude;
        return RingDown.Evaluate(ring, smooths, assumed.TimeConstantS, TimeConstantKnown * assumed.TimeConstantS);
    }

    private static double Square(double x) => x * x;
}
