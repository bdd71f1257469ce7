using System.Globalization;
using Looseloop.Resonance;
using Xunit.Abstractions;

namespace Looseloop.External.Tests;

/// <summary>
/// A measured resonance: 201 complex transmission points, A. Gregory, "Q-factor measurement by using a vector network analyser",
/// NPL Report MAT 58 (2021), figure 6b; data under CC0. The complex fit published with it gives Q0 = 7546, that is a loaded
/// Q of 7455; from amplitude alone the invariant model is known to give 7443(6), the three-parameter curve 7452(3).
/// </summary>
public sealed class NplResonanceTests(ITestOutputHelper output)
{
    [SharedTheory]
    [InlineData(BackgroundModel.FeedThrough, 7443, 10)]
    [InlineData(BackgroundModel.None, 7452, 6)]
    public void Amplitude_alone_gives_the_loaded_q(BackgroundModel background, double q, double tolerance)
    {
        FitPoint[] points = Points();
        Assert.Equal(201, points.Length);
        ResonanceFit fit = ResonanceFitter.FitOnce(points, new FitOptions { Background = background });
        output.WriteLine($"f0 {fit.F0Hz / 1e9:F9} GHz, Q {fit.Q:F1} ({fit.Scatter.Q:F1}), feed-through {fit.FeedThrough.Ratio:P2}");
        Assert.True(fit.IsFitted);
        Assert.Equal(q, fit.Q, tolerance);
        Assert.InRange(fit.Scatter.Q, 1, 10);

        // The complex fit's f0, 3.987848374 GHz: within 2 % of the bandwidth, as its quarter-per-cent feed-through allows.
        Assert.Equal(3.987848374e9, fit.F0Hz, 0.02 * fit.BandwidthHz);
    }

    private static FitPoint[] Points() =>
        [.. File.ReadLines(SharedData.File("npl-mat58", "figure6b.csv")).Skip(1).Select(line =>
        {
            double[] row = [.. line.Split(',').Select(part => double.Parse(part, CultureInfo.InvariantCulture))];
            return new FitPoint(row[0] * 1e9, double.Hypot(row[1], row[2]));
        })];
}
