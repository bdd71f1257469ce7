namespace Looseloop.Statistics.Tests;

public class DistributionTests
{
    // GUM (JCGM 100:2008) table G.2, from memory; printed to two decimals.
    [Theory]
    [InlineData(0.95, 1, 12.71)]
    [InlineData(0.95, 5, 2.57)]
    [InlineData(0.95, 10, 2.23)]
    [InlineData(0.95, 50, 2.01)]
    [InlineData(0.9545, 1, 13.97)]
    [InlineData(0.9545, 10, 2.28)]
    [InlineData(0.9545, 100, 2.025)]
    [InlineData(0.99, 16, 2.92)]
    [InlineData(0.6827, 2, 1.32)]
    public void Coverage_factors_are_those_of_the_guide(double coverage, double freedom, double printed) =>
        Assert.Equal(printed, CoverageFactor.TwoSided(freedom, coverage), 0.0051);

    [Fact]
    public void Coverage_factor_without_end_is_the_normal_one() =>
        Assert.Equal(1.959964, CoverageFactor.TwoSided(double.PositiveInfinity, 0.95), 1e-5);

    // Oracle: MathNet.Numerics.
    [Theory]
    [InlineData(0.95, 3)]
    [InlineData(0.95, 199.5)]
    [InlineData(0.95, 200.5)]
    [InlineData(0.9973, 1000)]
    [InlineData(0.9, 1e7)]
    public void Coverage_factors_agree_with_an_independent_library(double coverage, double freedom)
    {
        double expected = MathNet.Numerics.Distributions.StudentT.InvCDF(0, 1, freedom, (1 + coverage) / 2);
        Assert.Equal(expected, CoverageFactor.TwoSided(freedom, coverage), 2e-7);
    }

    // Oracle: MathNet.Numerics, an independent library.
    [Theory]
    [InlineData(3.2, 2, 40)]
    [InlineData(0.4, 3, 7)]
    [InlineData(12.5, 2, 900)]
    [InlineData(7.1, 2, 99997)]
    public void Tails_of_F_agree_with_an_independent_library(double f, double d1, double d2)
    {
        double expected = MathNet.Numerics.SpecialFunctions.BetaRegularized(d2 / 2, d1 / 2, d2 / (d2 + (d1 * f)));
        Assert.Equal(1, FisherF.UpperTail(f, d1, d2) / expected, 1e-8);
    }
}
