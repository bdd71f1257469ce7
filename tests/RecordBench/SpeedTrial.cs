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

        double[] sync = Sync(Path.Combine(Path.GetDirectoryName(Path.GetFullPath(path))!, "sync.tmp"));
        Say($"the disk's own part of it, 8 kB written and made durable: median {sync[sync.Length / 2]:0.00} ms, p99 {sync[sync.Length * 99 / 100]:0.00} ms, largest {sync[^1]:0.0} ms");

        long longest = Look(path, watch);
        Commands(path, longest);
        return 0;
    }

    /// <summary>The queries and the analysis by themselves, in this process.</summary>
    private static long Look(string path, Stopwatch watch)
    {
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
        Report("read for drift", watch, $"{series.Count} readings");
        watch.Restart();
        DriftAnalysis analysis = DriftAnalysis.Of(series, new DriftOptions { WindowHalfWidth = 60 });
        Report("drift of these", watch, $"{analysis.Settling.State}");
        return longest;
    }

    /// <summary>The program's own commands, each in a process of its own: its start and all of its memory are in the figures.</summary>
    private static void Commands(string path, long longest)
    {
        if (ProgramUnderTest.Find() is not { } program)
        {
            Console.WriteLine("history and drift as commands: build host/Looseloop in this configuration first");
            return;
        }

        string run = longest.ToString(CultureInfo.InvariantCulture);
        foreach (string[] command in new[] { new[] { "history" }, ["history", "--readings"], ["drift", run, "--window", "60Hz"], ["drift", run, "--json"] })
        {
            // The first start reads the program itself from the disk.
            program.Run([.. command, "--record", path]);
            ProgramRun done = program.Run([.. command, "--record", path]);
            Say($"command {string.Join(' ', command)}: {done.Seconds:0.00} s, peak memory {done.PeakBytes >> 20} MB, exit code {done.ExitCode}");
        }
    }

    private static double[] Sync(string path)
    {
        double[] ms = new double[Measured / 5];
        byte[] page = new byte[8192];
        try
        {
            using FileStream file = new(path, FileMode.Create, FileAccess.Write, FileShare.None, 0);
            for (int n = 0; n < ms.Length; n++)
            {
                long begin = Stopwatch.GetTimestamp();
                file.Write(page);
                file.Flush(flushToDisk: true);
                ms[n] = Stopwatch.GetElapsedTime(begin).TotalMilliseconds;
            }
        }
        finally
        {
            File.Delete(path);
        }

        Array.Sort(ms);
        return ms;
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
