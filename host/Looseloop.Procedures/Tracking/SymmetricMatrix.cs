namespace Looseloop.Procedures.Tracking;

/// <summary>Small symmetric matrices, such as the normal equations of a handful of parameters.</summary>
internal static class SymmetricMatrix
{
    /// <summary>The inverse of a positive definite matrix by Gauss-Jordan elimination, or null where it is singular.</summary>
    public static double[,]? Inverse(double[,] matrix)
    {
        int n = matrix.GetLength(0);

        // Parameters in hertz, in counts squared and without unit stand side by side: equilibrate, or pivots mean nothing.
        double[] scale = new double[n];
        for (int i = 0; i < n; i++)
        {
            if (!(matrix[i, i] > 0) || !double.IsFinite(matrix[i, i]))
            {
                return null;
            }

            scale[i] = 1 / Math.Sqrt(matrix[i, i]);
        }

        double[,] left = new double[n, n];
        double[,] right = new double[n, n];
        for (int i = 0; i < n; i++)
        {
            right[i, i] = 1;
            for (int j = 0; j < n; j++)
            {
                left[i, j] = matrix[i, j] * scale[i] * scale[j];
            }
        }

        for (int k = 0; k < n; k++)
        {
            double pivot = left[k, k];
            if (!(pivot > 1e-13))
            {
                return null;
            }

            for (int j = 0; j < n; j++)
            {
                left[k, j] /= pivot;
                right[k, j] /= pivot;
            }

            for (int i = 0; i < n; i++)
            {
                double factor = left[i, k];
                for (int j = 0; i != k && j < n; j++)
                {
                    left[i, j] -= factor * left[k, j];
                    right[i, j] -= factor * right[k, j];
                }
            }
        }

        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                right[i, j] *= scale[i] * scale[j];
            }
        }

        return right;
    }
}
