using Looseloop.Drift;

namespace Looseloop.Procedures.Clock;

/// <summary>How much faster one clock runs than another, from pairs of their times.</summary>
/// <param name="Ppm">The board's clock against the host's, parts per million.</param>
/// <param name="UncertaintyPpm">Standard uncertainty by the scatter, parts per million.</param>
/// <param name="Used">Pairs that the line rests on.</param>
/// <param name="Left">Pairs left out: slow answers, and outliers.</param>
public sealed record ClockRegression(double Ppm, double UncertaintyPpm, int Used, int Left)
{
    private const int LeastPairs = 20;

    /// <summary>The quickest answers have the least time to be held up.</summary>
    private const double ShareKept = 0.7;

    /// <summary>Residuals beyond this many standard deviations (by the median's, 1.4826 MAD) are outliers.</summary>
    private const double Outlier = 4;
    private const double Mad = 1.4826;
    private const int Rounds = 10;

    /// <summary>A straight line through the difference of the clocks.</summary>
    /// <returns>The line, or null where there are too few pairs.</returns>
    public static ClockRegression? Of(IReadOnlyList<ClockPair> pairs)
    {
        if (pairs.Count < LeastPairs)
        {
            return null;
        }

        // The difference, not the board's time: a slope of a few millionths on a slope of one would lose its digits.
        double host = pairs[0].HostS;
        double board = pairs[0].BoardS;
        ClockPair[] kept = [.. pairs.OrderBy(pair => pair.RoundTripS).Take((int)Math.Ceiling(ShareKept * pairs.Count)).OrderBy(pair => pair.HostS)];
        for (int round = 0; ; round++)
        {
            double[] x = [.. kept.Select(pair => pair.HostS - host)];
            double[] y = [.. kept.Select(pair => pair.BoardS - board - (pair.HostS - host))];
            double[] ones = new double[x.Length];
            Array.Fill(ones, 1);
            WeightedLine line = WeightedLine.Fit(x, y, ones, trustStated: false);
            double[] strays = [.. x.Select((at, i) => Math.Abs(y[i] - line.At(at)))];
            double limit = Outlier * Math.Max(Mad * Median(strays), 1e-6);
            ClockPair[] left = [.. kept.Where((_, i) => strays[i] <= limit)];
            if (left.Length == kept.Length || left.Length < LeastPairs / 2 || round == Rounds)
            {
                return new ClockRegression(1e6 * line.Slope, 1e6 * line.SlopeStandard, kept.Length, pairs.Count - kept.Length);
            }

            kept = left;
        }
    }

    private static double Median(double[] values)
    {
        double[] sorted = [.. values.Order()];
        return sorted[sorted.Length / 2];
    }
}
