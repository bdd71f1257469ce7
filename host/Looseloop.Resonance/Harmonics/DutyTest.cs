namespace Looseloop.Resonance;

/// <summary>
/// Which harmonic of the drive causes a response: every harmonic's amplitude follows the duty in its own way. From duty 1/2 to 1/5 the
/// fundamental falls to .5878, the third harmonic to .9511, the fifth to nothing; even harmonics appear that were not there.
/// </summary>
public static class DutyTest
{
    /// <summary>
    /// Even harmonics should vanish at duty 1/2 and do not quite, by the drive's edges: what is stronger than this at the other duty is
    /// theirs.
    /// </summary>
    private const double EvenFrom = 1.5;

    /// <summary>The harmonics of the drive that can ring a coil noticeably: the ninth looks like the first but is a ninth of it.</summary>
    private static readonly int[] _odd = [1, 3, 5, 7];

    /// <summary>Names the harmonics that explain a measured ratio of amplitudes.</summary>
    /// <param name="ratio">Amplitude at the test's duty over that at the reference duty, the zero taken off both.</param>
    /// <param name="ratioStandard">Its standard uncertainty.</param>
    /// <param name="duty">The true duty of the test, such as 51/256.</param>
    /// <param name="referenceDuty">The true reference duty, near 1/2.</param>
    /// <param name="modelTolerance">What the ratio may be off beside noise: edges, detector law, feed-through.</param>
    /// <param name="coverage">Standard uncertainties to either side.</param>
    /// <returns>
    /// The orders that fit, lowest first; 2 stands for all even ones. More than one distinct class, or none, means unknown.
    /// </returns>
    public static DutyTestResult Classify(
        double ratio, double ratioStandard, double duty, double referenceDuty, double modelTolerance = 0.04, double coverage = 3)
    {
        if (!(double.IsFinite(ratio) && ratioStandard >= 0 && duty is > 0 and < 1 && referenceDuty is > 0 and < 1))
        {
            return new DutyTestResult([]);
        }

        double reach = coverage * double.Hypot(ratioStandard, modelTolerance / coverage);
        var orders = new List<int>();
        foreach (int order in _odd)
        {
            if (DutyHarmonics.Amplitude(order, referenceDuty) > 0
                && Math.Abs(ratio - DutyHarmonics.Ratio(order, duty, referenceDuty)) <= reach)
            {
                orders.Add(order);
            }
        }

        if (ratio + reach > EvenFrom)
        {
            orders.Add(2);
            orders.Sort();
        }

        return new DutyTestResult(orders);
    }
}
