using Looseloop.Resonance;
using Xunit.Abstractions;

namespace Looseloop.External.Tests;

/// <summary>
/// The minimiser against certified values: NIST/ITL Statistical Reference Datasets, nonlinear regression
/// (www.itl.nist.gov/div898/strd). The digits asked for are those a double-precision Levenberg-Marquardt is known to reach.
/// </summary>
public sealed class NistStrdTests(ITestOutputHelper output)
{
    [SharedTheory]
    [InlineData("Eckerle4", 8)]
    [InlineData("Gauss1", 8)]
    [InlineData("Gauss2", 8)]
    [InlineData("Gauss3", 8)]
    [InlineData("BoxBOD", 8)]
    [InlineData("Misra1a", 8)]
    [InlineData("MGH17", 6)]
    [InlineData("Thurber", 6)]
    [InlineData("Rat43", 6)]
    [InlineData("Lanczos3", 5)]
    public void Both_starts_reach_the_certified_values(string name, double digits)
    {
        NistSet set = NistSet.Load(name);
        foreach (double[] start in new[] { set.Start1, set.Start2 })
        {
            var problem = new NistProblem(set, NistModels.Of(name));
            int n = start.Length;
            var minimiser = new LevenbergMarquardt(n, set.X.Length);
            double[] b = [.. start];
            MinimiserResult result = minimiser.Minimise(ref problem, b);
            Assert.Equal(MinimiserOutcome.Converged, result.Outcome);

            double[] covariance = new double[n * n];
            Assert.True(minimiser.TryCovariance(covariance));
            double variance = result.SumOfSquares / (set.X.Length - n);
            double worst = double.PositiveInfinity;
            double worstSd = double.PositiveInfinity;
            for (int j = 0; j < n; j++)
            {
                worst = Math.Min(worst, MatchingDigits(b[j], set.Certified[j]));
                worstSd = Math.Min(worstSd, MatchingDigits(Math.Sqrt(variance * covariance[j * (n + 1)]), set.CertifiedSd[j]));
            }

            output.WriteLine($"{name}: {worst:F1} digits, SD {worstSd:F1}, RSS {MatchingDigits(result.SumOfSquares, set.CertifiedRss):F1}, "
                + $"{result.Iterations} iterations, {result.Evaluations} evaluations");
            Assert.True(worst >= digits, $"{name}: {worst:F2} digits");
            Assert.True(worstSd >= Math.Min(digits, 5), $"{name}: SD {worstSd:F2} digits");
            Assert.True(MatchingDigits(result.SumOfSquares, set.CertifiedRss) >= Math.Min(digits, 6));
        }
    }

    [Fact]
    public void Eckerle4_as_printed_needs_no_file()
    {
        // The certified values typed in from the data set's page; the data are its 35 points.
        double[] x = [400, 405, 410, 415, 420, 425, 430, 435, 436.5, 438, 439.5, 441, 442.5, 444, 445.5, 447, 448.5, 450, 451.5, 453,
            454.5, 456, 457.5, 459, 460.5, 462, 463.5, 465, 470, 475, 480, 485, 490, 495, 500];
        double[] y = [.0001575, .0001699, .000235, .0003102, .0004917, .000871, .0017418, .00464, .0065895, .0097302, .0149002, .023731,
            .0401683, .0712559, .1264458, .2073413, .2902366, .3445623, .3698049, .3668534, .3106727, .2078154, .1164354, .0616764,
            .03372, .0194023, .0117831, .0074357, .0022732, .00088, .0004579, .0002345, .0001586, .0001143, .000071];
        var set = new NistSet(x, y, [1, 10, 500], [1.5, 5, 450], [1.5543827178, 4.0888321754, 451.54121844], [], 1.4635887487e-3);
        var problem = new NistProblem(set, NistModels.Of("Eckerle4"));
        double[] b = [1, 10, 500];
        MinimiserResult result = new LevenbergMarquardt(3, 35).Minimise(ref problem, b);
        for (int j = 0; j < 3; j++)
        {
            Assert.True(MatchingDigits(b[j], set.Certified[j]) >= 8);
        }

        Assert.True(MatchingDigits(result.SumOfSquares, set.CertifiedRss) >= 8);
    }

    private static double MatchingDigits(double value, double certified) =>
        value == certified ? 11 : -Math.Log10(Math.Abs(value - certified) / Math.Abs(certified));
}
