using System.Diagnostics;
using System.Globalization;
using Looseloop.Drift;
using Looseloop.Readings;
using Looseloop.Record;

namespace Looseloop.RecordBench;

/// <summary>
/// Fills a record with a long log (in large transactions, which only fills it faster), then measures: durable appends one by
/// one, the history, and the drift over all of it.
/// </summary>
internal static class SpeedTrial
{
    private const int Measured = 5000;

    public static int Run(string path, int count)
    {
        Stopwatch watch = Stopwatch.StartNew();
        Fill(path, count);
        Report("filled", watch, $"{count} readings, {new FileInfo(path).Length >> 20} MB");

        double[] ms = Append(path);
        Array.Sort(ms);
        Say($"append, {Measured} durable ones: median {ms[Measured / 2]:0.00} ms, p99 {ms[Measured * 99 / 100]:0.00} ms, largest {ms[^1]:0.0} ms");

        watch.Restart();
        using RecordReader reader = RecordReader.Open(path);
        IReadOnlyList<RunSummary> runs = reader.Runs(new HistoryQuery());
        Report("history, runs", watch, $"{runs.Count} runs");
        watch.Restart();
        Report("history, readings", watch, $"{reader.Readings(new HistoryQuery()).Count} readings");
        watch.Restart();
        Report("history, readings of a coil", watch, $"{reader.Readings(new HistoryQuery { Coil = "bench coil" }).Count} readings");
        watch.Restart();
        long longest = runs.MaxBy(run => run.Count)!.Number;
        DriftSeries series = DriftSeries.Of(reader.Track(longest).Select(p => new DriftPoint(p.TimeS, p.F0Hz, p.F0RepeatabilityHz, p.TemperatureC)));
        DriftAnalysis analysis = DriftAnalysis.Of(series, new DriftOptions { WindowHalfWidth = 60 });
        using Process self = Process.GetCurrentProcess();
        Report("drift", watch, $"{series.Count} readings, {analysis.Settling.State}, peak memory of all of this {self.PeakWorkingSet64 >> 20} MB");
        return 0;
    }

    private static void Fill(string path, int count)
    {
        using RecordStore store = RecordStore.Open(path, DateTimeOffset.UtcNow);
        RunStart start = SampleReadings.Start();
        store.Append(start);
        const int Batch = 2000;
        for (int n = 0; n < count; n += Batch)
        {
            int from = n;
            store.AppendMany(start.Id, Enumerable.Range(from, Math.Min(Batch, count - from)).Select(i => SampleReadings.At(i)));
        }

        store.Append(new RunStop(start.Id, DateTimeOffset.UtcNow, RunStatus.Completed, "done", count));
    }

    private static double[] Append(string path)
    {
        using RecordStore store = RecordStore.Open(path, DateTimeOffset.UtcNow);
        RunStart start = SampleReadings.Start();
        store.Append(start);
        double[] ms = new double[Measured];
        for (int n = 0; n < Measured; n++)
        {
            Reading reading = SampleReadings.At(n);
            long begin = Stopwatch.GetTimestamp();
            store.Append(start.Id, reading);
            ms[n] = Stopwatch.GetElapsedTime(begin).TotalMilliseconds;
        }

        store.Append(new RunStop(start.Id, DateTimeOffset.UtcNow, RunStatus.Completed, "done", Measured));
        return ms;
    }

    private static void Report(string what, Stopwatch watch, string result) => Say($"{what}: {watch.Elapsed.TotalSeconds:0.000} s, {result}");

    private static void Say(FormattableString line) => Console.WriteLine(line.ToString(CultureInfo.InvariantCulture));
}
