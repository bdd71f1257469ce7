using System.Numerics;

namespace Looseloop.Bench.Physics;

/// <summary>
/// The poles of a world's meshes, and the residue of each in the transfer from the drive's voltage to the detector's input,
/// T(s) = sum over all poles of residue / (s - pole). Found by simultaneous iteration on the determinant's roots
/// (O. Aberth, Math. Comp. 27 (1973) 339), whose logarithmic derivative is the trace of A^-1 A'.
/// </summary>
internal sealed class Poles
{
    private const int MostSteps = 100;

    private readonly Complex[,] _matrix;
    private readonly Complex[,] _derivative;
    private readonly Complex[] _column;
    private readonly Complex[] _solution;
    private readonly int[] _order;
    private readonly Complex[] _roots;
    private readonly int _pairs;
    private readonly bool _magnetic;

    private Poles(Meshes meshes, bool magnetic)
    {
        int n = meshes.Count;
        _matrix = new Complex[n, n];
        _derivative = new Complex[n, n];
        _column = new Complex[n];
        _solution = new Complex[n];
        _order = new int[n];
        _magnetic = magnetic;

        // Roots: one of the upper half plane for each resonating mesh, then one real for each other mesh.
        _roots = new Complex[n];
        for (int i = 0; i < n; i++)
        {
            if (meshes.Resonates(i))
            {
                double half = meshes.Rate(i) / 2;
                double square = meshes.Elastance(i) - (half * half);
                double spread = 1 + (1e-4 * _pairs); // equal resonators must not start from one point
                _roots[_pairs++] = new Complex(-half * spread, Math.Sqrt(Math.Max(square, 1)) * spread);
            }
        }

        int at = _pairs;
        for (int i = 0; i < n; i++)
        {
            if (!meshes.Resonates(i))
            {
                _roots[at++] = -meshes.Rate(i) * (1 + (1e-3 * (at - _pairs)));
            }
        }

        Pole = new Complex[_pairs];
        Residue = new Complex[_pairs];
        Share = new double[_pairs];
        RealPole = new double[n - _pairs];
        RealResidue = new double[n - _pairs];
    }

    /// <summary>The oscillating poles, those of the upper half plane only; each has a mirror image.</summary>
    public Complex[] Pole { get; }

    public Complex[] Residue { get; }

    /// <summary>How much of each oscillating pole is the coil's lowest mode, 0 to 1.</summary>
    public double[] Share { get; }

    public double[] RealPole { get; }

    public double[] RealResidue { get; }

    public static Poles Of(Meshes meshes, PickupSense sense)
    {
        var poles = new Poles(meshes, sense == PickupSense.Current);
        poles.Follow(meshes);
        return poles;
    }

    /// <summary>Finds the poles again, from where they were, after the meshes have changed a little.</summary>
    public void Follow(Meshes meshes)
    {
        double largest;
        int steps = 0;
        do
        {
            largest = 0;
            for (int i = 0; i < _roots.Length; i++)
            {
                Complex step = Step(meshes, i);
                _roots[i] -= step;
                largest = Math.Max(largest, step.Magnitude / _roots[i].Magnitude);
            }
        }
        while (largest > 1e-14 && ++steps < MostSteps);

        if (!(largest < 1e-9))
        {
            throw new InvalidOperationException("The world's circuits have no stable solution: are the coupling coefficients all below 1?");
        }

        for (int i = 0; i < _roots.Length; i++)
        {
            Complex residue = ResidueAt(meshes, _roots[i], out double share);
            if (i < _pairs)
            {
                Pole[i] = _roots[i];
                Residue[i] = residue;
                Share[i] = share;
            }
            else
            {
                RealPole[i - _pairs] = _roots[i].Real;
                RealResidue[i - _pairs] = residue.Real;
            }
        }
    }

    /// <summary>The transfer at j omega, detector volts for each volt of the drive.</summary>
    public Complex At(double omega)
    {
        double re = 0;
        double im = 0;
        for (int i = 0; i < Pole.Length; i++)
        {
            Complex p = Pole[i];
            Complex r = Residue[i];

            // r/(s-p) + r*/(s-p*) over their common denominator, all of whose coefficients are real.
            double a = -2 * ((r.Real * p.Real) + (r.Imaginary * p.Imaginary));
            double b = 2 * r.Real * omega;
            double c = ((p.Real * p.Real) + (p.Imaginary * p.Imaginary)) - (omega * omega);
            double d = -2 * p.Real * omega;
            double scale = 1 / ((c * c) + (d * d));
            re += ((a * c) + (b * d)) * scale;
            im += ((b * c) - (a * d)) * scale;
        }

        for (int i = 0; i < RealPole.Length; i++)
        {
            double scale = RealResidue[i] / ((RealPole[i] * RealPole[i]) + (omega * omega));
            re -= RealPole[i] * scale;
            im -= omega * scale;
        }

        return new Complex(re, im);
    }

    /// <summary>The oscillating pole that is most the coil's lowest mode.</summary>
    public int Coil()
    {
        int best = 0;
        for (int i = 1; i < Share.Length; i++)
        {
            if (Share[i] > Share[best])
            {
                best = i;
            }
        }

        return best;
    }

    private Complex Step(Meshes meshes, int i)
    {
        Complex s = _roots[i];
        Complex newton = 1 / LogDerivative(meshes, s);
        Complex repulsion = 0;
        for (int j = 0; j < _roots.Length; j++)
        {
            if (j != i)
            {
                repulsion += 1 / (s - _roots[j]);
            }

            if (j < _pairs)
            {
                repulsion += 1 / (s - Complex.Conjugate(_roots[j]));
            }
        }

        Complex step = newton / (1 - (newton * repulsion));
        return i < _pairs ? step : step.Real;
    }

    private Complex LogDerivative(Meshes meshes, Complex s)
    {
        meshes.Fill(s, _matrix, _derivative);
        ComplexMatrix.Factor(_matrix, _order);
        Complex trace = 0;
        for (int c = 0; c < _column.Length; c++)
        {
            for (int r = 0; r < _column.Length; r++)
            {
                _column[r] = _derivative[r, c];
            }

            ComplexMatrix.Solve(_matrix, _order, _column, _solution);
            trace += _solution[c];
        }

        return trace;
    }

    // Near a pole the currents are u (u_loop / (u^T A' u)) / (s - pole) for a drive in the loop, with u the null vector.
    private Complex ResidueAt(Meshes meshes, Complex s, out double share)
    {
        meshes.Fill(s, _matrix, _derivative);
        ComplexMatrix.Factor(_matrix, _order);
        for (int i = 0; i < _column.Length; i++)
        {
            _column[i] = 1 + (0.37 * i);
        }

        for (int pass = 0; pass < 2; pass++)
        {
            ComplexMatrix.Solve(_matrix, _order, _column, _solution);
            double largest = 0;
            for (int i = 0; i < _solution.Length; i++)
            {
                largest = Math.Max(largest, _solution[i].Magnitude);
            }

            for (int i = 0; i < _solution.Length; i++)
            {
                _column[i] = _solution[i] / largest;
            }
        }

        double total = 0;
        Complex seen = 0;
        for (int i = 0; i < _column.Length; i++)
        {
            double size = _column[i].Magnitude;
            total += size * size;
            seen += meshes.Sees(i) * _column[i];
        }

        double coil = _column[meshes.Coil].Magnitude;
        share = coil * coil / total;
        if (meshes.Loop < 0)
        {
            return 0;
        }

        Complex charge = seen * _column[meshes.Loop] / (s * meshes.DerivativeForm(s, _column));
        if (!_magnetic)
        {
            return charge;
        }

        double omega = Math.Sqrt(meshes.Elastance(meshes.Coil));
        return charge * s / omega;
    }
}
