using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>What many noisy fits of one curve did.</summary>
internal sealed class MonteCarlo
{
    /// <summary>Spread of f0 in bandwidths and relative spread of Q, over sigma/A, times the square root of the points.</summary>
    public double F0Constant { get; private init; }

    public double QConstant { get; private init; }

    /// <summary>Mean error over the spread.</summary>
    public double F0Bias { get; private init; }

    public double QBias { get; private init; }

    /// <summary>Share of 95 % intervals that hold the truth, with stated variances.</summary>
    public double F0Covered { get; private init; }

    public double QCovered { get; private init; }

    /// <summary>The same with the variance from the scatter.</summary>
    public double F0CoveredByScatter { get; private init; }

    public double QCoveredByScatter { get; private init; }

    public int Failed { get; private init; }

    public static MonteCarlo Run(
        double[] grid, double f0, double q, Func<double, double> amplitude, double sigma, FitOptions options, int trials, int seed,
        double tFactor = 2.0, Func<double, Random, double>? outlier = null)
    {
        var random = new Random(seed);
        var fitter = new ResonanceFitter(grid.Length);
        double[] clean = [.. grid.Select(amplitude)];
        var points = new FitPoint[grid.Length];
        double bandwidth = f0 / q;
        double s1 = 0, s2 = 0, t1 = 0, t2 = 0;
        int good = 0, f0In = 0, qIn = 0, f0InScatter = 0, qInScatter = 0, failed = 0;
        for (int trial = 0; trial < trials; trial++)
        {
            for (int i = 0; i < grid.Length; i++)
            {
                double noise = sigma * TestCurves.Gaussian(random);
                points[i] = new FitPoint(grid[i], clean[i] + noise + (outlier?.Invoke(sigma, random) ?? 0), sigma * sigma);
            }

            ResonanceFit fit = fitter.Fit(points, options);
            if (!fit.IsFitted)
            {
                failed++;
                continue;
            }

            good++;
            double e = (fit.F0Hz - f0) / bandwidth;
            double g = (fit.Q / q) - 1;
            s1 += e;
            s2 += e * e;
            t1 += g;
            t2 += g * g;
            f0In += Math.Abs(fit.F0Hz - f0) < 1.96 * fit.Stated.F0Hz ? 1 : 0;
            qIn += Math.Abs(fit.Q - q) < 1.96 * fit.Stated.Q ? 1 : 0;
            f0InScatter += Math.Abs(fit.F0Hz - f0) < tFactor * fit.Scatter.F0Hz ? 1 : 0;
            qInScatter += Math.Abs(fit.Q - q) < tFactor * fit.Scatter.Q ? 1 : 0;
        }

        double n = good;
        double f0Sd = Math.Sqrt((s2 - (s1 * s1 / n)) / (n - 1));
        double qSd = Math.Sqrt((t2 - (t1 * t1 / n)) / (n - 1));
        double unit = Math.Sqrt(grid.Length) / sigma;
        return new MonteCarlo
        {
            F0Constant = f0Sd * unit,
            QConstant = qSd * unit,
            F0Bias = s1 / n / f0Sd,
            QBias = t1 / n / qSd,
            F0Covered = f0In / n,
            QCovered = qIn / n,
            F0CoveredByScatter = f0InScatter / n,
            QCoveredByScatter = qInScatter / n,
            Failed = failed,
        };
    }

    public override string ToString() =>
        $"c_f0 {F0Constant:F4}, c_Q {QConstant:F4}, bias {F0Bias:F3}/{QBias:F3} SD, covered {F0Covered:P1}/{QCovered:P1}, "
        + $"by scatter {F0CoveredByScatter:P1}/{QCoveredByScatter:P1}, failed {Failed}";
}
