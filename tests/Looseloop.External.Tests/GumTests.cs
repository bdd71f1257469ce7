using Looseloop.Resonance;
using Looseloop.Statistics;

namespace Looseloop.External.Tests;

/// <summary>
/// Worked examples and tables of the GUM (JCGM 100:2008). Data and printed results of H.1, H.2 and H.3 are from memory; that they
/// fit each other to the printed digits supports both.
/// </summary>
public sealed class GumTests
{
    [Theory]
    [InlineData(1, 12.71, 13.97, 63.66, 235.80)]
    [InlineData(2, 4.30, 4.53, 9.92, 19.21)]
    [InlineData(5, 2.57, 2.65, 4.03, 5.51)]
    [InlineData(10, 2.23, 2.28, 3.17, 3.96)]
    [InlineData(20, 2.09, 2.13, 2.85, 3.42)]
    [InlineData(50, 2.01, 2.05, 2.68, 3.16)]
    [InlineData(double.PositiveInfinity, 1.960, 2.000, 2.576, 3.000)]
    public void Table_G2(double freedom, double t95, double t9545, double t99, double t9973)
    {
        double rounding = double.IsInfinity(freedom) ? 0.0005 : 0.005;
        Assert.Equal(t95, CoverageFactor.TwoSided(freedom, 0.95), rounding + 1e-9);
        Assert.Equal(t9545, CoverageFactor.TwoSided(freedom, 0.9545), rounding + 1e-4);
        Assert.Equal(t99, CoverageFactor.TwoSided(freedom, 0.99), rounding + 1e-9);
        Assert.Equal(t9973, CoverageFactor.TwoSided(freedom, 0.9973), freedom == 1 ? 0.05 : rounding + 1e-3);
    }

    [Theory]
    [InlineData(1.5)]
    [InlineData(3)]
    [InlineData(16.8)]
    [InlineData(500)]
    public void Coverage_factors_agree_with_MathNet(double freedom)
    {
        double theirs = MathNet.Numerics.Distributions.StudentT.InvCDF(0, 1, freedom, 0.975);
        Assert.Equal(theirs, CoverageFactor.TwoSided(freedom, 0.95), 1e-8 * theirs);
    }

    [Theory]
    [InlineData(0.3, 1)]
    [InlineData(45.2, 56)]
    [InlineData(140, 56)]
    [InlineData(1000, 900)]
    public void Chi_square_agrees_with_MathNet(double sum, double freedom)
    {
        double theirs = 1 - MathNet.Numerics.Distributions.ChiSquared.CDF(freedom, sum);
        Assert.Equal(theirs, ChiSquare.UpperTail(sum, freedom), 1e-11);
    }

    [Fact]
    public void H1_end_gauge()
    {
        // Nanometres: standard 25 (18), difference 9.7 (25.6), expansion 2.9 (50), temperature 16.6 (2).
        (double, double)[] terms = [(25, 18), (9.7, 25.6), (2.9, 50), (16.6, 2)];
        double combined = Math.Sqrt(terms.Sum(term => term.Item1 * term.Item1));
        double freedom = UncertaintyPropagation.EffectiveDegreesOfFreedom(terms);
        Assert.Equal(31.7, combined, 0.05);
        Assert.Equal(16.8, freedom, 0.1);
        Assert.Equal(93, CoverageFactor.TwoSided(16, 0.99) * 32, 0.6);
    }

    [Fact]
    public void H2_resistance_and_reactance()
    {
        double[] v = [5.007, 4.994, 5.005, 4.990, 4.999];
        double[] i = [19.663e-3, 19.639e-3, 19.640e-3, 19.685e-3, 19.678e-3];
        double[] phi = [1.0456, 1.0438, 1.0468, 1.0428, 1.0433];
        (double[] mean, double[] covariance) =
            UncertaintyPropagation.OfMeans([.. Enumerable.Range(0, 5).Select(k => new[] { v[k], i[k], phi[k] })]);
        double z = mean[0] / mean[1];
        double r = z * Math.Cos(mean[2]);
        double x = z * Math.Sin(mean[2]);
        double[] byR = [r / mean[0], -r / mean[1], -x];
        double[] byX = [x / mean[0], -x / mean[1], r];
        double[] byZ = [z / mean[0], -z / mean[1], 0];
        double uR = UncertaintyPropagation.Combine(byR, covariance);
        double uX = UncertaintyPropagation.Combine(byX, covariance);
        double uZ = UncertaintyPropagation.Combine(byZ, covariance);
        Assert.Equal(127.732, r, 5e-4);
        Assert.Equal(219.847, x, 5e-4);
        Assert.Equal(254.260, z, 5e-4);
        Assert.Equal(0.071, uR, 5e-4);
        Assert.Equal(0.2956, uX, 5e-5);
        Assert.Equal(0.236, uZ, 5e-4);
        Assert.Equal(-0.588, UncertaintyPropagation.Covariance(byR, byX, covariance) / uR / uX, 5e-4);
        Assert.Equal(-0.485, UncertaintyPropagation.Covariance(byR, byZ, covariance) / uR / uZ, 5e-4);
        Assert.Equal(0.993, UncertaintyPropagation.Covariance(byX, byZ, covariance) / uX / uZ, 5e-4);
    }

    [Fact]
    public void H3_thermometer_line()
    {
        double[] t = [21.521, 22.012, 22.512, 23.003, 23.507, 23.999, 24.513, 25.002, 25.503, 26.010, 26.511];
        double[] b = [-0.171, -0.169, -0.166, -0.159, -0.164, -0.165, -0.156, -0.157, -0.159, -0.161, -0.160];
        Assert.True(WeightedLine.TryFit([.. t.Select(at => at - 20)], b, out WeightedLine line));
        Assert.Equal(-0.1712, line.Intercept, 5e-5);
        Assert.Equal(0.0029, line.InterceptStandard, 5e-5);
        Assert.Equal(0.00218, line.Slope, 5e-6);
        Assert.Equal(0.00067, line.SlopeStandard, 5e-6);
        Assert.Equal(-0.930, line.Correlation, 5e-4);
        Assert.Equal(-0.1494, line.At(10), 5e-5);
        Assert.Equal(0.0041, line.StandardAt(10), 5e-5);
    }
}
