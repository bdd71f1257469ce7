namespace Looseloop.Resonance;

/// <summary>
/// Fits the power-invariant resonance curve (see <see cref="BackgroundModel"/>) to points. f0 and Q are found first with all linear
/// parameters projected out, from several starts; then all parameters together, with residuals in amplitude, for the exact
/// minimum and covariance. All storage is taken at construction: a fit allocates nothing. One fitter per thread.
/// </summary>
public sealed partial class ResonanceFitter
{
    /// <summary>Groups of points with a constant of their own: plain points and up to three harmonics.</summary>
    public const int MostGroups = 4;

    private const int MostParameters = 4 + MostGroups;
    private const int MostStarts = 6;

    /// <summary>Starts that least squares descends from, unless the first leads to a good end.</summary>
    private const int PlainStarts = 2;
    private const double ProjectionTolerance = 1e-6;
    private const double CurveTolerance = 1e-12;

    /// <summary>Below this the points do not speak for a resonance; pure noise reaches some 20 at best.</summary>
    private const double LeastEvidence = 40;

    /// <summary>A sum of squares per degree of freedom, and a residual over the peak, that ask for a search of the whole range.</summary>
    private const double PoorChiSquare = 4;
    private const double PoorResidual = 0.03;

    private readonly FitData _data;
    private readonly CurveProblem _curve;
    private readonly ProjectedProblem _projected;
    private readonly LevenbergMarquardt _minimiser;
    private readonly double[] _scratch;
    private readonly double[] _parameters = new double[MostParameters];
    private readonly double[] _best = new double[MostParameters];
    private readonly double[] _covariance = new double[MostParameters * MostParameters];
    private readonly (double Cost, double F0Hz, double Q)[] _starts = new (double, double, double)[MostStarts];
    private int _startCount;
    private int _iterations;

    /// <summary>Takes storage.</summary>
    /// <param name="mostPoints">Points of the largest fit, 1 or more.</param>
    public ResonanceFitter(int mostPoints = 1024)
    {
        int points = Math.Max(mostPoints, MostParameters);
        _data = new FitData(points);
        _curve = new CurveProblem(_data);
        _projected = new ProjectedProblem(_data, points);
        _minimiser = new LevenbergMarquardt(MostParameters, points);
        _scratch = new double[points];
        MostPoints = points;
    }

    /// <summary>Points that the storage holds.</summary>
    public int MostPoints { get; }

    /// <summary>
    /// Residuals of the last fit over their standard deviations (over the scatter where none were stated), (curve - point), in the
    /// order of the points; valid until the next fit, and only after a fit that found a curve.
    /// </summary>
    public ReadOnlySpan<double> NormalizedResiduals => _scratch.AsSpan(0, _data.Count);

    /// <summary>Constant powers of the groups of the last fit, as driven, in rising order of the groups that were used.</summary>
    public ReadOnlySpan<double> ConstantPowers =>
        _data.Background == BackgroundModel.None ? [] : _best.AsSpan(4, _data.GroupCount);

    /// <summary>One fit with storage of its own; where many are made, keep a <see cref="ResonanceFitter"/>.</summary>
    public static ResonanceFit FitOnce(ReadOnlySpan<FitPoint> points, in FitOptions options) =>
        new ResonanceFitter(points.Length).Fit(points, options);

    /// <summary>Fits; see <see cref="ResonanceFit.Outcome"/> before using a figure. Bad points make an outcome, never an exception.</summary>
    /// <param name="points">In any order, frequencies may repeat.</param>
    /// <param name="options">What is declared rather than found.</param>
    /// <exception cref="ArgumentException">More points than the storage holds.</exception>
    public ResonanceFit Fit(ReadOnlySpan<FitPoint> points, in FitOptions options)
    {
        if (points.Length > MostPoints)
        {
            throw new ArgumentException("More points than the fitter was made for.", nameof(points));
        }

        FitOutcome loaded = _data.Load(points, options);
        if (loaded != FitOutcome.Fitted)
        {
            return new ResonanceFit { Outcome = loaded };
        }

        _iterations = 0;
        CollectStarts(options);
        bool robust = options.Loss != RobustLoss.None;
        double sum = robust ? RunRobustStarts() : RunStarts();
        if (IsPoor(sum))
        {
            _startCount = 0;
            Search();
            _ = robust ? RunRobustStarts(sum) : RunStarts(sum);
        }

        if (!double.IsFinite(_best[0]))
        {
            return new ResonanceFit { Outcome = FitOutcome.NoPeak };
        }

        double robustScale = 1;
        double inflation = robust ? FinishRobust(options.Loss, out sum, out robustScale) : 1;
        if (!robust)
        {
            sum = Minimise(_best);
        }

        return FitSummary.Make(
            _data, _best, _minimiser.TryCovariance(_covariance), _covariance, sum, inflation, robustScale, _iterations, _scratch, options,
            LeastEvidence, _minimiser.Residuals);
    }

    private void CollectStarts(in FitOptions options)
    {
        _startCount = 0;
        if (options.F0GuessHz > 0)
        {
            AddStart(options.F0GuessHz, options.QGuess > 0 ? options.QGuess : 100);
        }

        if (FirstGuess.TryLinear(_data, out double f0, out double q))
        {
            AddStart(f0, q);
        }

        if (FirstGuess.TryTop(_data, false, out f0, out q))
        {
            AddStart(f0, q);
            AddStart(f0, q * 2.5);
        }

        if (FirstGuess.TryTop(_data, true, out f0, out q))
        {
            AddStart(f0, q);
        }
    }

    /// <summary>Every neighbourhood of the points and a range of widths, where the plain starts have led nowhere.</summary>
    private void Search()
    {
        double spanHz = _data.HighestHz - _data.LowestHz;
        double stepHz = spanHz / 24;
        for (double widthHz = spanHz; widthHz > spanHz / 200; widthHz *= 0.5)
        {
            for (double f0 = _data.LowestHz; f0 <= _data.HighestHz; f0 += stepHz)
            {
                AddStart(f0, f0 / widthHz);
            }
        }
    }

    private void AddStart(double f0, double q)
    {
        Span<double> at = [f0, q];
        Span<double> residuals = _scratch.AsSpan(0, _data.Count);
        if (!_projected.TryEvaluate(at, residuals, []))
        {
            return;
        }

        double cost = Columns.Dot(residuals, residuals);
        if (!double.IsFinite(cost) || (_startCount == MostStarts && cost >= _starts[MostStarts - 1].Cost))
        {
            return;
        }

        // Kept in order of cost.
        int place = Math.Min(_startCount, MostStarts - 1);
        while (place > 0 && _starts[place - 1].Cost > cost)
        {
            _starts[place] = _starts[place - 1];
            place--;
        }

        _starts[place] = (cost, f0, q);
        _startCount = Math.Min(_startCount + 1, MostStarts);
    }

    /// <summary>Descends from the best starts; leaves the lowest end in the best parameters.</summary>
    private double RunStarts(double lowest = double.PositiveInfinity)
    {
        if (double.IsPositiveInfinity(lowest))
        {
            Array.Fill(_best, double.NaN);
        }

        for (int s = 0; s < _startCount && s < PlainStarts; s++)
        {
            _parameters[0] = _starts[s].F0Hz;
            _parameters[1] = _starts[s].Q;
            ProjectedProblem projected = _projected;
            MinimiserResult result = _minimiser.Minimise(ref projected, _parameters.AsSpan(0, 2), ProjectionTolerance, 40, true);
            _iterations += result.Iterations;
            if (result.Outcome == MinimiserOutcome.BadStart
                || !projected.TryEvaluate(_parameters.AsSpan(0, 2), _scratch.AsSpan(0, _data.Count), []))
            {
                continue;
            }

            projected.Coefficients.CopyTo(_parameters.AsSpan(2));
            double sum = Minimise(_parameters);
            if (sum < lowest)
            {
                lowest = sum;
                _parameters.CopyTo(_best, 0);
            }

            if (!IsPoor(lowest))
            {
                break;
            }
        }

        return lowest;
    }

    private double Minimise(double[] parameters, int mostIterations = 100)
    {
        CurveProblem curve = _curve;
        MinimiserResult result =
            _minimiser.Minimise(ref curve, parameters.AsSpan(0, _data.ParameterCount), CurveTolerance, mostIterations, true);
        _iterations += result.Iterations;
        return result.SumOfSquares;
    }

    private bool IsPoor(double sum)
    {
        if (!double.IsFinite(sum) || !(_best[0] >= _data.LowestHz && _best[0] <= _data.HighestHz))
        {
            return true;
        }

        int freedom = Math.Max(_data.Count - _data.ParameterCount, 1);
        double perFreedom = sum / freedom;
        return perFreedom > PoorChiSquare
            && Math.Sqrt(perFreedom) * _data.TypicalSigma > PoorResidual * _data.LargestAmplitude;
    }
}
