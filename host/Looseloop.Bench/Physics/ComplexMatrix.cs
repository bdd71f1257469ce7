using System.Numerics;

namespace Looseloop.Bench.Physics;

/// <summary>The little linear algebra that the meshes need: matrices of up to a dozen rows.</summary>
internal static class ComplexMatrix
{
    /// <summary>Factors a matrix in place by elimination with row exchange. A vanishing pivot is replaced by a very small one.</summary>
    public static void Factor(Complex[,] a, int[] order)
    {
        int n = order.Length;
        for (int i = 0; i < n; i++)
        {
            order[i] = i;
        }

        for (int c = 0; c < n; c++)
        {
            int best = c;
            double largest = Size(a[c, c]);
            for (int r = c + 1; r < n; r++)
            {
                if (Size(a[r, c]) > largest)
                {
                    largest = Size(a[r, c]);
                    best = r;
                }
            }

            if (best != c)
            {
                (order[c], order[best]) = (order[best], order[c]);
                for (int k = 0; k < n; k++)
                {
                    (a[c, k], a[best, k]) = (a[best, k], a[c, k]);
                }
            }

            if (largest == 0)
            {
                a[c, c] = 1e-30;
            }

            Complex inverse = 1 / a[c, c];
            for (int r = c + 1; r < n; r++)
            {
                Complex factor = a[r, c] * inverse;
                a[r, c] = factor;
                if (factor != Complex.Zero)
                {
                    for (int k = c + 1; k < n; k++)
                    {
                        a[r, k] -= factor * a[c, k];
                    }
                }
            }
        }
    }

    /// <summary>Solves with a factored matrix: x becomes the solution for the right side b.</summary>
    public static void Solve(Complex[,] factored, int[] order, Complex[] b, Complex[] x)
    {
        int n = order.Length;
        for (int i = 0; i < n; i++)
        {
            Complex sum = b[order[i]];
            for (int k = 0; k < i; k++)
            {
                sum -= factored[i, k] * x[k];
            }

            x[i] = sum;
        }

        for (int i = n - 1; i >= 0; i--)
        {
            Complex sum = x[i];
            for (int k = i + 1; k < n; k++)
            {
                sum -= factored[i, k] * x[k];
            }

            x[i] = sum / factored[i, i];
        }
    }

    private static double Size(Complex z) => Math.Abs(z.Real) + Math.Abs(z.Imaginary);
}
