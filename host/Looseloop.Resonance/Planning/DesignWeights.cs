namespace Looseloop.Resonance;

/// <summary>
/// The best share of time for each candidate: the multiplicative algorithm for a weighted trace of the inverse information
/// (S. D. Silvey, D. M. Titterington and B. Torsney, Commun. Stat. A7 (1978) 1379), averaged over several guesses of f0 and Q.
/// </summary>
internal sealed class DesignWeights
{
    private const int Size = FisherInformation.Size;

    private readonly FisherInformation[] _draws;
    private readonly double[][] _gradients;
    private readonly double[][] _scales;
    private readonly double[] _gain;
    private readonly double _f0Weight;
    private readonly double _qWeight;

    public DesignWeights(IReadOnlyList<PlannedPoint> candidates, IReadOnlyList<CurveEstimate> draws, PlanRequest request)
    {
        Count = candidates.Count;
        Shares = new double[Count];
        _gain = new double[Count];
        _f0Weight = request.F0Weight;
        _qWeight = request.QWeight;
        _draws = [.. draws.Select(draw => new FisherInformation(draw, request.Noise))];
        _gradients = new double[draws.Count][];
        _scales = new double[draws.Count][];
        for (int d = 0; d < draws.Count; d++)
        {
            _gradients[d] = new double[Count * Size];
            _scales[d] = new double[Count];
            for (int i = 0; i < Count; i++)
            {
                PlannedPoint point = candidates[i];
                _scales[d][i] = _draws[d].Gradient(
                    point.FrequencyHz, point.Group, point.DriveWeight, ConstantPower(point, draws[d]),
                    _gradients[d].AsSpan(i * Size, Size));
            }
        }
    }

    public int Count { get; }

    /// <summary>Shares of the sampling time; their sum is 1, and 0 leaves a candidate out.</summary>
    public double[] Shares { get; }

    /// <summary>
    /// Feed-through power at a point: on a vernier setting it is the fundamental's that counts, and it is larger than the harmonic's.
    /// </summary>
    public static double ConstantPower(PlannedPoint point, in CurveEstimate curve)
    {
        double fundamental = DutyHarmonics.DriveWeight(1, point.Setting.Duty);
        return fundamental * fundamental * curve.ConstantPower;
    }

    /// <summary>Improves the shares.</summary>
    /// <returns>The criterion for one second of sampling per unit of share; infinite where the points do not determine f0 and Q.</returns>
    public double Improve(int turns)
    {
        double criterion = double.PositiveInfinity;
        for (int turn = 0; turn <= turns; turn++)
        {
            criterion = Evaluate();
            if (!double.IsFinite(criterion) || turn == turns)
            {
                break;
            }

            double sum = 0;
            double most = 0;
            for (int i = 0; i < Count; i++)
            {
                double relative = _gain[i] / criterion;
                most = Shares[i] > 0 ? Math.Max(most, relative) : most;
                Shares[i] *= Math.Sqrt(relative);
                sum += Shares[i];
            }

            for (int i = 0; i < Count; i++)
            {
                Shares[i] /= sum;
            }

            // Equivalence theorem: at the optimum no candidate gains more than the whole.
            if (most < 1.005)
            {
                break;
            }
        }

        return criterion;
    }

    private double Evaluate()
    {
        Span<double> matrix = stackalloc double[Size * Size];
        Span<double> byF0 = stackalloc double[Size];
        Span<double> byQ = stackalloc double[Size];
        Array.Clear(_gain);
        double criterion = 0;
        for (int d = 0; d < _draws.Length; d++)
        {
            matrix.Clear();
            for (int i = 0; i < Count; i++)
            {
                if (Shares[i] > 0)
                {
                    Accumulate(matrix, _gradients[d].AsSpan(i * Size, Size), Shares[i] * _scales[d][i]);
                }
            }

            _draws[d].Load(matrix);
            if (!_draws[d].TryFactor())
            {
                return double.PositiveInfinity;
            }

            byF0.Clear();
            byF0[0] = 1;
            _draws[d].Solve(byF0);
            byQ.Clear();
            byQ[1] = 1;
            _draws[d].Solve(byQ);
            criterion += ((_f0Weight * byF0[0]) + (_qWeight * byQ[1])) / _draws.Length;
            for (int i = 0; i < Count; i++)
            {
                ReadOnlySpan<double> gradient = _gradients[d].AsSpan(i * Size, Size);
                double f0 = Columns.Dot(gradient, byF0);
                double q = Columns.Dot(gradient, byQ);
                _gain[i] += _scales[d][i] * ((_f0Weight * f0 * f0) + (_qWeight * q * q)) / _draws.Length;
            }
        }

        return criterion;
    }

    private static void Accumulate(Span<double> matrix, ReadOnlySpan<double> gradient, double scale)
    {
        for (int i = 0; i < Size; i++)
        {
            double row = scale * gradient[i];
            for (int j = 0; row != 0 && j <= i; j++)
            {
                matrix[(i * Size) + j] += row * gradient[j];
            }
        }
    }
}
