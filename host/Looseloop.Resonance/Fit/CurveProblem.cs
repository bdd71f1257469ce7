namespace Looseloop.Resonance;

/// <summary>
/// The full problem: parameters f0, Q, P and, with feed-through, n1 and one constant per group; residuals in amplitude (in power
/// where a point says so) over their standard deviations.
/// </summary>
internal sealed class CurveProblem(FitData data) : ILeastSquaresProblem
{
    public int ParameterCount => data.ParameterCount;

    public int ResidualCount => data.Count;

    public bool TryEvaluate(ReadOnlySpan<double> parameters, Span<double> residuals, Span<double> jacobian)
    {
        double f0 = parameters[0];
        double q = parameters[1];
        double peak = parameters[2];
        bool background = data.Background == BackgroundModel.FeedThrough;
        double interference = background ? parameters[3] : 0;
        if (!(f0 > 0 && q > 0))
        {
            return false;
        }

        int count = data.Count;
        bool derivatives = !jacobian.IsEmpty;
        if (derivatives && background)
        {
            jacobian[(4 * count)..].Clear();
        }

        for (int i = 0; i < count; i++)
        {
            double ratio = data.FrequencyHz[i] / f0;
            double inverseRatio = 1 / ratio;
            double x = q * (ratio - inverseRatio);
            double bell = 1 / (1 + (x * x));
            double shape = data.Drive2[i] * bell;
            double constant = background ? parameters[4 + data.Group[i]] : 0;
            double top = peak + (interference * x);
            double power = (top * shape) + constant;

            double value = power;
            double slope = 1;
            if (!data.InPower[i])
            {
                double knee = data.Linear[i];
                double root = Math.Sqrt(Math.Max(power, knee));
                slope = 0.5 / root;
                value = power >= knee ? root : (knee + power) * slope;
            }

            double weight = data.InverseSigma[i] * data.RobustRoot[i];
            residuals[i] = (value - data.Target[i]) * weight;
            if (!derivatives)
            {
                continue;
            }

            slope *= weight;
            double byX = slope * shape * (interference - (2 * x * top * bell));
            jacobian[i] = -byX * q * (ratio + inverseRatio) / f0;
            jacobian[count + i] = byX * x / q;
            jacobian[(2 * count) + i] = slope * shape;
            if (background)
            {
                jacobian[(3 * count) + i] = slope * shape * x;
                jacobian[((4 + data.Group[i]) * count) + i] = slope;
            }
        }

        return true;
    }
}
