using System.Numerics;
using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>
/// Response curves from complex arithmetic: y = |A/(1 + jx) + b exp(j phi)|. Nothing of the fit's own model is used.
/// </summary>
internal static class TestCurves
{
    /// <summary>So high a Q that the exact and the narrow-band form are the same to 1e-6 of the bandwidth.</summary>
    public const double NarrowQ = 1e6;

    public const double F0 = 1e6;

    /// <summary>Frequencies of an even grid over +-k bandwidths, ends included.</summary>
    public static double[] Grid(int count, double k, double f0 = F0, double q = NarrowQ) =>
        [.. Enumerable.Range(0, count).Select(i => f0 + (f0 / q * k * ((2.0 * i / (count - 1)) - 1)))];

    public static double Amplitude(double f, double f0, double q, double a, double b = 0, double phaseDeg = 0)
    {
        var coil = a / new Complex(1, q * ((f / f0) - (f0 / f)));
        return (coil + Complex.FromPolarCoordinates(b, phaseDeg * Math.PI / 180)).Magnitude;
    }

    public static FitPoint[] Points(double[] grid, Func<double, double> amplitude, double sigma = 0, Random? random = null) =>
        [.. grid.Select(f => new FitPoint(f, amplitude(f) + (sigma == 0 ? 0 : sigma * Gaussian(random!)), sigma > 0 ? sigma * sigma : double.NaN))];

    public static double Gaussian(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
