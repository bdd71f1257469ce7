namespace Looseloop.Resonance;

/// <summary>QR factorisation by reflections (A. S. Householder, J. ACM 5 (1958) 339) on matrices stored column by column.</summary>
internal static class Householder
{
    /// <summary>
    /// Reduces a matrix to its upper triangle R in place and applies the same reflections to a right-hand side, whose first
    /// <paramref name="columns"/> elements then belong to R. Below the diagonal the matrix is left in disorder.
    /// </summary>
    /// <param name="matrix">rows * columns elements, column by column.</param>
    /// <param name="rows">At least <paramref name="columns"/>.</param>
    /// <param name="columns">One or more.</param>
    /// <param name="rightSide">rows elements.</param>
    public static void Reduce(Span<double> matrix, int rows, int columns, Span<double> rightSide)
    {
        for (int k = 0; k < columns; k++)
        {
            Span<double> pivot = matrix.Slice((k * rows) + k, rows - k);
            double norm = Columns.Norm(pivot);
            if (norm == 0)
            {
                continue;
            }

            // The sign that avoids cancellation.
            double diagonal = pivot[0] > 0 ? -norm : norm;
            pivot[0] -= diagonal;
            double scale = 1 / (diagonal * pivot[0]);
            for (int j = k + 1; j < columns; j++)
            {
                Span<double> other = matrix.Slice((j * rows) + k, rows - k);
                Columns.AddMultiple(other, scale * Columns.Dot(pivot, other), pivot);
            }

            Span<double> right = rightSide.Slice(k, rows - k);
            Columns.AddMultiple(right, scale * Columns.Dot(pivot, right), pivot);
            pivot[0] = diagonal;
        }
    }

    /// <summary>Solves R s = b for an upper triangle stored column by column with a leading dimension.</summary>
    /// <returns>False where R is singular.</returns>
    public static bool TrySolveUpper(ReadOnlySpan<double> matrix, int rows, int columns, ReadOnlySpan<double> b, Span<double> solution)
    {
        for (int j = columns - 1; j >= 0; j--)
        {
            double sum = b[j];
            for (int k = j + 1; k < columns; k++)
            {
                sum -= matrix[(k * rows) + j] * solution[k];
            }

            double diagonal = matrix[(j * rows) + j];
            if (diagonal == 0)
            {
                return false;
            }

            solution[j] = sum / diagonal;
        }

        return true;
    }
}
