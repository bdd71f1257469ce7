namespace Looseloop.Resonance;

/// <summary>Extrapolates readings at several distances to no coupling; no distance has to be known, the amplitude tells it.</summary>
public static class StandoffRegression
{
    /// <summary>The abscissa of a reading: A/Q for a pickup, (A/Q)^2 for a loop.</summary>
    public static double Abscissa(in StandoffReading reading, StandoffMove moved)
    {
        double coupling = reading.PeakAmplitude / reading.Q;
        return moved == StandoffMove.Pickup ? coupling : coupling * coupling;
    }

    /// <summary>Extrapolates.</summary>
    /// <param name="readings">Two or more, at amplitudes that differ; a ratio of two or more is good.</param>
    /// <param name="moved">What was moved between them.</param>
    /// <param name="result">The coil without it.</param>
    /// <returns>False where the readings do not determine a line.</returns>
    public static bool TryExtrapolate(ReadOnlySpan<StandoffReading> readings, StandoffMove moved, out StandoffResult result)
    {
        result = default;
        int n = readings.Length;
        if (n < 2)
        {
            return false;
        }

        double[] x = new double[n];
        double[] f0 = new double[n];
        double[] f0Variance = new double[n];
        double[] inverseQ = new double[n];
        double[] inverseQVariance = new double[n];
        double referenceHz = readings[0].F0Hz;
        for (int i = 0; i < n; i++)
        {
            StandoffReading reading = readings[i];
            if (!(reading.PeakAmplitude > 0 && reading.F0Hz > 0 && reading.Q > 0 && reading.F0StandardHz > 0 && reading.QRelativeStandard > 0))
            {
                return false;
            }

            x[i] = Abscissa(reading, moved);
            f0[i] = reading.F0Hz - referenceHz;
            f0Variance[i] = reading.F0StandardHz * reading.F0StandardHz;
            inverseQ[i] = 1 / reading.Q;
            inverseQVariance[i] = Math.Pow(reading.QRelativeStandard / reading.Q, 2);
        }

        if (!WeightedLine.TryFit(x, f0, f0Variance, out WeightedLine frequency))
        {
            return false;
        }

        double loss;
        double lossStandard;
        double lossSlope = 0;
        double lossSlopeStandard = 0;
        double chi;
        int freedom;
        if (moved == StandoffMove.Loop)
        {
            if (!WeightedLine.TryFit(x, inverseQ, inverseQVariance, out WeightedLine line))
            {
                return false;
            }

            (loss, lossStandard, lossSlope, lossSlopeStandard) = (line.Intercept, line.InterceptStandard, line.Slope, line.SlopeStandard);
            (chi, freedom) = (line.ChiSquare, line.DegreesOfFreedom);
        }
        else
        {
            (loss, lossStandard, chi, freedom) = Mean(inverseQ, inverseQVariance);
        }

        result = new StandoffResult(
            referenceHz + frequency.Intercept, frequency.InterceptStandard, 1 / loss, lossStandard / loss, frequency.Slope,
            frequency.SlopeStandard, lossSlope, lossSlopeStandard, frequency.ChiSquare + chi, frequency.DegreesOfFreedom + freedom);
        return loss > 0;
    }

    private static (double Mean, double Standard, double ChiSquare, int Freedom) Mean(double[] values, double[] variances)
    {
        double weights = variances.Sum(variance => 1 / variance);
        double mean = values.Zip(variances, (value, variance) => value / variance).Sum() / weights;
        double chi = values.Zip(variances, (value, variance) => (value - mean) * (value - mean) / variance).Sum();
        return (mean, Math.Sqrt(1 / weights), chi, values.Length - 1);
    }
}
