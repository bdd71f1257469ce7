namespace Looseloop.Resonance;

/// <content>One step: its damping, its curvature, and whether it is worth taking.</content>
public sealed partial class LevenbergMarquardt
{
    /// <summary>Tries steps of rising damping until one lowers the sum. False when none is worth taking.</summary>
    private bool TryImprove<TProblem>(
        ref TProblem problem, Span<double> at, double tolerance, ref double sum, out bool last)
        where TProblem : ILeastSquaresProblem
    {
        last = false;
        Span<double> trial = _trial.AsSpan(0, _parameters);
        Span<double> residuals = _trialResiduals.AsSpan(0, _residualCount);
        while (_damping < MostDamping)
        {
            double promised = DampedStep();
            if (!(promised > 0))
            {
                return false;
            }

            for (int j = 0; j < trial.Length; j++)
            {
                trial[j] = at[j] + _step[j];
            }

            if (!_goodGuess && CurvesTooMuch(ref problem, at, trial, residuals))
            {
                if (promised <= tolerance * sum || NegligibleStep(at))
                {
                    return false;
                }

                _damping *= _growth;
                _growth *= 2;
                continue;
            }

            _evaluations++;
            bool meaningful = problem.TryEvaluate(trial, residuals, []);
            double trialSum = meaningful ? Columns.Dot(residuals, residuals) : double.NaN;
            double gain = (sum - trialSum) / promised;
            bool negligible = promised <= tolerance * sum || NegligibleStep(at);
            if (gain > SmallestGain || (negligible && trialSum <= sum))
            {
                trial.CopyTo(at);
                sum = trialSum;
                double excess = (2 * gain) - 1;
                _damping *= Math.Max(1.0 / 3, 1 - (excess * excess * excess));
                _growth = 2;
                last = negligible;
                return true;
            }

            if (negligible)
            {
                return false;
            }

            _damping *= _growth;
            _growth *= 2;
        }

        return false;
    }

    /// <summary>
    /// Compares the second-order correction of the step, from the residuals' second derivative along it, with the step. Where it
    /// is small it is added to the trial; where not, the linear model does not reach that far.
    /// </summary>
    private bool CurvesTooMuch<TProblem>(ref TProblem problem, ReadOnlySpan<double> at, Span<double> trial, Span<double> scratch)
        where TProblem : ILeastSquaresProblem
    {
        int n = _parameters;
        int m = _residualCount;
        for (int j = 0; j < n; j++)
        {
            trial[j] = at[j] + (ProbePart * _step[j]);
        }

        _evaluations++;
        if (!problem.TryEvaluate(trial, scratch, []))
        {
            return true;
        }

        // scratch becomes the second derivative of the residuals along the step.
        Columns.AddMultiple(scratch, -1, _residuals.AsSpan(0, m));
        for (int j = 0; j < n; j++)
        {
            Columns.AddMultiple(scratch, -ProbePart * _step[j], _jacobianCopy.AsSpan(j * m, m));
        }

        Span<double> gradient = _bend.AsSpan(0, n);
        for (int j = 0; j < n; j++)
        {
            gradient[j] = -Columns.Dot(_jacobianCopy.AsSpan(j * m, m), scratch) / (ProbePart * ProbePart);
        }

        if (!TrySolveDamped(gradient))
        {
            return true;
        }

        double bend = 0;
        double length = 0;
        for (int j = 0; j < n; j++)
        {
            double scaledBend = _scale[j] * gradient[j];
            double scaledStep = _scale[j] * _step[j];
            bend += scaledBend * scaledBend;
            length += scaledStep * scaledStep;
            trial[j] = at[j] + _step[j] + gradient[j];
        }

        return !(4 * bend <= MostCurvature * MostCurvature * length);
    }

    /// <summary>Solves (J'J + damping) s = b with the factors of the last damped step, in place.</summary>
    private bool TrySolveDamped(Span<double> b)
    {
        int n = _parameters;
        int rows = 2 * n;
        for (int j = 0; j < n; j++)
        {
            double sum = b[j];
            for (int k = 0; k < j; k++)
            {
                sum -= _stacked[(j * rows) + k] * b[k];
            }

            double diagonal = _stacked[(j * rows) + j];
            if (diagonal == 0)
            {
                return false;
            }

            b[j] = sum / diagonal;
        }

        return Householder.TrySolveUpper(_stacked, rows, n, b, b);
    }

    /// <summary>Solves for the step at the present damping.</summary>
    /// <returns>The fall of the sum of squares that the linear model promises.</returns>
    private double DampedStep()
    {
        int n = _parameters;
        int rows = 2 * n;
        Span<double> stacked = _stacked.AsSpan(0, rows * n);
        Span<double> right = _stackedRight.AsSpan(0, rows);
        double root = Math.Sqrt(_damping);
        stacked.Clear();
        right.Clear();
        for (int j = 0; j < n; j++)
        {
            _triangle.AsSpan(j * n, j + 1).CopyTo(stacked.Slice(j * rows, j + 1));
            stacked[(j * rows) + n + j] = root * (_scale[j] > 0 ? _scale[j] : 1);
            right[j] = -_rotated[j];
        }

        Householder.Reduce(stacked, rows, n, right);
        if (!Householder.TrySolveUpper(stacked, rows, n, right, _step))
        {
            return double.NaN;
        }

        double promised = 0;
        for (int i = 0; i < n; i++)
        {
            double along = 0;
            for (int j = i; j < n; j++)
            {
                along += _triangle[(j * n) + i] * _step[j];
            }

            double scaled = _scale[i] * _step[i];
            promised += (along * along) + (2 * _damping * scaled * scaled);
        }

        return promised;
    }

    private bool NegligibleStep(ReadOnlySpan<double> at)
    {
        double step = 0;
        double length = 0;
        for (int j = 0; j < at.Length; j++)
        {
            double scaledStep = _scale[j] * _step[j];
            double scaledAt = _scale[j] * at[j];
            step += scaledStep * scaledStep;
            length += scaledAt * scaledAt;
        }

        return step <= 1e-30 * length;
    }
}
