namespace Looseloop.Drift;

/// <summary>
/// Starting values by variable projection (Golub and Pereyra, SIAM J. Numer. Anal. 10 (1973) 413): for given time constants
/// the rest is linear, so only the time constants are searched, on a grid even in their logarithm. The inner products of all
/// columns are worked out once; each candidate is then a system of two or three unknowns.
/// </summary>
internal static class TauSearch
{
    /// <summary>The best one or two time constants of the grid, the shorter first, or null where none can be solved.</summary>
    public static double[]? Best(DriftSeries series, int terms, double shortestS, double longestS)
    {
        int steps = terms == 1 ? 61 : 31;
        double[] grid = new double[steps];
        for (int k = 0; k < steps; k++)
        {
            grid[k] = shortestS * Math.Pow(longestS / shortestS, (double)k / (steps - 1));
        }

        // Column 0 is the constant, column k + 1 the exponential of grid[k], the last one the data; all weighted.
        double[][] columns = Columns(series, grid);
        double[,] products = Products(columns, terms);
        double most = double.NegativeInfinity;
        double[]? best = null;
        for (int a = 0; a < steps; a++)
        {
            if (terms == 1)
            {
                Consider([0, a + 1], [grid[a]]);
                continue;
            }

            // Nearer than a factor of two the two exponentials cannot be told apart.
            for (int b = a + 1; b < steps; b++)
            {
                if (grid[b] >= 2 * grid[a])
                {
                    Consider([0, a + 1, b + 1], [grid[a], grid[b]]);
                }
            }
        }

        return best;

        void Consider(ReadOnlySpan<int> chosen, double[] taus)
        {
            double gain = Gain(products, chosen);
            if (gain > most)
            {
                most = gain;
                best = taus;
            }
        }
    }

    private static double[][] Columns(DriftSeries series, double[] grid)
    {
        double[][] columns = new double[grid.Length + 2][];
        for (int k = 0; k < columns.Length; k++)
        {
            columns[k] = new double[series.Count];
        }

        double centre = series.Value[0];
        for (int i = 0; i < series.Count; i++)
        {
            double u = 1 / series.Standard[i];
            columns[0][i] = u;
            columns[^1][i] = u * (series.Value[i] - centre);
            for (int k = 0; k < grid.Length; k++)
            {
                columns[k + 1][i] = u * Math.Exp(-(series.TimeS[i] - series.TimeS[0]) / grid[k]);
            }
        }

        return columns;
    }

    private static double[,] Products(double[][] columns, int terms)
    {
        int n = columns.Length;
        double[,] products = new double[n, n];
        for (int a = 0; a < n; a++)
        {
            for (int b = a; b < n; b++)
            {
                // One term never needs the product of two exponentials.
                if (terms == 1 && a > 0 && b > a && b < n - 1)
                {
                    continue;
                }

                double sum = 0;
                double[] first = columns[a];
                double[] second = columns[b];
                for (int i = 0; i < first.Length; i++)
                {
                    sum += first[i] * second[i];
                }

                products[a, b] = sum;
                products[b, a] = sum;
            }
        }

        return products;
    }

    // How much of the weighted sum of squares the chosen columns explain.
    private static double Gain(double[,] products, ReadOnlySpan<int> chosen)
    {
        int n = chosen.Length;
        int data = products.GetLength(0) - 1;
        double[,] normal = new double[n, n];
        Span<double> right = stackalloc double[n];
        Span<double> solution = stackalloc double[n];
        for (int i = 0; i < n; i++)
        {
            right[i] = products[chosen[i], data];
            for (int j = 0; j < n; j++)
            {
                normal[i, j] = products[chosen[i], chosen[j]];
            }
        }

        if (!NormalMatrix.TrySolve(normal, right, solution))
        {
            return double.NegativeInfinity;
        }

        double gain = 0;
        for (int i = 0; i < n; i++)
        {
            gain += solution[i] * right[i];
        }

        return gain;
    }
}
