namespace Looseloop.Resonance;

/// <summary>
/// Nonlinear least squares by damped Gauss-Newton steps (K. Levenberg, Q. Appl. Math. 2 (1944) 164; D. W. Marquardt,
/// SIAM J. 11 (1963) 431), with the column scaling of J. J. More (1978) and the damping rule of H. B. Nielsen (1999).
/// A step along which the residuals curve too much is shortened (M. K. Transtrum and J. P. Sethna, arXiv 1201.5885 (2012)).
/// Steps are solved by orthogonal reflections, so the condition of the problem is not squared. All storage is taken at
/// construction: minimising allocates nothing. Not safe for use from several threads at once.
/// </summary>
public sealed partial class LevenbergMarquardt
{
    private const double MostDamping = 1e40;
    private const double SmallestGain = 1e-4;
    private const double SingularRatio = 1e-13;

    // The second directional derivative is taken over this part of a step, and may be so large against the first.
    private const double ProbePart = 0.1;
    private const double MostCurvature = 0.75;

    private readonly double[] _jacobian;
    private readonly double[] _residuals;
    private readonly double[] _trialResiduals;
    private readonly double[] _rotated;
    private readonly double[] _triangle;
    private readonly double[] _stacked;
    private readonly double[] _stackedRight;
    private readonly double[] _scale;
    private readonly double[] _columnNorm;
    private readonly double[] _step;
    private readonly double[] _bend;
    private readonly double[] _start;
    private readonly double[] _best;
    private readonly double[] _jacobianCopy;
    private readonly double[] _trial;
    private int _parameters;
    private int _residualCount;
    private double _damping;
    private double _growth;
    private int _evaluations;
    private bool _goodGuess;
    private bool _equalScale;

    /// <summary>Takes storage for problems up to a size.</summary>
    /// <param name="mostParameters">1 or more.</param>
    /// <param name="mostResiduals">1 or more.</param>
    public LevenbergMarquardt(int mostParameters, int mostResiduals)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(mostParameters, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(mostResiduals, 1);
        _jacobian = new double[mostParameters * mostResiduals];
        _residuals = new double[mostResiduals];
        _trialResiduals = new double[mostResiduals];
        _rotated = new double[mostResiduals];
        _triangle = new double[mostParameters * mostParameters];
        _stacked = new double[2 * mostParameters * mostParameters];
        _stackedRight = new double[2 * mostParameters];
        _scale = new double[mostParameters];
        _columnNorm = new double[mostParameters];
        _step = new double[mostParameters];
        _bend = new double[mostParameters];
        _start = new double[mostParameters];
        _best = new double[mostParameters];
        _jacobianCopy = new double[mostParameters * mostResiduals];
        _trial = new double[mostParameters];
    }

    /// <summary>The residuals at the minimum last found; valid until the next call.</summary>
    public ReadOnlySpan<double> Residuals => _residuals.AsSpan(0, _residualCount);

    /// <summary>Moves <paramref name="parameters"/> from a start to the nearest minimum.</summary>
    /// <param name="problem">At most as large as this object was made for.</param>
    /// <param name="parameters">The start; on return the best point found.</param>
    /// <param name="tolerance">Ends when the next step promises less than this part of the sum of squares.</param>
    /// <param name="mostIterations">Gives up after so many successful steps.</param>
    /// <param name="goodGuess">
    /// True for a start near the minimum: begins with little damping and does not look at the curvature along a step.
    /// </param>
    /// <exception cref="ArgumentException">The problem is larger than the storage, or has fewer residuals than parameters.</exception>
    public MinimiserResult Minimise<TProblem>(
        ref TProblem problem, Span<double> parameters, double tolerance = 1e-15, int mostIterations = 1000, bool goodGuess = false)
        where TProblem : ILeastSquaresProblem
    {
        Begin(problem.ParameterCount, problem.ResidualCount, goodGuess);
        Span<double> at = parameters[.._parameters];
        if (goodGuess)
        {
            return Descend(ref problem, at, tolerance, mostIterations);
        }

        // From far off, the scaling decides into which valley the path falls: Levenberg's, then Marquardt's; the lower end counts.
        at.CopyTo(_start);
        _equalScale = true;
        MinimiserResult first = Descend(ref problem, at, tolerance, mostIterations);
        at.CopyTo(_best);
        _start.AsSpan(0, _parameters).CopyTo(at);
        Begin(_parameters, _residualCount, goodGuess);
        MinimiserResult second = Descend(ref problem, at, tolerance, mostIterations);
        if (!(first.SumOfSquares < second.SumOfSquares))
        {
            return second with { Evaluations = first.Evaluations + second.Evaluations };
        }

        _best.AsSpan(0, _parameters).CopyTo(at);
        _evaluations = first.Evaluations + second.Evaluations + 1;
        problem.TryEvaluate(at, _residuals.AsSpan(0, _residualCount), _jacobian.AsSpan(0, _parameters * _residualCount));
        Factor();
        return first with { Evaluations = _evaluations };
    }

    /// <summary>
    /// The inverse of J'J at the minimum last found: the covariance of the parameters where the residuals are divided by their
    /// true standard deviations, else to be multiplied by the residuals' own variance.
    /// </summary>
    /// <param name="covariance">parameters * parameters elements, symmetric.</param>
    /// <returns>False where the data do not determine every parameter; the content is then not to be used.</returns>
    public bool TryCovariance(Span<double> covariance)
    {
        int n = _parameters;
        Span<double> inverse = _stacked.AsSpan(0, n * n);
        inverse.Clear();
        for (int j = 0; j < n; j++)
        {
            double diagonal = _triangle[(j * n) + j];
            if (!(Math.Abs(diagonal) > SingularRatio * _columnNorm[j]))
            {
                return false;
            }

            inverse[(j * n) + j] = 1 / diagonal;
            for (int i = j - 1; i >= 0; i--)
            {
                double sum = 0;
                for (int k = i + 1; k <= j; k++)
                {
                    sum += _triangle[(k * n) + i] * inverse[(j * n) + k];
                }

                inverse[(j * n) + i] = -sum / _triangle[(i * n) + i];
            }
        }

        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                double sum = 0;
                for (int k = i; k < n; k++)
                {
                    sum += inverse[(k * n) + i] * inverse[(k * n) + j];
                }

                covariance[(i * n) + j] = sum;
                covariance[(j * n) + i] = sum;
            }
        }

        return true;
    }

    private void Begin(int parameters, int residuals, bool goodGuess)
    {
        if (parameters > _step.Length || residuals > _residuals.Length || residuals < parameters)
        {
            throw new ArgumentException("The problem does not fit the minimiser's storage.");
        }

        _parameters = parameters;
        _residualCount = residuals;
        _goodGuess = goodGuess;
        _equalScale = false;
        _damping = goodGuess ? 1e-3 : 1;
        _growth = 2;
        _evaluations = 1;
        _scale.AsSpan().Clear();
    }

    private MinimiserResult Descend<TProblem>(ref TProblem problem, Span<double> at, double tolerance, int mostIterations)
        where TProblem : ILeastSquaresProblem
    {
        Span<double> residuals = _residuals.AsSpan(0, _residualCount);
        Span<double> jacobian = _jacobian.AsSpan(0, _parameters * _residualCount);
        if (!problem.TryEvaluate(at, residuals, jacobian))
        {
            return new MinimiserResult(MinimiserOutcome.BadStart, double.NaN, 0, 1);
        }

        double sum = Columns.Dot(residuals, residuals);
        if (!double.IsFinite(sum))
        {
            return new MinimiserResult(MinimiserOutcome.BadStart, double.NaN, 0, 1);
        }

        for (int iteration = 0; iteration < mostIterations; iteration++)
        {
            Factor();
            if (!TryImprove(ref problem, at, tolerance, ref sum, out bool last))
            {
                return new MinimiserResult(MinimiserOutcome.Converged, sum, iteration, _evaluations);
            }

            // The Jacobian belongs to the new point even when it is the last: the covariance is made from it.
            _evaluations++;
            if (!problem.TryEvaluate(at, residuals, jacobian))
            {
                return new MinimiserResult(MinimiserOutcome.BadStart, double.NaN, iteration, _evaluations);
            }

            if (last)
            {
                Factor();
                return new MinimiserResult(MinimiserOutcome.Converged, sum, iteration + 1, _evaluations);
            }
        }

        Factor();
        return new MinimiserResult(MinimiserOutcome.OutOfIterations, sum, mostIterations, _evaluations);
    }

    private void Factor()
    {
        int n = _parameters;
        int m = _residualCount;
        for (int j = 0; j < n; j++)
        {
            _columnNorm[j] = Columns.Norm(_jacobian.AsSpan(j * m, m));
            _scale[j] = _equalScale ? 1 : Math.Max(_scale[j], _columnNorm[j]);
        }

        if (!_goodGuess)
        {
            _jacobian.AsSpan(0, n * m).CopyTo(_jacobianCopy);
        }

        _residuals.AsSpan(0, m).CopyTo(_rotated);
        Householder.Reduce(_jacobian.AsSpan(0, n * m), m, n, _rotated.AsSpan(0, m));
        for (int j = 0; j < n; j++)
        {
            for (int i = 0; i < n; i++)
            {
                _triangle[(j * n) + i] = i <= j ? _jacobian[(j * m) + i] : 0;
            }
        }
    }
}
