namespace Looseloop.Drift;

/// <summary>
/// Allan deviations of equally spaced phase data, with the formulas of W. J. Riley, Handbook of Frequency Stability
/// Analysis, NIST Special Publication 1065 (2008), section 5.2. Phase x is the running sum of fractional frequency times the
/// spacing; N phase points stand for N - 1 frequencies. Every function takes time of order N and returns NaN where the data
/// are too few for the averaging factor.
/// </summary>
public static class AllanDeviation
{
    /// <summary>Phase from fractional frequencies: one point more than frequencies, the first is zero; seconds.</summary>
    public static double[] Phase(ReadOnlySpan<double> fractional, double spacingS)
    {
        double[] phase = new double[fractional.Length + 1];
        double sum = 0;
        for (int i = 0; i < fractional.Length; i++)
        {
            sum += fractional[i];
            phase[i + 1] = sum * spacingS;
        }

        return phase;
    }

    /// <summary>The plain Allan deviation: neighbouring averages that do not overlap.</summary>
    public static double Plain(ReadOnlySpan<double> phase, int factor, double spacingS) => Strided(phase, factor, factor, spacingS);

    /// <summary>The overlapping Allan deviation: every pair of neighbouring averages.</summary>
    public static double Overlapping(ReadOnlySpan<double> phase, int factor, double spacingS) => Strided(phase, factor, 1, spacingS);

    /// <summary>The modified Allan deviation, which tells white from flicker phase noise.</summary>
    public static double Modified(ReadOnlySpan<double> phase, int factor, double spacingS)
    {
        Check(factor, spacingS);
        int terms = phase.Length - (3 * factor) + 1;
        if (terms < 1)
        {
            return double.NaN;
        }

        double window = 0;
        for (int i = 0; i < factor; i++)
        {
            window += phase[i + (2 * factor)] - (2 * phase[i + factor]) + phase[i];
        }

        double sum = window * window;
        for (int j = 1; j < terms; j++)
        {
            // The window moves by one: third differences enter, nothing is summed anew.
            window += phase[j - 1 + (3 * factor)] - (3 * phase[j - 1 + (2 * factor)]) + (3 * phase[j - 1 + factor]) - phase[j - 1];
            sum += window * window;
        }

        double averageS = factor * spacingS;
        return Math.Sqrt(sum / terms / 2) / (factor * averageS);
    }

    /// <summary>The total deviation: the data are continued by reflection at both ends, which steadies long averages.</summary>
    public static double Total(ReadOnlySpan<double> phase, int factor, double spacingS)
    {
        Check(factor, spacingS);
        int n = phase.Length;
        if (n < 3 || factor > n - 1)
        {
            return double.NaN;
        }

        double sum = 0;
        for (int i = 1; i < n - 1; i++)
        {
            int before = i - factor;
            int after = i + factor;
            double left = before >= 0 ? phase[before] : (2 * phase[0]) - phase[-before];
            double right = after < n ? phase[after] : (2 * phase[n - 1]) - phase[(2 * (n - 1)) - after];
            double second = left - (2 * phase[i]) + right;
            sum += second * second;
        }

        return Math.Sqrt(sum / (2 * (n - 2))) / (factor * spacingS);
    }

    private static double Strided(ReadOnlySpan<double> phase, int factor, int stride, double spacingS)
    {
        Check(factor, spacingS);
        double sum = 0;
        int terms = 0;
        for (int j = 0; j + (2 * factor) < phase.Length; j += stride)
        {
            double second = phase[j + (2 * factor)] - (2 * phase[j + factor]) + phase[j];
            sum += second * second;
            terms++;
        }

        return terms == 0 ? double.NaN : Math.Sqrt(sum / (2.0 * terms)) / (factor * spacingS);
    }

    private static void Check(int factor, double spacingS)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(factor, 1);
        if (!(spacingS > 0))
        {
            throw new ArgumentOutOfRangeException(nameof(spacingS), spacingS, "the spacing must be above zero");
        }
    }
}
