using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Read;

public class PooledNoiseTests
{
    private static readonly AmplitudeMaker _maker = new(new DetectorScale(DetectorLaw.Declared(DetectorKind.RmsLinear, 400)), 400);

    [Fact]
    public void Points_that_scatter_alike_share_one_variance()
    {
        IReadOnlyList<AmplitudePoint> made = PooledNoise.Make([Point(1, 9), Point(2, 12), Point(1, 10), Point(2, 13)], _maker);
        Assert.All(made, point => Assert.Equal(11.0 / 100, point.Variance, 0.02 * 0.11));
    }

    [Fact]
    public void Settings_that_differ_keep_their_own_and_a_burst_stays_with_its_visit()
    {
        IReadOnlyList<AmplitudePoint> made = PooledNoise.Make(
            [Point(1, 9), Point(2, 90), Point(3, 10), Point(1, 11), Point(2, 110), Point(3, 1000)], _maker);
        double[] expected = [10, 100, 10, 10, 100, 1000];
        Assert.All(made.Zip(expected), pair => Assert.Equal(pair.Second / 100, pair.First.Variance, 0.02 * pair.Second / 100));
    }

    // A point of 100 samples of mean 1400 with a given variance, at one of a few settings.
    private static RawPoint Point(int at, double variance)
    {
        long squares = (long)Math.Round((99 * variance) + (100.0 * 1400 * 1400));
        return new RawPoint(new Setting(9, 260 + at, 256, 150_000 + at), 100, 140_000, squares, 1300, 1500, 0);
    }
}
