using Looseloop.Readings;

namespace Looseloop.Procedures.Detector;

/// <summary>Counts to amplitude and back, by a detector's law.</summary>
public sealed class DetectorScale(DetectorLaw law)
{
    private const double DecibelsPerNeper = 8.685889638065035;

    public DetectorLaw Law => law;

    /// <summary>The amplitude of raw counts; negative below the pedestal where the law allows it, so that noise averages out.</summary>
    public double Amplitude(double rawCounts) => Amplitude(rawCounts, law.Shape);

    /// <summary>The amplitude that the law would give with another shape.</summary>
    public double Amplitude(double rawCounts, double shape)
    {
        double counts = rawCounts - law.PedestalCounts;
        double reference = law.ReferenceCounts;
        return law.Kind switch
        {
            DetectorKind.SquareLaw => Math.Sign(counts) * Math.Sqrt(Math.Abs(counts) * reference),
            DetectorKind.RmsLog or DetectorKind.LogOfWaveform => reference * Math.Exp((counts - reference) / shape / DecibelsPerNeper),
            DetectorKind.DiodeKnee => Math.Sign(counts) * DiodeAmplitude(Math.Abs(counts), shape) * reference / DiodeAmplitude(reference, shape),
            _ => counts,
        };
    }

    /// <summary>The raw counts of an amplitude of 0 or more.</summary>
    public double Counts(double amplitude)
    {
        double reference = law.ReferenceCounts;
        double counts = law.Kind switch
        {
            DetectorKind.SquareLaw => amplitude * amplitude / reference,
            DetectorKind.RmsLog or DetectorKind.LogOfWaveform => reference + (law.Shape * DecibelsPerNeper * Math.Log(Math.Max(amplitude, 1e-9) / reference)),
            DetectorKind.DiodeKnee => DiodeCounts(amplitude * DiodeAmplitude(reference, law.Shape) / reference, law.Shape),
            _ => amplitude,
        };
        return law.PedestalCounts + counts;
    }

    /// <summary>Amplitude per count at raw counts: what turns a variance of counts into one of amplitude.</summary>
    public double Slope(double rawCounts)
    {
        const double step = 0.5;
        if (law.Kind is DetectorKind.SquareLaw or DetectorKind.DiodeKnee)
        {
            // The slope has a pole at the pedestal; half a count above it is as near as a reading comes.
            double counts = Math.Max(rawCounts - law.PedestalCounts, 2 * step) + law.PedestalCounts;
            return (Amplitude(counts + step) - Amplitude(counts - step)) / (2 * step);
        }

        return (Amplitude(rawCounts + step) - Amplitude(rawCounts - step)) / (2 * step);
    }

    /// <summary>Diode output in counts: knee * ln I0(amplitude / knee), square law well below the knee and peak well above.</summary>
    internal static double DiodeCounts(double amplitude, double kneeCounts) => kneeCounts * LogI0(amplitude / kneeCounts);

    /// <summary>The inverse of <see cref="DiodeCounts"/> by Newton's method.</summary>
    internal static double DiodeAmplitude(double counts, double kneeCounts)
    {
        double target = counts / kneeCounts;
        double z = target < 1 ? 2 * Math.Sqrt(target) : target + (0.5 * Math.Log(2 * Math.PI * (target + 1)));
        for (int i = 0; i < 30 && target > 0; i++)
        {
            double step = (LogI0(z) - target) / RatioI1I0(z);
            z = Math.Max(z - step, z / 4);
            if (Math.Abs(step) < 1e-12 * z)
            {
                break;
            }
        }

        return z * kneeCounts;
    }

    /// <summary>ln of the modified Bessel function I0 (power series below 15, asymptotic series above; DLMF 10.25.2, 10.40.1).</summary>
    internal static double LogI0(double z) => z < 15 ? Math.Log(Series(z, 0)) : z - (0.5 * Math.Log(2 * Math.PI * z)) + Math.Log(Asymptotic(z, 0));

    private static double RatioI1I0(double z) => z < 15 ? z / 2 * Series(z, 1) / Series(z, 0) : Asymptotic(z, 4) / Asymptotic(z, 0);

    private static double Series(double z, int order)
    {
        double quarter = z * z / 4;
        double term = 1;
        double sum = 1;
        for (int k = 1; term > 1e-17 * sum; k++)
        {
            term *= quarter / (k * (double)(k + order));
            sum += term;
        }

        return sum;
    }

    private static double Asymptotic(double z, double fourNuSquared)
    {
        double term = 1;
        double sum = 1;
        for (int k = 1; k < 12; k++)
        {
            int odd = (2 * k) - 1;
            term *= -(fourNuSquared - (odd * odd)) / (k * 8 * z);
            sum += term;
        }

        return sum;
    }
}
