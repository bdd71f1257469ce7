using Looseloop.Readings;

namespace Looseloop.RecordBench;

/// <summary>Made-up readings of the size of real ones: 13 points, 3 dark levels, 6 budget lines. The figures mean nothing.</summary>
public static class SampleReadings
{
    private static readonly DateTimeOffset _begin = new(2026, 3, 1, 8, 0, 0, TimeSpan.Zero);

    /// <summary>The box they are from.</summary>
    public static BoxIdentity Box { get; } = new("bench", "esp32", "0.1.0", 1, 123456789, 19, 30000, 600000, 4095, 1);

    /// <summary>The n-th reading, a second after the one before.</summary>
    public static Reading At(int n, string? coil = "bench coil", string? note = null)
    {
        Random random = new(n);
        double f0 = 150000 + (120 * Math.Exp(-n / 900.0)) + random.NextDouble();
        RawPoint[] points = new RawPoint[13];
        for (int i = 0; i < points.Length; i++)
        {
            long sum = 64L * (500 + random.Next(2000));
            points[i] = new RawPoint(
                new Setting(9, 260 + i, 256, 80e6 * 256 / ((260 + i) * 512.0)), 64, sum, (sum * sum / 64) + random.Next(10000),
                (int)(sum / 64) - 3, (int)(sum / 64) + 3, (n * 1000000L) + (i * 10000L));
        }

        DarkLevel[] dark = new DarkLevel[3];
        for (int i = 0; i < dark.Length; i++)
        {
            dark[i] = new DarkLevel(0, 1000, 400123 + i, 160100000, 396, 405, n * 1000000L, (n * 1000000L) + 100000);
        }

        return new Reading
        {
            Id = Guid.CreateVersion7(),
            Utc = _begin.AddSeconds(n),
            MonotonicS = 1000 + n,
            BoardTimeUs = n * 1000000L,
            BoardSeconds = 0.21,
            Box = Box,
            HostVersion = "0.1.0",
            Coil = coil,
            Note = note,
            SetUp = new Dictionary<string, string> { ["top"] = "ring 300x80", ["earth"] = "rod" },
            F0Hz = f0,
            Q = 200 + random.NextDouble(),
            PeakCounts = 2000,
            FeedThrough = 0.03,
            TemperatureC = 20 + random.NextDouble(),
            Budget = new Budget(
            [
                new BudgetLine("noise", 0.3, 0.0007, true, 8, "scatter of the points"),
                new BudgetLine("settings", 0.1, 0.0002, true, double.PositiveInfinity, "spacing of the settings"),
                new BudgetLine("clock", 4.5, 0, false, double.PositiveInfinity, "crystal, 30 ppm"),
                new BudgetLine("pull", 60, 0.002, false, double.PositiveInfinity, "no standoff"),
                new BudgetLine("detector", 0.2, 0.003, false, 20, "ladder"),
                new BudgetLine("dark", 0, 0.001, false, 999, "three looks"),
            ]),
            Verdict = Verdict.Sound,
            Reasons = [new Reason(ReasonCode.PullNotMeasured, "no standoff is on record for this coil")],
            Points = points,
            Dark = dark,
        };
    }

    /// <summary>A run to put them in.</summary>
    public static RunStart Start(string procedure = "log", string? coil = "bench coil", string? note = null) => new()
    {
        Id = Guid.CreateVersion7(),
        Utc = _begin,
        Procedure = procedure,
        HostVersion = "0.1.0",
        Box = Box,
        Coil = coil,
        Note = note,
        Options = new Dictionary<string, string> { ["every"] = "1 s" },
    };
}
