namespace Looseloop.Drift;

/// <summary>
/// Damped least squares for a sum of exponentials (Levenberg 1944, Marquardt 1963), over all readings. Parameters: the end
/// less the centre, then amplitude and ln tau of each term. Amplitudes belong to the first reading while it runs.
/// </summary>
internal static class LevenbergMarquardt
{
    private const int MostSteps = 60;

    /// <summary>Polishes from the given time constants; null where the normal equations cannot be solved at all.</summary>
    public static WarmUpModel? Polish(
        DriftSeries series, double originS, double centre, double[] taus, double shortestS, double longestS)
    {
        int n = 1 + (2 * taus.Length);
        double[] p = new double[n];
        for (int k = 0; k < taus.Length; k++)
        {
            p[2 + (2 * k)] = Math.Log(taus[k]);
        }

        double[,] normal = new double[n, n];
        double[] gradient = new double[n];
        double[] step = new double[n];
        double[] trial = new double[n];

        if (!SolveLinear(series, centre, p))
        {
            return null;
        }

        double chi = Accumulate(series, centre, p, normal, gradient, out ResidualScatter scatter);
        double damping = 1e-6;
        for (int iteration = 0; iteration < MostSteps && taus.Length > 0; iteration++)
        {
            double[,] damped = (double[,])normal.Clone();
            for (int i = 0; i < n; i++)
            {
                damped[i, i] *= 1 + damping;
            }

            if (!NormalMatrix.TrySolve(damped, gradient, step))
            {
                damping = Math.Max(damping * 10, 1e-9);
                if (damping > 1e6)
                {
                    break;
                }

                continue;
            }

            for (int i = 0; i < n; i++)
            {
                bool tau = i >= 2 && i % 2 == 0;
                trial[i] = tau
                    ? Math.Clamp(p[i] + Math.Clamp(step[i], -1, 1), Math.Log(shortestS), Math.Log(longestS))
                    : p[i] + step[i];
            }

            double next = ChiSquare(series, centre, trial);
            if (next <= chi)
            {
                // A fall of chi squared by 1e-6 moves no parameter by more than a thousandth of its uncertainty.
                bool done = chi - next <= 1e-6 + (1e-12 * chi);
                trial.CopyTo(p, 0);
                chi = Accumulate(series, centre, p, normal, gradient, out scatter);
                damping = Math.Max(damping / 10, 1e-12);
                if (done)
                {
                    break;
                }
            }
            else
            {
                damping = Math.Max(damping * 10, 1e-9);
                if (damping > 1e6)
                {
                    break;
                }
            }
        }

        return Finish(series, originS, centre, p, normal, chi, scatter, shortestS, longestS);
    }

    private static WarmUpModel? Finish(
        DriftSeries series, double originS, double centre, double[] p, double[,] normal, double chi, ResidualScatter scatter,
        double shortestS, double longestS)
    {
        int n = p.Length;
        if (NormalMatrix.Invert(normal) is not { } covariance)
        {
            return null;
        }

        double factor = Math.Max(1, chi / Math.Max(1, series.Count - n)) * scatter.Inflation;
        int terms = (n - 1) / 2;
        WarmUpTerm[] found = new WarmUpTerm[terms];
        bool atBound = false;

        // From (amplitude at the first reading, ln tau) to (amplitude at the origin, tau): amplitude' = amplitude e^(age/tau).
        double[,] jacobian = new double[n, n];
        jacobian[0, 0] = 1;
        double age = series.TimeS[0] - originS;
        for (int k = 0; k < terms; k++)
        {
            int a = 1 + (2 * k);
            double tau = Math.Exp(p[a + 1]);
            double grow = Math.Exp(age / tau);
            found[k] = new WarmUpTerm(p[a] * grow, tau);
            jacobian[a, a] = grow;
            jacobian[a, a + 1] = -p[a] * grow * age / tau;
            jacobian[a + 1, a + 1] = tau;
            atBound |= tau >= longestS * 0.999 || tau <= shortestS * 1.001;
        }

        double[,] mapped = new double[n, n];
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double sum = 0;
                for (int k = 0; k < n; k++)
                {
                    for (int l = 0; l < n; l++)
                    {
                        sum += jacobian[i, k] * covariance[k, l] * jacobian[j, l];
                    }
                }

                mapped[i, j] = factor * sum;
            }
        }

        if (terms == 2 && found[0].TauS > found[1].TauS)
        {
            (found[0], found[1]) = (found[1], found[0]);
            int[] order = [0, 3, 4, 1, 2];
            double[,] swapped = new double[n, n];
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < n; j++)
                {
                    swapped[i, j] = mapped[order[i], order[j]];
                }
            }

            mapped = swapped;
        }

        return new WarmUpModel(originS, centre + p[0], found, mapped, chi, series.Count, scatter.Neighbours, atBound);
    }

    // The linear parameters for the time constants in p.
    private static bool SolveLinear(DriftSeries series, double centre, double[] p)
    {
        int terms = (p.Length - 1) / 2;
        double[,] normal = new double[terms + 1, terms + 1];
        double[] right = new double[terms + 1];
        Span<double> row = stackalloc double[terms + 1];
        Span<double> rate = stackalloc double[terms];
        for (int k = 0; k < terms; k++)
        {
            rate[k] = Math.Exp(-p[2 + (2 * k)]);
        }

        ReadOnlySpan<double> time = series.TimeS;
        ReadOnlySpan<double> value = series.Value;
        ReadOnlySpan<double> standard = series.Standard;
        row[0] = 1;
        for (int i = 0; i < time.Length; i++)
        {
            double w = 1 / (standard[i] * standard[i]);
            for (int k = 0; k < terms; k++)
            {
                row[k + 1] = Math.Exp(-(time[i] - time[0]) * rate[k]);
            }

            for (int a = 0; a <= terms; a++)
            {
                right[a] += w * row[a] * (value[i] - centre);
                for (int b = 0; b <= terms; b++)
                {
                    normal[a, b] += w * row[a] * row[b];
                }
            }
        }

        double[] solution = new double[terms + 1];
        if (!NormalMatrix.TrySolve(normal, right, solution))
        {
            return false;
        }

        p[0] = solution[0];
        for (int k = 0; k < terms; k++)
        {
            p[1 + (2 * k)] = solution[k + 1];
        }

        return true;
    }

    private static double ChiSquare(DriftSeries series, double centre, ReadOnlySpan<double> p)
    {
        ReadOnlySpan<double> time = series.TimeS;
        ReadOnlySpan<double> value = series.Value;
        ReadOnlySpan<double> standard = series.Standard;
        int terms = (p.Length - 1) / 2;
        double rate1 = terms > 0 ? Math.Exp(-p[2]) : 0;
        double rate2 = terms > 1 ? Math.Exp(-p[4]) : 0;
        double sum = 0;
        for (int i = 0; i < time.Length; i++)
        {
            double age = time[i] - time[0];
            double model = p[0] + centre;
            if (terms > 0)
            {
                model += p[1] * Math.Exp(-age * rate1);
            }

            if (terms > 1)
            {
                model += p[3] * Math.Exp(-age * rate2);
            }

            double residual = (value[i] - model) / standard[i];
            sum += residual * residual;
        }

        return sum;
    }

    // Normal equations, right-hand side and sums over the residuals at p.
    private static double Accumulate(
        DriftSeries series, double centre, double[] p, double[,] normal, double[] gradient, out ResidualScatter scatter)
    {
        int n = p.Length;
        int terms = (n - 1) / 2;
        Array.Clear(normal);
        Array.Clear(gradient);
        scatter = default;
        ReadOnlySpan<double> time = series.TimeS;
        ReadOnlySpan<double> value = series.Value;
        ReadOnlySpan<double> standard = series.Standard;
        Span<double> row = stackalloc double[n];
        Span<double> rate = stackalloc double[terms];
        for (int k = 0; k < terms; k++)
        {
            rate[k] = Math.Exp(-p[2 + (2 * k)]);
        }

        for (int i = 0; i < time.Length; i++)
        {
            double u = 1 / standard[i];
            double age = time[i] - time[0];
            double model = p[0];
            row[0] = u;
            for (int k = 0; k < terms; k++)
            {
                double x = age * rate[k];
                double e = Math.Exp(-x);
                double part = p[1 + (2 * k)] * e;
                model += part;
                row[1 + (2 * k)] = u * e;
                row[2 + (2 * k)] = u * part * x;
            }

            double residual = (value[i] - centre - model) * u;
            scatter.Add(residual);
            for (int a = 0; a < n; a++)
            {
                gradient[a] += row[a] * residual;
                for (int b = 0; b <= a; b++)
                {
                    normal[a, b] += row[a] * row[b];
                }
            }
        }

        for (int a = 0; a < n; a++)
        {
            for (int b = a + 1; b < n; b++)
            {
                normal[a, b] = normal[b, a];
            }
        }

        return scatter.SumSquares;
    }
}
