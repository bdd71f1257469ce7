namespace Looseloop.Drift;

/// <summary>A small symmetric positive matrix, as least squares make them: solved and inverted by Cholesky.</summary>
internal static class NormalMatrix
{
    /// <summary>Solves <paramref name="matrix"/> x = <paramref name="right"/>; false where the matrix is not positive definite.</summary>
    public static bool TrySolve(double[,] matrix, ReadOnlySpan<double> right, Span<double> solution)
    {
        int n = right.Length;
        double[,] root = new double[n, n];
        Span<double> scale = stackalloc double[n];
        if (!TryFactor(matrix, n, root, scale))
        {
            return false;
        }

        for (int i = 0; i < n; i++)
        {
            double sum = right[i] * scale[i];
            for (int k = 0; k < i; k++)
            {
                sum -= root[i, k] * solution[k];
            }

            solution[i] = sum / root[i, i];
        }

        for (int i = n - 1; i >= 0; i--)
        {
            double sum = solution[i];
            for (int k = i + 1; k < n; k++)
            {
                sum -= root[k, i] * solution[k];
            }

            solution[i] = sum / root[i, i];
        }

        for (int i = 0; i < n; i++)
        {
            solution[i] *= scale[i];
        }

        return true;
    }

    /// <summary>The inverse, or null where the matrix is not positive definite.</summary>
    public static double[,]? Invert(double[,] matrix)
    {
        int n = matrix.GetLength(0);
        double[,] inverse = new double[n, n];
        double[] unit = new double[n];
        double[] column = new double[n];
        for (int j = 0; j < n; j++)
        {
            Array.Clear(unit);
            unit[j] = 1;
            if (!TrySolve(matrix, unit, column))
            {
                return null;
            }

            for (int i = 0; i < n; i++)
            {
                inverse[i, j] = column[i];
            }
        }

        return inverse;
    }

    // Scaled to a unit diagonal first: the parameters differ by orders of magnitude.
    private static bool TryFactor(double[,] matrix, int n, double[,] root, Span<double> scale)
    {
        for (int i = 0; i < n; i++)
        {
            if (!(matrix[i, i] > 0) || !double.IsFinite(matrix[i, i]))
            {
                return false;
            }

            scale[i] = 1 / Math.Sqrt(matrix[i, i]);
        }

        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                double sum = matrix[i, j] * scale[i] * scale[j];
                for (int k = 0; k < j; k++)
                {
                    sum -= root[i, k] * root[j, k];
                }

                if (i != j)
                {
                    root[i, j] = sum / root[j, j];
                }
                else if (sum > 1e-14)
                {
                    root[i, i] = Math.Sqrt(sum);
                }
                else
                {
                    return false;
                }
            }
        }

        return true;
    }
}
