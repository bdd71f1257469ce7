using MathNet.Numerics.LinearAlgebra;

namespace Looseloop.Resonance.Tests;

/// <summary>The Cramer-Rao bound from numerical derivatives of the complex response and MathNet's matrices.</summary>
internal static class NumericalBound
{
    /// <summary>c of f0 and Q for noise constant in amplitude, peak amplitude 1, parameters f0, Q, A, br, bi in power-invariant form.</summary>
    public static (double F0, double Q) FeedThrough(double[] grid, double f0, double q, double b, double phaseDeg)
    {
        double br = b * Math.Cos(phaseDeg * Math.PI / 180);
        double bi = b * Math.Sin(phaseDeg * Math.PI / 180);
        double Model(double f, double[] p)
        {
            // p: f0 in bandwidths from the truth, Q relative, n0, n1, n2.
            double centre = f0 + (p[0] * f0 / q);
            double x = q * p[1] * ((f / centre) - (centre / f));
            return Math.Sqrt((p[2] + (p[3] * x) + (p[4] * x * x)) / (1 + (x * x)));
        }

        return Of(grid, Model, [0, 1, 1 + (2 * br) + (b * b), -2 * bi, b * b], f => 1);
    }

    /// <summary>c of the first two parameters of any model with a noise of its own at each frequency.</summary>
    public static (double F0, double Q) Of(double[] grid, Func<double, double[], double> model, double[] at, Func<double, double> sigma)
    {
        int n = at.Length;
        Matrix<double> jacobian = Matrix<double>.Build.Dense(grid.Length, n);
        for (int j = 0; j < n; j++)
        {
            const double h = 1e-5;
            double[] up = [.. at];
            double[] down = [.. at];
            up[j] += h;
            down[j] -= h;
            for (int i = 0; i < grid.Length; i++)
            {
                jacobian[i, j] = (model(grid[i], up) - model(grid[i], down)) / (2 * h) / sigma(grid[i]);
            }
        }

        Matrix<double> covariance = jacobian.TransposeThisAndMultiply(jacobian).Inverse() * grid.Length;
        return (Math.Sqrt(covariance[0, 0]), Math.Sqrt(covariance[1, 1]));
    }
}
