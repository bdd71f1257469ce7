using System.Diagnostics;

namespace Looseloop.Drift.Tests;

public class MillionReadingsTests
{
    [Fact]
    public void A_million_readings_fit_into_little_memory()
    {
        Noise noise = new(1);
        List<DriftPoint> points = new(1_000_000);
        for (int i = 0; i < 1_000_000; i++)
        {
            points.Add(new DriftPoint(i, 250000 + (120 * Math.Exp(-i / 900.0)) + (3 * noise.Next()), 3));
        }

        DriftAnalysis analysis = DriftAnalysis.Of(DriftSeries.Of(points), new DriftOptions { WindowHalfWidth = 60 });
        Assert.Equal(SettledState.Settled, analysis.Settling.State);
        Assert.Equal(900, analysis.Model!.Terms[0].TauS, 4 * analysis.Model.TauStandardS(0));
        Assert.Equal(900 * Math.Log(2), analysis.Window!.TimeS, 4 * analysis.Window.StandardS);
        Assert.True(
            Process.GetCurrentProcess().PeakWorkingSet64 < 400L << 20,
            $"{Process.GetCurrentProcess().PeakWorkingSet64 >> 20} MB at the peak, the test's own list included");
    }
}
