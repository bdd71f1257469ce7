namespace Looseloop.Coil;

/// <summary>Cholesky factor of a symmetric positive definite matrix, row by row; n^3/6 multiply-adds, 8 n^2 bytes.</summary>
internal sealed class CholeskyFactor
{
    private readonly double[] _rows;

    private CholeskyFactor(double[] rows, int size)
    {
        _rows = rows;
        Size = size;
    }

    public int Size { get; }

    /// <summary>Factors a row-major matrix in place (its lower triangle is used and overwritten).</summary>
    /// <returns>Null where the matrix is not positive definite.</returns>
    public static CholeskyFactor? InPlace(double[] matrix, int size)
    {
        // Four rows go together, so that each finished row is fetched from memory once for the four.
        const int Block = 4;
        for (int first = 0; first < size; first += Block)
        {
            int last = Math.Min(first + Block, size);
            if (last - first == Block)
            {
                FourRows(matrix, size, first);
            }

            for (int i = first; i < last; i++)
            {
                Span<double> row = matrix.AsSpan(i * size, size);
                for (int j = last - first == Block ? first : 0; j < i; j++)
                {
                    ReadOnlySpan<double> other = matrix.AsSpan(j * size, size);
                    row[j] = (row[j] - VectorMath.Dot(row[..j], other[..j])) / other[j];
                }

                double pivot = row[i] - VectorMath.Dot(row[..i], row[..i]);
                if (!(pivot > 0))
                {
                    return null;
                }

                row[i] = Math.Sqrt(pivot);
            }
        }

        return new CholeskyFactor(matrix, size);
    }

    // Columns before the block, for all of its rows.
    private static void FourRows(double[] matrix, int size, int first)
    {
        Span<double> r0 = matrix.AsSpan(first * size, size);
        Span<double> r1 = matrix.AsSpan((first + 1) * size, size);
        Span<double> r2 = matrix.AsSpan((first + 2) * size, size);
        Span<double> r3 = matrix.AsSpan((first + 3) * size, size);
        for (int j = 0; j < first; j++)
        {
            ReadOnlySpan<double> other = matrix.AsSpan(j * size, j + 1);
            VectorMath.FourDots(other[..j], r0, r1, r2, r3, out double d0, out double d1, out double d2, out double d3);
            double inverse = 1 / other[j];
            r0[j] = (r0[j] - d0) * inverse;
            r1[j] = (r1[j] - d1) * inverse;
            r2[j] = (r2[j] - d2) * inverse;
            r3[j] = (r3[j] - d3) * inverse;
        }
    }

    /// <summary>Replaces the right-hand side by the solution.</summary>
    public void Solve(Span<double> x)
    {
        for (int i = 0; i < Size; i++)
        {
            ReadOnlySpan<double> row = _rows.AsSpan(i * Size, i + 1);
            x[i] = (x[i] - VectorMath.Dot(row[..i], x)) / row[i];
        }

        for (int i = Size - 1; i >= 0; i--)
        {
            ReadOnlySpan<double> row = _rows.AsSpan(i * Size, i + 1);
            x[i] /= row[i];
            VectorMath.AddScaled(x[..i], -x[i], row);
        }
    }
}
