using MathNet.Numerics.LinearAlgebra;

namespace Looseloop.Bench.Tests;

/// <summary>A small damped least-squares fit for the checks of this project; the instrument's own fit has no part in it.</summary>
internal static class CurveFit
{
    /// <summary>Fits y = model(x, p) by Levenberg's method with a numerical Jacobian.</summary>
    public static double[] Run(double[] x, double[] y, double[] start, double[] scale, Func<double, double[], double> model)
    {
        double[] p = [.. start];
        double damping = 1e-3;
        double rss = Rss(x, y, p, model);
        for (int step = 0; step < 200; step++)
        {
            var jacobian = Matrix<double>.Build.Dense(x.Length, p.Length);
            var residual = Vector<double>.Build.Dense(x.Length);
            for (int i = 0; i < x.Length; i++)
            {
                residual[i] = y[i] - model(x[i], p);
            }

            for (int k = 0; k < p.Length; k++)
            {
                double h = scale[k] * 1e-5;
                double[] up = [.. p];
                double[] down = [.. p];
                up[k] += h;
                down[k] -= h;
                for (int i = 0; i < x.Length; i++)
                {
                    jacobian[i, k] = (model(x[i], up) - model(x[i], down)) / (2 * h) * scale[k];
                }
            }

            var normal = jacobian.TransposeThisAndMultiply(jacobian);
            for (int k = 0; k < p.Length; k++)
            {
                normal[k, k] *= 1 + damping;
            }

            var move = normal.Solve(jacobian.TransposeThisAndMultiply(residual));
            double[] next = [.. p.Select((value, k) => value + (move[k] * scale[k]))];
            double better = Rss(x, y, next, model);
            if (better <= rss)
            {
                double gain = rss - better;
                p = next;
                rss = better;
                damping = Math.Max(damping / 10, 1e-14);
                if (gain <= 1e-15 * rss && move.L2Norm() < 1e-10)
                {
                    break;
                }
            }
            else
            {
                damping *= 10;
                if (damping > 1e12)
                {
                    break;
                }
            }
        }

        return p;
    }

    /// <summary>Three parameters (centre, width, amplitude) of a narrow-band resonance in amplitude.</summary>
    public static double[] Resonance(double[] u, double[] y) => Run(
        u,
        y,
        [0, 1, y.Max()],
        [1, 1, y.Max()],
        static (at, p) => p[2] / Math.Sqrt(1 + (4 * (at - p[0]) * (at - p[0]) / (p[1] * p[1]))));

    /// <summary>
    /// Five parameters of a resonance with constant feed-through, power form (n0 + n1 x + n2 x^2) / (1 + x^2) with
    /// x = 2 (u - centre) / width, fitted so that each point counts by its relative error.
    /// </summary>
    /// <returns>Centre and width first.</returns>
    public static double[] FeedThrough(double[] u, double[] y)
    {
        double peak = y.Max();
        double square = peak * peak;
        return Run(
            u,
            [.. y.Select(static value => Math.Log(value))],
            [u[Array.IndexOf(y, peak)], 1, square, 0, 1e-3 * square],
            [1, 1, square, square, square],
            (at, p) =>
            {
                double x = 2 * (at - p[0]) / p[1];
                return 0.5 * Math.Log(Math.Max((p[2] + (p[3] * x) + (p[4] * x * x)) / (1 + (x * x)), 1e-12 * square));
            });
    }

    private static double Rss(double[] x, double[] y, double[] p, Func<double, double[], double> model)
    {
        double sum = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double r = y[i] - model(x[i], p);
            sum += r * r;
        }

        return sum;
    }
}
