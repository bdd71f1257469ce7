namespace Looseloop.Resonance;

/// <summary>
/// The same curve with everything but f0 and Q projected out (G. H. Golub and V. Pereyra, SIAM J. Numer. Anal. 10 (1973) 413; the
/// Jacobian in the form of L. Kaufman, BIT 15 (1975) 49). Residuals in power with weights from the points themselves, so that P,
/// n1 and the constants are linear: two parameters are left, and hardly any start is too far off.
/// </summary>
internal sealed class ProjectedProblem : ILeastSquaresProblem
{
    private const double DependentRatio = 1e-12;

    private readonly FitData _data;
    private readonly double[] _basis;
    private readonly double[] _triangle = new double[(2 + ResonanceFitter.MostGroups) * (2 + ResonanceFitter.MostGroups)];
    private readonly double[] _coefficients = new double[2 + ResonanceFitter.MostGroups];

    public ProjectedProblem(FitData data, int mostPoints)
    {
        _data = data;
        _basis = new double[mostPoints * (2 + ResonanceFitter.MostGroups)];
    }

    public int ParameterCount => 2;

    public int ResidualCount => _data.Count;

    /// <summary>P, n1 and the constants at the point last evaluated.</summary>
    public ReadOnlySpan<double> Coefficients => _coefficients.AsSpan(0, _data.LinearCount);

    public bool TryEvaluate(ReadOnlySpan<double> parameters, Span<double> residuals, Span<double> jacobian)
    {
        double f0 = parameters[0];
        double q = parameters[1];
        if (!(f0 > 0 && q > 0 && double.IsFinite(f0) && double.IsFinite(q)))
        {
            return false;
        }

        FillBasis(f0, q, residuals);
        Orthogonalise(residuals);
        if (!jacobian.IsEmpty)
        {
            FillJacobian(f0, q, jacobian);
        }

        return true;
    }

    private void FillBasis(double f0, double q, Span<double> residuals)
    {
        int count = _data.Count;
        bool background = _data.Background == BackgroundModel.FeedThrough;
        if (background)
        {
            _basis.AsSpan(2 * count, _data.GroupCount * count).Clear();
        }

        for (int i = 0; i < count; i++)
        {
            double ratio = _data.FrequencyHz[i] / f0;
            double x = q * (ratio - (1 / ratio));
            double weight = _data.ProjectionWeight[i];
            double shape = weight * _data.Drive2[i] / (1 + (x * x));
            _basis[i] = shape;
            residuals[i] = -weight * _data.Power[i];
            if (background)
            {
                _basis[count + i] = shape * x;
                _basis[((2 + _data.Group[i]) * count) + i] = weight;
            }
        }
    }

    /// <summary>Modified Gram-Schmidt; leaves the residuals, and the coefficients of the columns as they were.</summary>
    private void Orthogonalise(Span<double> residuals)
    {
        int count = _data.Count;
        int columns = _data.LinearCount;
        for (int k = 0; k < columns; k++)
        {
            Span<double> column = _basis.AsSpan(k * count, count);
            double before = Columns.Norm(column);
            for (int j = 0; j < k; j++)
            {
                Span<double> earlier = _basis.AsSpan(j * count, count);
                double part = Columns.Dot(earlier, column);
                _triangle[(k * columns) + j] = part;
                Columns.AddMultiple(column, -part, earlier);
            }

            double norm = Columns.Norm(column);
            bool dependent = !(norm > DependentRatio * before);
            _triangle[(k * columns) + k] = dependent ? 0 : norm;
            double inverse = dependent ? 0 : 1 / norm;
            for (int i = 0; i < count; i++)
            {
                column[i] *= inverse;
            }

            double along = Columns.Dot(column, residuals);
            _coefficients[k] = -along;
            Columns.AddMultiple(residuals, -along, column);
        }

        for (int k = columns - 1; k >= 0; k--)
        {
            double sum = _coefficients[k];
            for (int j = k + 1; j < columns; j++)
            {
                sum -= _triangle[(j * columns) + k] * _coefficients[j];
            }

            double diagonal = _triangle[(k * columns) + k];
            _coefficients[k] = diagonal == 0 ? 0 : sum / diagonal;
        }
    }

    private void FillJacobian(double f0, double q, Span<double> jacobian)
    {
        int count = _data.Count;
        double peak = _coefficients[0];
        double interference = _data.Background == BackgroundModel.FeedThrough ? _coefficients[1] : 0;
        for (int i = 0; i < count; i++)
        {
            double ratio = _data.FrequencyHz[i] / f0;
            double inverseRatio = 1 / ratio;
            double x = q * (ratio - inverseRatio);
            double bell = 1 / (1 + (x * x));
            double byX = _data.ProjectionWeight[i] * _data.Drive2[i] * bell
                * (interference - (2 * x * (peak + (interference * x)) * bell));
            jacobian[i] = -byX * q * (ratio + inverseRatio) / f0;
            jacobian[count + i] = byX * x / q;
        }

        for (int j = 0; j < 2; j++)
        {
            Span<double> column = jacobian.Slice(j * count, count);
            for (int k = 0; k < _data.LinearCount; k++)
            {
                Span<double> direction = _basis.AsSpan(k * count, count);
                Columns.AddMultiple(column, -Columns.Dot(direction, column), direction);
            }
        }
    }
}
