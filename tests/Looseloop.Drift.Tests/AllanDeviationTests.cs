namespace Looseloop.Drift.Tests;

// Values: W. J. Riley, Handbook of Frequency Stability Analysis, NIST SP 1065 (2008), section 12.4 (the 1000-point set and its
// generator) and the 9-point set of NBS Monograph 140, Annex 8.E.
public class AllanDeviationTests
{
    private static readonly double[] _nine = [892, 809, 823, 798, 671, 644, 883, 903, 677];

    private static double[] Thousand()
    {
        double[] y = new double[1000];
        long n = 1234567890;
        for (int i = 0; i < y.Length; i++)
        {
            y[i] = n / 2147483647.0;
            n = 16807 * n % 2147483647;
        }

        return y;
    }

    private static void SevenDigits(double published, double computed) =>
        Assert.True(Math.Abs((computed - published) / published) < 5.1e-7, $"published {published:R}, computed {computed:R}");

    [Fact]
    public void The_generator_gives_the_published_statistics()
    {
        double[] y = Thousand();
        SevenDigits(9.957453e-1, y.Max());
        SevenDigits(1.371760e-3, y.Min());
        SevenDigits(4.897745e-1, y.Average());
        double mean = y.Average();
        SevenDigits(2.884664e-1, Math.Sqrt(y.Sum(v => (v - mean) * (v - mean)) / (y.Length - 1)));
    }

    [Theory]
    [InlineData(1, 2.922319e-1)]
    [InlineData(10, 9.965736e-2)]
    [InlineData(100, 3.897804e-2)]
    public void Plain_deviation_of_the_thousand_points(int m, double published) =>
        SevenDigits(published, AllanDeviation.Plain(AllanDeviation.Phase(Thousand(), 1), m, 1));

    [Theory]
    [InlineData(1, 2.922319e-1)]
    [InlineData(10, 9.159953e-2)]
    [InlineData(100, 3.241343e-2)]
    public void Overlapping_deviation_of_the_thousand_points(int m, double published) =>
        SevenDigits(published, AllanDeviation.Overlapping(AllanDeviation.Phase(Thousand(), 1), m, 1));

    [Theory]
    [InlineData(1, 2.922319e-1)]
    [InlineData(10, 6.172376e-2)]
    [InlineData(100, 2.170921e-2)]
    public void Modified_deviation_of_the_thousand_points(int m, double published) =>
        SevenDigits(published, AllanDeviation.Modified(AllanDeviation.Phase(Thousand(), 1), m, 1));

    [Theory]
    [InlineData(1, 2.922319e-1)]
    [InlineData(10, 9.134743e-2)]
    [InlineData(100, 3.406530e-2)]
    public void Total_deviation_of_the_thousand_points(int m, double published) =>
        SevenDigits(published, AllanDeviation.Total(AllanDeviation.Phase(Thousand(), 1), m, 1));

    [Theory]
    [InlineData(1, 91.22945, 91.22945, 91.22945)]
    [InlineData(2, 115.8082, 85.95287, 74.78849)]
    public void Nine_point_set(int m, double plain, double overlapping, double modified)
    {
        double[] phase = AllanDeviation.Phase(_nine, 1);
        SevenDigits(plain, AllanDeviation.Plain(phase, m, 1));
        SevenDigits(overlapping, AllanDeviation.Overlapping(phase, m, 1));
        SevenDigits(modified, AllanDeviation.Modified(phase, m, 1));
    }

    [Fact]
    public void Spacing_does_not_change_the_deviation_of_frequencies()
    {
        double[] y = Thousand();
        double one = AllanDeviation.Overlapping(AllanDeviation.Phase(y, 1), 10, 1);
        double thirty = AllanDeviation.Overlapping(AllanDeviation.Phase(y, 30), 10, 30);
        Assert.Equal(one, thirty, 1e-12);
    }

    [Fact]
    public void Too_few_points_give_no_figure()
    {
        double[] phase = AllanDeviation.Phase(_nine, 1);
        Assert.True(double.IsNaN(AllanDeviation.Plain(phase, 5, 1)));
        Assert.True(double.IsNaN(AllanDeviation.Overlapping(phase, 5, 1)));
        Assert.True(double.IsNaN(AllanDeviation.Modified(phase, 4, 1)));
        Assert.Throws<ArgumentOutOfRangeException>(() => AllanDeviation.Plain(phase, 0, 1));
    }
}
