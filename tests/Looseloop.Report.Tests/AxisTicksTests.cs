using Looseloop.Report.Plots;

namespace Looseloop.Report.Tests;

public class AxisTicksTests
{
    [Theory]
    [InlineData(0, 1, 5, "0.0 0.2 0.4 0.6 0.8 1.0")]
    [InlineData(149950, 150150, 4, "149950 150000 150050 150100 150150")]
    [InlineData(-0.03, 0.03, 6, "-0.03 -0.02 -0.01 0.00 0.01 0.02 0.03")]
    [InlineData(146.2, 153.8, 4, "148 150 152")]
    public void Ticks_are_round_and_have_the_decimals_they_need(double low, double high, int most, string expected) =>
        Assert.Equal(expected, string.Join(' ', AxisTicks.Of(low, high, most).Labels));

    [Fact]
    public void Ticks_stay_within_their_range_for_any_range()
    {
        Random random = new(1);
        for (int i = 0; i < 2000; i++)
        {
            double low = (random.NextDouble() - 0.5) * Math.Pow(10, random.Next(-6, 7));
            double high = low + (random.NextDouble() * Math.Pow(10, random.Next(-6, 7))) + (Math.Abs(low) * 1e-9) + 1e-12;
            AxisTicks ticks = AxisTicks.Of(low, high, 5);
            double slack = 1e-6 * (high - low);
            Assert.InRange(ticks.Values.Count, 1, 7);
            Assert.All(ticks.Values, v => Assert.InRange(v, low - slack, high + slack));
            Assert.Equal(ticks.Labels.Distinct().Count(), ticks.Labels.Count);
        }
    }
}
