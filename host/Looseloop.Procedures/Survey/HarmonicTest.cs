using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Survey;

/// <summary>
/// Which harmonic of the drive causes a response, from how its amplitude follows the duty.
/// </summary>
public static class HarmonicTest
{
    /// <summary>Relative error that detectors, edges and drift may put on a ratio.</summary>
    private const double Tolerance = 0.06;

    /// <summary>_orders that the two duties tell apart; higher odd ones look like 1 or 3 and are found by a look at n times f.</summary>
    private static readonly int[] _orders = [1, 3, 5, 2, 4];

    /// <summary>The ratio of amplitudes that the n-th harmonic makes at two settings of one frequency.</summary>
    public static double Ratio(int order, Setting low, Setting high) =>
        DutyHarmonics.Amplitude(order, low.Duty) / Math.Max(DutyHarmonics.Amplitude(order, high.Duty), 1e-3);

    /// <summary>The order whose ratio fits, or 0 if none does or more than one might.</summary>
    /// <param name="ratio">Amplitude at <paramref name="low"/> over that at <paramref name="high"/>.</param>
    /// <param name="uncertainty">Its standard uncertainty.</param>
    /// <param name="low">The setting near duty 1/5.</param>
    /// <param name="high">The setting near duty 1/2.</param>
    public static int Order(double ratio, double uncertainty, Setting low, Setting high)
    {
        int found = 0;
        foreach (int order in _orders)
        {
            double expected = Ratio(order, low, high);
            double allowance = Math.Sqrt((9 * uncertainty * uncertainty) + (Tolerance * Tolerance));

            // An even harmonic is all but absent at duty 1/2; there the ratio is only known to be large.
            bool even = order % 2 == 0;
            if (even ? ratio > 2 + allowance : Math.Abs(ratio - expected) < allowance)
            {
                if (found != 0)
                {
                    return even ? found : 0;
                }

                found = order;
            }
        }

        return found;
    }
}
