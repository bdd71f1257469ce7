namespace Looseloop.Bench.Detectors;

/// <summary>One pole, T y' = g - y, over a step in which g is a parabola: exact for that parabola whatever the step.</summary>
internal static class LowPass
{
    /// <summary>y at the end of the step.</summary>
    /// <param name="before">y at its begin.</param>
    /// <param name="first">g at its begin.</param>
    /// <param name="middle">g in its middle.</param>
    /// <param name="last">g at its end.</param>
    /// <param name="steps">Its length in time constants.</param>
    public static double Step(double before, double first, double middle, double last, double steps)
    {
        // Moments of z e^(-z (1 - s)) s^k over s = 0..1.
        double z = steps;
        double m0;
        double m1;
        double m2;
        if (z < 0.05)
        {
            m0 = z * (1 - (z / 2 * (1 - (z / 3 * (1 - (z / 4))))));
            m1 = z / 2 * (1 - (z / 3 * (1 - (z / 4 * (1 - (z / 5))))));
            m2 = z / 3 * (1 - (z / 4 * (1 - (z / 5 * (1 - (z / 6))))));
        }
        else
        {
            m0 = 1 - Math.Exp(-z);
            m1 = 1 - (m0 / z);
            m2 = 1 - (2 * m1 / z);
        }

        return (before * (1 - m0))
            + (first * (m0 - (3 * m1) + (2 * m2)))
            + (middle * 4 * (m1 - m2))
            + (last * ((2 * m2) - m1));
    }
}
