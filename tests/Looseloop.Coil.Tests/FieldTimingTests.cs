using System.Diagnostics;
using Xunit.Abstractions;

namespace Looseloop.Coil.Tests;

/// <summary>Times are taken alone, after the tests that run side by side.</summary>
[CollectionDefinition("timing", DisableParallelization = true)]
public class TimingGroup;

[Collection("timing")]
public class FieldTimingTests(ITestOutputHelper output)
{
    [Fact]
    public void Two_hundred_bands_below_60_ms_and_a_thousand_below_3_s()
    {
        double Best(int n, int m, int rounds)
        {
            double best = double.PositiveInfinity;
            for (int i = 0; i < rounds; i++)
            {
                var watch = Stopwatch.StartNew();
                ModeSolver.Lowest(new FieldModel(SampleCoil.Loaded, new Resolution(n, m, true)), 3);
                best = Math.Min(best, watch.Elapsed.TotalMilliseconds);
            }

            return best;
        }

        double small = Best(200, 48, 25);
        double large = Best(1000, 128, 2);
        output.WriteLine($"n = 200: {small:F1} ms; n = 1000: {large:F0} ms");
        Assert.True(small < 60, $"n = 200 took {small:F1} ms");
        Assert.True(large < 3000, $"n = 1000 took {large:F0} ms");
    }

    // 8 (N^2 + n^2) bytes, as the model states, and the vectors of the iteration on top.
    [Fact]
    public void A_thousand_bands_take_17_megabytes()
    {
        long before = GC.GetAllocatedBytesForCurrentThread();
        ModeSolver.Lowest(new FieldModel(SampleCoil.Loaded, new Resolution(1000, 64, true)), 1);
        double megabytes = (GC.GetAllocatedBytesForCurrentThread() - before) / 1e6;
        output.WriteLine($"{megabytes:F1} MB");
        Assert.InRange(megabytes, 17.0, 20.0);
    }
}
