using Looseloop.Resonance;

namespace Looseloop.Procedures.Tracking;

/// <summary>
/// Finds f0, Q and scale of a held curve from a few points: the curve's exact shape is inverted (on a grid of some .75
/// bandwidths no approximation for small offsets would do), by a search over f0 and Gauss-Newton steps.
/// </summary>
public static class CurveInversion
{
    /// <summary>Q is held where the points leave it less certain than this, relative.</summary>
    public const double WorstQRelative = 0.03;

    private const int Steps = 40;

    /// <summary>Inverts.</summary>
    /// <param name="curve">The curve that is held.</param>
    /// <param name="points">Points with variances, at two settings or more.</param>
    /// <returns>Null where the points do not have the curve's shape near them.</returns>
    public static TrackedFit? Invert(HeldCurve curve, ReadOnlySpan<FitPoint> points)
    {
        if (points.Length < 2)
        {
            return null;
        }

        double[] start = Search(curve, points);
        if (points.Length >= 3 && Solve(curve, points, start, qIsFree: true) is { QIsHeld: false } free)
        {
            return free;
        }

        return Solve(curve, points, start, qIsFree: false);
    }

    // The scale is linear and drops out; a step of a tenth of a bandwidth cannot miss the valley of the right f0.
    private static double[] Search(HeldCurve curve, ReadOnlySpan<FitPoint> points)
    {
        double low = double.PositiveInfinity;
        double high = 0;
        foreach (FitPoint point in points)
        {
            low = Math.Min(low, point.FrequencyHz);
            high = Math.Max(high, point.FrequencyHz);
        }

        double bandwidth = curve.F0Hz / curve.Q;
        double best = double.PositiveInfinity;
        double[] start = [curve.F0Hz, curve.Q, 1];
        int count = (int)Math.Clamp(((high - low) / (0.1 * bandwidth)) + 21, 21, 2000);
        for (int i = 0; i < count; i++)
        {
            double f0 = low - bandwidth + ((high - low + (2 * bandwidth)) * i / (count - 1));
            double dot = 0;
            double norm = 0;
            double square = 0;
            foreach (FitPoint point in points)
            {
                double model = curve.Amplitude(point.FrequencyHz, f0, curve.Q, 1);
                dot += model * point.Amplitude / point.Variance;
                norm += model * model / point.Variance;
                square += point.Amplitude * point.Amplitude / point.Variance;
            }

            double left = square - (dot * dot / norm);
            if (dot > 0 && left < best)
            {
                best = left;
                start = [f0, curve.Q, dot / norm];
            }
        }

        return start;
    }

    private static TrackedFit? Solve(HeldCurve curve, ReadOnlySpan<FitPoint> points, double[] start, bool qIsFree)
    {
        int[] free = qIsFree ? [0, 1, 2] : [0, 2];
        double[] at = [.. start];
        double damping = 1e-6;
        double chi = Chi(curve, points, at);
        bool settled = false;
        for (int step = 0; step < Steps && !settled; step++)
        {
            (double[,] normal, double[] right, _) = Normal(curve, points, at, free);
            for (int i = 0; i < free.Length; i++)
            {
                normal[i, i] *= 1 + damping;
            }

            if (SymmetricMatrix.Inverse(normal) is not { } inverse)
            {
                return null;
            }

            double[] next = [.. at];
            double size = 0;
            for (int i = 0; i < free.Length; i++)
            {
                double move = 0;
                for (int j = 0; j < free.Length; j++)
                {
                    move += inverse[i, j] * right[j];
                }

                next[free[i]] += move;
                size = Math.Max(size, Math.Abs(move) / Unit(curve, at, free[i]));
            }

            double nextChi = next[1] > 1 && next[2] > 0 && next[0] > 0 ? Chi(curve, points, next) : double.PositiveInfinity;
            if (nextChi <= chi * (1 + 1e-12))
            {
                settled = size < 1e-9 || (chi - nextChi) < 1e-10 * (1 + chi);
                at = next;
                chi = nextChi;
                damping = Math.Max(damping / 10, 1e-12);
            }
            else
            {
                damping *= 20;
                if (damping > 1e8)
                {
                    return null;
                }
            }
        }

        return settled ? Describe(curve, points, at, free, chi) : null;
    }

    private static TrackedFit? Describe(HeldCurve curve, ReadOnlySpan<FitPoint> points, double[] at, int[] free, double chi)
    {
        (double[,] normal, _, double[,] held) = Normal(curve, points, at, free);
        if (SymmetricMatrix.Inverse(normal) is not { } covariance)
        {
            return null;
        }

        // What an error of the held terms makes of each free parameter: -(J'WJ)^-1 J'W dy/dheld.
        double[,] response = new double[free.Length, 2];
        for (int i = 0; i < free.Length; i++)
        {
            for (int h = 0; h < 2; h++)
            {
                for (int j = 0; j < free.Length; j++)
                {
                    response[i, h] -= covariance[i, j] * held[j, h];
                }
            }
        }

        (double Interference, double Constant) age = curve.VarianceOfAge(at[0]);
        int freedom = points.Length - free.Length;

        // A scatter beyond what the samples show (converter steps, a curve that is not quite the held one) widens the interval.
        double inflation = freedom > 0 ? Math.Max(1, chi / freedom) : 1;
        bool qIsFree = free.Length == 3;
        double qNoise = qIsFree ? Math.Sqrt(inflation * covariance[1, 1]) / at[1] : 0;
        double qHeld = qIsFree ? Math.Sqrt(HeldVariance(1)) / at[1] : 0;
        bool tooVague = qIsFree && !(double.Hypot(qNoise, qHeld) < WorstQRelative);
        double peak = at[2] * Math.Sqrt(curve.PeakPower) * at[1] / curve.Q;
        double sum = 0;
        foreach (FitPoint point in points)
        {
            double residual = point.Amplitude - curve.Amplitude(point.FrequencyHz, at[0], at[1], at[2]);
            sum += residual * residual;
        }

        return new TrackedFit(
            at[0], at[1], at[2], !qIsFree || tooVague, Math.Sqrt(inflation * covariance[0, 0]), qNoise, Math.Sqrt(HeldVariance(0)),
            qHeld, freedom > 0 ? Math.Sqrt(sum / freedom) / peak : 0, chi, freedom);

        double HeldVariance(int i)
        {
            double a = response[i, 0];
            double b = response[i, 1];
            double fitted = (a * a * curve.InterferenceVariance) + (2 * a * b * curve.HeldCovariance) + (b * b * curve.ConstantVariance);
            return Math.Max(0, fitted) + (a * a * age.Interference) + (b * b * age.Constant);
        }
    }

    private static (double[,] Normal, double[] Right, double[,] Held) Normal(
        HeldCurve curve, ReadOnlySpan<FitPoint> points, double[] at, int[] free)
    {
        const double HeldStep = 1e-5;
        double[,] normal = new double[free.Length, free.Length];
        double[] right = new double[free.Length];
        double[,] held = new double[free.Length, 2];
        double[] slope = new double[free.Length];
        foreach (FitPoint point in points)
        {
            double frequency = point.FrequencyHz;
            for (int i = 0; i < free.Length; i++)
            {
                int k = free[i];
                double middle = at[k];
                double step = 1e-4 * Unit(curve, at, k);
                at[k] = middle + step;
                double above = curve.Amplitude(frequency, at[0], at[1], at[2]);
                at[k] = middle - step;
                slope[i] = (above - curve.Amplitude(frequency, at[0], at[1], at[2])) / (2 * step);
                at[k] = middle;
            }

            double byInterference =
                (curve.Amplitude(frequency, at[0], at[1], at[2], curve.Interference + HeldStep, curve.Constant)
                    - curve.Amplitude(frequency, at[0], at[1], at[2], curve.Interference - HeldStep, curve.Constant)) / (2 * HeldStep);
            double byConstant =
                (curve.Amplitude(frequency, at[0], at[1], at[2], curve.Interference, curve.Constant + HeldStep)
                    - curve.Amplitude(frequency, at[0], at[1], at[2], curve.Interference, curve.Constant - HeldStep)) / (2 * HeldStep);
            double weight = 1 / point.Variance;
            double residual = point.Amplitude - curve.Amplitude(frequency, at[0], at[1], at[2]);
            for (int i = 0; i < free.Length; i++)
            {
                right[i] += slope[i] * weight * residual;
                held[i, 0] += slope[i] * weight * byInterference;
                held[i, 1] += slope[i] * weight * byConstant;
                for (int j = 0; j < free.Length; j++)
                {
                    normal[i, j] += slope[i] * weight * slope[j];
                }
            }
        }

        return (normal, right, held);
    }

    private static double Chi(HeldCurve curve, ReadOnlySpan<FitPoint> points, double[] at)
    {
        double sum = 0;
        foreach (FitPoint point in points)
        {
            double residual = point.Amplitude - curve.Amplitude(point.FrequencyHz, at[0], at[1], at[2]);
            sum += residual * residual / point.Variance;
        }

        return sum;
    }

    private static double Unit(HeldCurve curve, double[] at, int parameter) => parameter switch
    {
        0 => curve.F0Hz / curve.Q,
        1 => at[1],
        _ => at[2],
    };
}
