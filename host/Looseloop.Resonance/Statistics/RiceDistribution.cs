namespace Looseloop.Resonance;

/// <summary>
/// The envelope of a sine of amplitude A in narrow-band noise of standard deviation s per quadrature (S. O. Rice, Bell Syst. Tech. J.
/// 24 (1945) 46): what noise before a detector does to its mean. Above A/s = 3 it is Gaussian for our purposes.
/// </summary>
public static class RiceDistribution
{
    /// <summary>Mean envelope: s sqrt(pi/2) L_1/2(-A^2 / 2 s^2).</summary>
    /// <param name="amplitude">A, not negative.</param>
    /// <param name="sigma">s, above 0.</param>
    public static double Mean(double amplitude, double sigma)
    {
        // L_1/2(-z) = exp(-z/2) [(1+z) I0(z/2) + z I1(z/2)], with I0, I1 averaged over the circle: no series, no overflow.
        double z = amplitude * amplitude / (2 * sigma * sigma);
        const int steps = 4096;
        double sum = 0;
        for (int i = 0; i < steps; i++)
        {
            double cosine = Math.Cos(Math.PI * (i + 0.5) / steps);
            sum += (1 + z + (z * cosine)) * Math.Exp(z / 2 * (cosine - 1));
        }

        return sigma * Math.Sqrt(Math.PI / 2) * sum / steps;
    }

    /// <summary>Standard deviation of the envelope: its mean square is A^2 + 2 s^2.</summary>
    public static double StandardDeviation(double amplitude, double sigma)
    {
        double mean = Mean(amplitude, sigma);
        return Math.Sqrt((amplitude * amplitude) + (2 * sigma * sigma) - (mean * mean));
    }
}
