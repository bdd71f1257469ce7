namespace Looseloop.Drift.Tests;

// GUM (JCGM 100:2008) example H.3, calibration of a thermometer: corrections b against temperature t, b = y1 + y2 (t - 20).
// Data and printed results from memory; they agree with each other to all printed digits.
public class WeightedLineTests
{
    private static readonly double[] _t =
        [21.521, 22.012, 22.512, 23.003, 23.507, 23.999, 24.513, 25.002, 25.503, 26.010, 26.511];

    private static readonly double[] _b =
        [-0.171, -0.169, -0.166, -0.159, -0.164, -0.165, -0.156, -0.157, -0.159, -0.161, -0.160];

    [Fact]
    public void Thermometer_of_the_guide()
    {
        double[] x = [.. _t.Select(t => t - 20)];
        double[] equal = [.. _t.Select(_ => 1.0)];
        WeightedLine line = WeightedLine.Fit(x, _b, equal, trustStated: false);
        Assert.Equal(-0.1712, line.Intercept, 0.00005);
        Assert.Equal(0.0029, line.InterceptStandard, 0.00005);
        Assert.Equal(0.00218, line.Slope, 0.000005);
        Assert.Equal(0.00067, line.SlopeStandard, 0.000005);
        Assert.Equal(-0.930, line.Correlation, 0.0005);
        Assert.Equal(0.0035, line.Scatter, 0.00005);
        Assert.Equal(-0.1494, line.At(10), 0.00005);
        Assert.Equal(0.0041, line.StandardAt(10), 0.00005);
    }

    [Fact]
    public void Stated_uncertainties_are_a_floor_when_trusted()
    {
        double[] x = [0, 1, 2, 3];
        double[] y = [1, 2, 3, 4];
        double[] u = [0.5, 0.5, 0.5, 0.5];

        // Closed form: u / sqrt(sum (x - mean)^2) = 0.5 / sqrt 5.
        Assert.Equal(0.5 / Math.Sqrt(5), WeightedLine.Fit(x, y, u).SlopeStandard, 1e-12);
    }
}
