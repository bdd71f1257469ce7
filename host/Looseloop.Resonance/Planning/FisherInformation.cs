namespace Looseloop.Resonance;

/// <summary>
/// What points of a curve tell about f0 and Q: the Fisher information of the power-invariant model, and the Cramer-Rao bound that
/// follows. Parameters are f0 in bandwidths, ln Q, P and, with feed-through, n1 and a constant for each group.
/// </summary>
public sealed class FisherInformation
{
    internal const int Size = 4 + ResonanceFitter.MostGroups;

    /// <summary>No power is known better than this, over the peak power: keeps a vanishing law from weighing infinitely.</summary>
    private const double LeastVariance = 1e-24;

    private readonly CurveEstimate _curve;
    private readonly NoiseLaw _noise;
    private readonly BackgroundModel _background;
    private readonly double[] _matrix = new double[Size * Size];
    private readonly double[] _factor = new double[Size * Size];
    private readonly double[] _gradient = new double[Size];

    /// <summary>Nothing is known yet.</summary>
    public FisherInformation(CurveEstimate curve, NoiseLaw noise, BackgroundModel background = BackgroundModel.FeedThrough)
    {
        _curve = curve;
        _noise = noise;
        _background = background;
    }

    /// <summary>Forgets all points.</summary>
    public void Clear() => _matrix.AsSpan().Clear();

    /// <summary>Adds a point.</summary>
    /// <param name="frequencyHz">Coil-side frequency, hertz.</param>
    /// <param name="samples">Number of samples averaged; any positive weight.</param>
    /// <param name="group">0 .. <see cref="ResonanceFitter.MostGroups"/> - 1.</param>
    /// <param name="driveWeight">Of the driving harmonic.</param>
    /// <param name="constantPower">
    /// Feed-through power at this point over P; NaN for the curve's own, times the drive weight squared.
    /// </param>
    public void Add(double frequencyHz, double samples, int group = 0, double driveWeight = 1, double constantPower = double.NaN)
    {
        double scale = Gradient(frequencyHz, group, driveWeight, constantPower, _gradient);
        for (int i = 0; i < Size; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                _matrix[(i * Size) + j] += samples * scale * _gradient[i] * _gradient[j];
            }
        }
    }

    /// <summary>The bound on u(f0) in bandwidths and u(Q)/Q; infinite where the points do not determine them.</summary>
    public (double F0Bandwidths, double QRelative) Bound()
    {
        Span<double> unit = stackalloc double[Size];
        if (!TryFactor())
        {
            return (double.PositiveInfinity, double.PositiveInfinity);
        }

        unit.Clear();
        unit[0] = 1;
        Solve(unit);
        double f0 = unit[0];
        unit.Clear();
        unit[1] = 1;
        Solve(unit);
        return (Math.Sqrt(f0), Math.Sqrt(unit[1]));
    }

    /// <summary>
    /// The gradient of a point's power by the parameters; returns one over the variance of one sample's power.
    /// </summary>
    internal double Gradient(double frequencyHz, int group, double driveWeight, double constantPower, Span<double> gradient)
    {
        double ratio = frequencyHz / _curve.F0Hz;
        double x = _curve.Q * (ratio - (1 / ratio));
        double bell = 1 / (1 + (x * x));
        double drive = driveWeight * driveWeight;
        double top = 1 + (_curve.Interference * x);
        double constant = double.IsNaN(constantPower) ? drive * _curve.ConstantPower : constantPower;
        double byX = drive * bell * (_curve.Interference - (2 * x * top * bell));
        gradient[..Size].Clear();
        gradient[0] = -byX * (ratio + (1 / ratio));
        gradient[1] = byX * x;
        gradient[2] = drive * bell;
        if (_background == BackgroundModel.FeedThrough)
        {
            gradient[3] = drive * bell * x;
            gradient[4 + group] = 1;
        }

        return 1 / Math.Max(_noise.PowerVariance((drive * bell * top) + constant), LeastVariance);
    }

    /// <summary>Replaces the information by a given one, lower triangle row by row.</summary>
    internal void Load(ReadOnlySpan<double> matrix) => matrix.CopyTo(_matrix);

    /// <summary>Cholesky; parameters that no point touches are left out.</summary>
    internal bool TryFactor()
    {
        for (int i = 0; i < Size; i++)
        {
            bool unused = _matrix[(i * Size) + i] == 0;
            for (int j = 0; j <= i; j++)
            {
                double sum = unused ? (i == j ? 1 : 0) : _matrix[(i * Size) + j];
                for (int k = 0; k < j; k++)
                {
                    sum -= _factor[(i * Size) + k] * _factor[(j * Size) + k];
                }

                if (i == j)
                {
                    double before = unused ? 1 : _matrix[(i * Size) + i];
                    if (!(sum > 1e-13 * before) || (unused && i < 2))
                    {
                        return false;
                    }

                    _factor[(i * Size) + i] = Math.Sqrt(sum);
                }
                else
                {
                    _factor[(i * Size) + j] = sum / _factor[(j * Size) + j];
                }
            }
        }

        return true;
    }

    /// <summary>Solves with the last factorisation, in place.</summary>
    internal void Solve(Span<double> b)
    {
        for (int i = 0; i < Size; i++)
        {
            for (int k = 0; k < i; k++)
            {
                b[i] -= _factor[(i * Size) + k] * b[k];
            }

            b[i] /= _factor[(i * Size) + i];
        }

        for (int i = Size - 1; i >= 0; i--)
        {
            for (int k = i + 1; k < Size; k++)
            {
                b[i] -= _factor[(k * Size) + i] * b[k];
            }

            b[i] /= _factor[(i * Size) + i];
        }
    }
}
