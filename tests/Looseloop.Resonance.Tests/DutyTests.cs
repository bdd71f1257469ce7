using Looseloop.Resonance;

namespace Looseloop.Resonance.Tests;

/// <summary>Harmonics of a pulse train (Fourier series, any textbook) and the naming of responses by duty.</summary>
public sealed class DutyTests
{
    [Fact]
    public void Harmonics_at_duty_one_fifth()
    {
        double[] expected = [.374196, .302731, .201820, .093549, 0];
        for (int n = 1; n <= 5; n++)
        {
            Assert.Equal(expected[n - 1], DutyHarmonics.Amplitude(n, 0.2), 1e-6);
        }
    }

    [Theory]
    [InlineData(1, 0.5878)]
    [InlineData(3, 0.9511)]
    [InlineData(5, 0)]
    [InlineData(7, 0.9511)]
    public void Ratio_of_one_fifth_to_one_half(int harmonic, double ratio) =>
        Assert.Equal(ratio, DutyHarmonics.Ratio(harmonic, 0.2, 0.5), 1e-4);

    [Fact]
    public void A_numerical_fourier_integral_agrees()
    {
        foreach (double duty in new[] { 0.5, 1.0 / 3, 51.0 / 256, 0.8 })
        {
            for (int n = 1; n <= 7; n++)
            {
                double cosine = 0, sine = 0;
                const int steps = 200000;
                for (int i = 0; i < steps; i++)
                {
                    double t = (i + 0.5) / steps;
                    double level = t < duty ? 1 : 0;
                    cosine += 2 * level * Math.Cos(2 * Math.PI * n * t) / steps;
                    sine += 2 * level * Math.Sin(2 * Math.PI * n * t) / steps;
                }

                Assert.Equal(double.Hypot(cosine, sine), DutyHarmonics.Amplitude(n, duty), 3e-5);
            }
        }
    }

    [Theory]
    [InlineData(0.5878, 0.01, true, false, 1)]
    [InlineData(0.9511, 0.01, false, true, 3)]
    [InlineData(0.01, 0.01, false, true, 5)]
    [InlineData(30, 5, false, true, 2)]
    [InlineData(0.75, 0.01, false, false, 0)]
    [InlineData(0.70, 0.2, false, false, 0)]
    [InlineData(double.NaN, 0.01, false, false, 0)]
    public void Responses_are_named_or_left_unknown(double ratio, double standard, bool fundamental, bool ghost, int order)
    {
        // 51 of 256 counts is the timer's nearest to one fifth at 300 kHz.
        DutyTestResult result = DutyTest.Classify(ratio, standard, 51.0 / 256, 0.5);
        Assert.Equal(fundamental, result.IsFundamental);
        Assert.Equal(ghost, result.IsGhost);
        Assert.Equal(order, result.Order);
    }

    [Fact]
    public void The_seventh_looks_like_the_third()
    {
        DutyTestResult result = DutyTest.Classify(0.9511, 0.01, 0.2, 0.5);
        Assert.Equal([3, 7], result.Orders);
        Assert.True(result.IsGhost);
    }
}
