using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.RecordBench;

namespace Looseloop.CommandLine.Tests.Record;

/// <summary>A record of made-up readings: three single ones of the coil "tall" and a log of a warm-up.</summary>
internal sealed class SampleRecord : IDisposable
{
    private static readonly DateTimeOffset _end = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);

    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("looseloop-commands-");

    public SampleRecord()
    {
        Path = File("record.db");
        using RecordStore store = RecordStore.Open(Path, _end);
        Keep(store, "read", "before", Tall(1, 150000, 200));
        Keep(store, "read", "same", Tall(2, 150000.2, 200));
        Keep(store, "read", "top moved", Tall(3, 150200, 199.9));
        Keep(store, "log", null, [.. Enumerable.Range(0, 180).Select(Warm)]);
    }

    /// <summary>The record's file.</summary>
    public string Path { get; }

    public string File(string name) => System.IO.Path.Combine(_folder.FullName, name);

    public AppRun Run(params string[] args) => AppRun.Of([.. args, "--record", Path]);

    public void Dispose() => _folder.Delete(recursive: true);

    private static void Keep(RecordStore store, string procedure, string? note, params Reading[] readings)
    {
        RunStart start = SampleReadings.Start(procedure, "tall", note);
        store.Append(start);
        foreach (Reading reading in readings)
        {
            store.Append(start.Id, reading with { Note = note });
        }

        store.Append(new RunStop(start.Id, _end, RunStatus.Completed, "done", readings.Length));
    }

    private static Reading Tall(int n, double f0Hz, double q) => SampleReadings.At(n, "tall") with { F0Hz = f0Hz, Q = q };

    // 120 Hz with a time constant of 900 s, read every 30 s over 90 minutes; noise of 0.3 Hz as the budget states.
    private static Reading Warm(int i)
    {
        Random random = new(i);
        double noise = Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
        return SampleReadings.At(30 * i, "tall") with { F0Hz = 150000 + (120 * Math.Exp(-30 * i / 900.0)) + (0.32 * noise), TemperatureC = double.NaN };
    }
}
