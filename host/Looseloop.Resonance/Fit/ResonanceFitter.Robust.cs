namespace Looseloop.Resonance;

/// <content>The robust way: points that stray lose weight, and ends are compared by the median residual.</content>
public sealed partial class ResonanceFitter
{
    private const int StartReweightings = 5;
    private const int MostReweightings = 30;
    private const int StartIterations = 8;

    /// <summary>
    /// Descends from every start with Huber's loss; the end whose median residual is the smallest is kept. A sum of squares would
    /// prefer a curve through the largest spark.
    /// </summary>
    /// <returns>A stand-in for the sum of squares: freedom times the squared scale of the kept end.</returns>
    private double RunRobustStarts(double lowest = double.PositiveInfinity)
    {
        if (double.IsPositiveInfinity(lowest))
        {
            Array.Fill(_best, double.NaN);
        }

        Span<double> root = _data.RobustRoot.AsSpan(0, _data.Count);
        int freedom = Math.Max(_data.Count - _data.ParameterCount, 1);
        for (int s = 0; s < _startCount; s++)
        {
            _parameters[0] = _starts[s].F0Hz;
            _parameters[1] = _starts[s].Q;
            root.Fill(1);
            _projected.TryEvaluate(_parameters.AsSpan(0, 2), _scratch.AsSpan(0, _data.Count), []);
            _projected.Coefficients.CopyTo(_parameters.AsSpan(2));
            Minimise(_parameters, 0);
            for (int turn = 0; turn < StartReweightings; turn++)
            {
                SetWeights(RobustLoss.Huber, RawScale(root), root);
                Minimise(_parameters, StartIterations);
            }

            double scale = MedianScale(root);
            if (scale * scale * freedom < lowest)
            {
                lowest = scale * scale * freedom;
                _parameters.CopyTo(_best, 0);
            }

            if (!IsPoor(lowest))
            {
                break;
            }
        }

        return lowest;
    }

    /// <summary>
    /// Iterated reweighting from the kept end, Huber's loss first. Returns the factor on the covariance: scale^2 times
    /// mean psi^2 / (mean psi')^2 (P. J. Huber, Robust Statistics, 1981, 7.6).
    /// </summary>
    private double FinishRobust(RobustLoss loss, out double sum, out double scale)
    {
        Span<double> root = _data.RobustRoot.AsSpan(0, _data.Count);
        root.Fill(1);
        sum = Minimise(_best, 0);
        double previousHz = double.NaN;
        RobustLoss current = RobustLoss.Huber;
        for (int turn = 0; turn < MostReweightings; turn++)
        {
            SetWeights(current, RawScale(root), root);
            sum = Minimise(_best);
            bool settled = Math.Abs(_best[0] - previousHz) < 1e-7 * _best[0] / _best[1];
            previousHz = _best[0];
            if (settled && current == loss)
            {
                break;
            }

            if (settled || turn == StartReweightings)
            {
                current = loss;
            }
        }

        scale = RawScale(root);
        double psi2 = 0;
        double slope = 0;
        double weights = 0;
        for (int i = 0; i < root.Length; i++)
        {
            double r = _scratch[i] / scale;
            double weight = RobustWeights.Weight(loss, r);
            weights += weight;
            psi2 += weight * weight * r * r;
            slope += RobustWeights.PsiSlope(loss, r);
        }

        // The minimiser's covariance has the mean weight in it once; the sandwich wants the mean slope twice.
        double count = root.Length;
        double freedom = Math.Max(count - _data.ParameterCount, 1);
        return scale * scale * psi2 / freedom / (slope / count) / (slope / count) * (weights / count);
    }

    private void SetWeights(RobustLoss loss, double scale, Span<double> root)
    {
        for (int i = 0; i < root.Length; i++)
        {
            // Never quite nothing: the residual of a silenced point is still read back, so that it may return.
            root[i] = Math.Sqrt(Math.Max(RobustWeights.Weight(loss, _scratch[i] / scale), 1e-10));
        }
    }

    /// <summary>The scale that weights are made with: not below the stated noise.</summary>
    private double RawScale(Span<double> root) => Math.Max(MedianScale(root), _data.VariancesStated ? 1 : 1e-9);

    /// <summary>Leaves the residuals without their robust weights in the scratch, and gives their scale by the median.</summary>
    private double MedianScale(Span<double> root)
    {
        ReadOnlySpan<double> residuals = _minimiser.Residuals;
        Span<double> sizes = _data.Keys.AsSpan(0, root.Length);
        for (int i = 0; i < root.Length; i++)
        {
            _scratch[i] = residuals[i] / root[i];
            sizes[i] = Math.Abs(_scratch[i]);
        }

        return RobustWeights.Scale(sizes, _data.ParameterCount);
    }
}
