namespace Looseloop.Coil;

/// <summary>Eigenvalues and vectors of a small symmetric tridiagonal matrix by implicit QL (Bowdler, Martin, Reinsch and Wilkinson, 1968).</summary>
internal static class TridiagonalEigen
{
    /// <summary>Solves; values come sorted, largest first, vectors in the rows of the second result.</summary>
    /// <param name="diagonal">n entries.</param>
    /// <param name="below">n - 1 entries or more; further ones are not read.</param>
    /// <param name="size">n.</param>
    public static (double[] Values, double[][] Vectors) Solve(ReadOnlySpan<double> diagonal, ReadOnlySpan<double> below, int size)
    {
        double[] d = diagonal[..size].ToArray();
        double[] e = new double[size];
        below[..(size - 1)].CopyTo(e);
        double[,] z = new double[size, size];
        for (int i = 0; i < size; i++)
        {
            z[i, i] = 1;
        }

        for (int l = 0; l < size; l++)
        {
            for (int round = 0; ; round++)
            {
                int m = l;
                while (m < size - 1 && Math.Abs(e[m]) > 1e-16 * (Math.Abs(d[m]) + Math.Abs(d[m + 1])))
                {
                    m++;
                }

                if (m == l)
                {
                    break;
                }

                if (round == 60)
                {
                    throw new InvalidOperationException("the tridiagonal eigenproblem did not converge");
                }

                Sweep(d, e, z, l, m);
            }
        }

        int[] order = [.. Enumerable.Range(0, size).OrderByDescending(i => d[i])];
        double[][] vectors = [.. order.Select(i => Enumerable.Range(0, size).Select(k => z[k, i]).ToArray())];
        return ([.. order.Select(i => d[i])], vectors);
    }

    private static void Sweep(double[] d, double[] e, double[,] z, int l, int m)
    {
        double g = (d[l + 1] - d[l]) / (2 * e[l]);
        double r = double.Hypot(g, 1);
        g = d[m] - d[l] + (e[l] / (g + Math.CopySign(r, g)));
        double s = 1;
        double c = 1;
        double p = 0;
        for (int i = m - 1; i >= l; i--)
        {
            double f = s * e[i];
            double b = c * e[i];
            r = double.Hypot(f, g);
            e[i + 1] = r;
            if (r == 0)
            {
                d[i + 1] -= p;
                e[m] = 0;
                return;
            }

            s = f / r;
            c = g / r;
            g = d[i + 1] - p;
            r = ((d[i] - g) * s) + (2 * c * b);
            p = s * r;
            d[i + 1] = g + p;
            g = (c * r) - b;
            for (int k = 0; k < d.Length; k++)
            {
                f = z[k, i + 1];
                z[k, i + 1] = (s * z[k, i]) + (c * f);
                z[k, i] = (c * z[k, i]) - (s * f);
            }
        }

        d[l] -= p;
        e[l] = g;
        e[m] = 0;
    }
}
