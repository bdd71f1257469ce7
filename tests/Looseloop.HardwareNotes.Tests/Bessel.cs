namespace Looseloop.HardwareNotes.Tests;

/// <summary>The modified Bessel function of order 0, by its power series (DLMF 10.25.2).</summary>
internal static class Bessel
{
    public static double I0(double x)
    {
        double sum = 1;
        double term = 1;
        for (int k = 1; term > 1e-17 * sum; k++)
        {
            term *= x * x / (4.0 * k * k);
            sum += term;
        }

        return sum;
    }
}
