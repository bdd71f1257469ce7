namespace Looseloop.Resonance;

/// <summary>
/// Two exponentials through the samples of a decay. Parameters: ln tau; the detector's time constant in standard uncertainties from the
/// figure given, with that figure as one residual more; the two amplitudes over the largest level (squared for power).
/// </summary>
internal sealed class DecayProblem(
    RingSample[] samples, double firstS, double largest, RingDetector detector, double detectorTimeS, double detectorTimeStandardS)
    : ILeastSquaresProblem
{
    public int ParameterCount => 4;

    public int ResidualCount => samples.Length + 1;

    public double DetectorTimeS(double offset) => detectorTimeS + (offset * detectorTimeStandardS);

    public bool TryEvaluate(ReadOnlySpan<double> parameters, Span<double> residuals, Span<double> jacobian)
    {
        int rows = ResidualCount;
        double tau = Math.Exp(parameters[0]);
        double lag = DetectorTimeS(parameters[1]);
        bool power = detector == RingDetector.Power;
        double rate = power ? 2 : 1;
        if (!(tau > 0 && double.IsFinite(tau) && lag >= 0))
        {
            return false;
        }

        for (int i = 0; i < samples.Length; i++)
        {
            double t = samples[i].TimeS - firstS;
            double ring = Math.Exp(-rate * t / tau);

            // A detector without lag has forgotten everything but the ring; its exponential then is a spike at the first sample.
            double memory = lag > 0 ? Math.Exp(-t / lag) : t == 0 ? 1 : 0;
            double sum = (parameters[2] * ring) + (parameters[3] * memory);
            double sigma = Math.Sqrt(samples[i].Variance);
            double value = sum;
            double slope = 1;
            if (power)
            {
                double knee = 0.0625 * samples[i].Variance / (largest * largest);
                double root = Math.Sqrt(Math.Max(sum, knee));
                slope = 0.5 / root;
                value = sum >= knee ? root : (knee + sum) * slope;
            }

            residuals[i] = ((value * largest) - samples[i].Level) / sigma;
            if (jacobian.IsEmpty)
            {
                continue;
            }

            slope *= largest / sigma;
            jacobian[i] = slope * parameters[2] * ring * rate * t / tau;
            jacobian[rows + i] = lag > 0 ? slope * parameters[3] * memory * t / (lag * lag) * detectorTimeStandardS : 0;
            jacobian[(2 * rows) + i] = slope * ring;
            jacobian[(3 * rows) + i] = slope * memory;
        }

        residuals[^1] = parameters[1];
        for (int j = 0; j < 4 && !jacobian.IsEmpty; j++)
        {
            jacobian[(j * rows) + rows - 1] = j == 1 ? 1 : 0;
        }

        return true;
    }
}
