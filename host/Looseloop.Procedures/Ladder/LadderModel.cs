using Looseloop.Procedures.Detector;
using Looseloop.Readings;

namespace Looseloop.Procedures.Ladder;

/// <summary>What is free in the description of a ladder.</summary>
/// <param name="LogAmplitude">Logarithm of the fundamental's amplitude at duty 1/2.</param>
/// <param name="DutyError">By how much every duty is longer than the timer makes it.</param>
/// <param name="Higher">Power of the answer to each harmonic above the fourth over that to the first, for equal drive; noise may make it negative.</param>
/// <param name="Second">The same of the second harmonic.</param>
/// <param name="Third">The same of the third.</param>
/// <param name="Fourth">The same of the fourth.</param>
/// <param name="Pedestal">Raw counts with nothing at the input.</param>
/// <param name="LogShape">Logarithm of the law's own figure.</param>
/// <param name="Bow">Bow of the range's middle, a share of the largest amplitude.</param>
internal readonly record struct LadderParameters(
    double LogAmplitude, double DutyError, double Higher, double Second, double Third, double Fourth, double Pedestal, double LogShape, double Bow);

/// <summary>
/// Raw counts of a rung. Harmonic n of a pulse train is in proportion to |sin(n pi D)| / n; the fundamental rules on
/// resonance, the others come by feed-through and overtones and add their powers. All powers together are pi^2 D (1 - D) / 2
/// in these units (Parseval's theorem), so that the many above the fourth need no sum. Noise and carriers add the dark's power.
/// </summary>
internal static class LadderModel
{
    /// <summary>Power over the fundamental's at duty 1/2.</summary>
    /// <param name="duty">True duty of the timer.</param>
    /// <param name="p">What is free.</param>
    public static double PowerShare(double duty, in LadderParameters p)
    {
        double high = Math.Clamp(duty + p.DutyError, 1e-6, 1 - 1e-6);
        double first = Harmonic(1, high);
        double second = Harmonic(2, high);
        double third = Harmonic(3, high);
        double fourth = Harmonic(4, high);
        double higher = (Math.PI * Math.PI * high * (1 - high) / 2) - first - second - third - fourth;
        return first + (p.Second * second) + (p.Third * third) + (p.Fourth * fourth) + (p.Higher * higher);
    }

    private static double Harmonic(int order, double high)
    {
        double sine = Math.Sin(order * Math.PI * high) / order;
        return sine * sine;
    }

    /// <summary>Fills the raw counts of every rung.</summary>
    /// <param name="law">The law's kind; its pedestal and shape are replaced.</param>
    /// <param name="p">What is free.</param>
    /// <param name="points">The rungs.</param>
    /// <param name="darkCounts">Raw counts with the drive off.</param>
    /// <param name="counts">Filled.</param>
    public static void Counts(DetectorLaw law, in LadderParameters p, IReadOnlyList<RawPoint> points, double darkCounts, Span<double> counts)
    {
        var scale = new DetectorScale(law with { PedestalCounts = p.Pedestal, Shape = Math.Exp(p.LogShape) });
        double largest = Math.Exp(p.LogAmplitude);
        double dark = scale.Amplitude(darkCounts);
        double darkPower = dark * Math.Abs(dark);
        for (int i = 0; i < points.Count; i++)
        {
            double power = (largest * largest * PowerShare(points[i].Setting.Duty, p)) + darkPower;
            double amplitude = Math.Sqrt(Math.Max(power, 0));
            double share = amplitude / largest;
            counts[i] = scale.Counts(Math.Max(amplitude + (4 * p.Bow * largest * share * (1 - share)), 0));
        }
    }
}
