using System.Diagnostics;
using Looseloop.Bench;
using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Tests.Tracking;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;
using Looseloop.Record;
using Xunit.Abstractions;

namespace Looseloop.Procedures.Tests.Logging;

public class LongLogTests(ITestOutputHelper output)
{
    private static readonly WarmUp _warmUp = new() { StartPpm = -1500, TimeS = 3600, PpmPerHour = 150, StartQPercent = 4 };

    [Fact]
    public void Eight_hours_with_twenty_unplugs_and_five_resets()
    {
        const double Hours = 8;
        var random = new Random(8);
        List<MishapAt> mishaps = [];
        for (int i = 0; i < 25; i++)
        {
            Mishap what = i < 5 ? Mishap.Reset : i % 2 == 0 ? Mishap.PowerOff : Mishap.PortGone;
            mishaps.Add(new MishapAt(60 + (((Hours * 3600) - 300) * (i + random.NextDouble()) / 25), what, 0.5 + (60 * random.NextDouble())));
        }

        World world = BenchTracking.World(0.05, 60, _warmUp);
        using var socket = new BenchSocket(world, 4, mishaps);
        DirectoryInfo folder = Directory.CreateTempSubdirectory("long-log");
        string file = Path.Combine(folder.FullName, "record.db");
        using RecordStore store = RecordStore.Open(file, socket.Time.GetUtcNow());
        var sink = new MemorySink(store);
        var watch = new TestWatch();
        var clock = Stopwatch.StartNew();
        LogSummary summary = LogRun.Run(socket, sink, watch, LogRun.Options(socket.Time, TimeSpan.FromHours(Hours), TimeSpan.FromSeconds(10)));
        double seconds = clock.Elapsed.TotalSeconds;

        Assert.Equal(20, socket.Happened.Count(m => m.What != Mishap.Reset));
        Assert.Equal(5, socket.Happened.Count(m => m.What == Mishap.Reset));
        Assert.Equal(RunStatus.Completed, summary.Stop.Status);

        store.Dispose();
        AssertRecorded(file, sink);
        folder.Delete(recursive: true);

        // Every reading that was told is in the sink, once, and the stop counts them.
        Assert.Equal(sink.Readings.Select(reading => reading.Id), watch.Told);
        Assert.Equal(sink.Readings.Count, sink.Readings.DistinctBy(reading => reading.Id).Count());
        Assert.Equal(sink.Readings.Count, sink.Stop!.Count);
        Assert.Equal(20, sink.Of(RunEventKind.LinkLost).Count());
        Assert.Equal(20, sink.Of(RunEventKind.Reconnected).Count());
        int reboots = socket.Happened.Count(m => m.What != Mishap.PortGone);
        Assert.Equal(reboots, sink.Of(RunEventKind.BoardReset).Count());

        // Gaps begin at a reading and end at the next one; every mishap lies in one, and no two readings stand far apart outside.
        RunEvent[] gaps = [.. sink.Of(RunEventKind.Gap)];
        foreach (RunEvent gap in gaps)
        {
            int at = sink.Readings.FindIndex(reading => reading.Utc == gap.From);
            Assert.True(at >= 0, "a gap begins where no reading is");
            Assert.Equal(sink.Readings[at + 1].Utc, gap.To);
        }

        foreach ((double timeS, _) in socket.Happened)
        {
            DateTimeOffset when = socket.Time.GetUtcNow() - TimeSpan.FromSeconds(socket.Seconds - timeS);
            Assert.Contains(gaps, gap => gap.From <= when.AddSeconds(0.01) && gap.To >= when);
        }

        for (int i = 1; i < sink.Readings.Count; i++)
        {
            double apart = (sink.Readings[i].Utc - sink.Readings[i - 1].Utc).TotalSeconds;
            bool inGap = gaps.Any(gap => gap.From == sink.Readings[i - 1].Utc && gap.To == sink.Readings[i].Utc);
            Assert.True(inGap || apart < 20, $"{apart:0.0} s between readings, and no gap says so");
        }

        // No reading is off by more than its interval: the truth is the bench's, at the middle of the reading. What the fit's
        // model makes of this world is the same in all of them and taken from their mean.
        double[] errors = [.. sink.Readings.Select(reading => reading.F0Hz - Truth.Loaded(world, MiddleS(reading)).F0Hz)];
        double[] qErrors = [.. sink.Readings.Select(reading => (reading.Q / Truth.Loaded(world, MiddleS(reading)).Q) - 1)];
        double common = errors.Average();
        double commonQ = qErrors.Average();
        double[] ratio = [.. errors.Select((e, i) => Math.Abs(e - common) / (2 * sink.Readings[i].Budget.F0Hz(false)))];
        double[] qRatio = [.. qErrors.Select((e, i) => Math.Abs(e - commonQ) / (2 * sink.Readings[i].Budget.QRelative(false)))];
        output.WriteLine(
            $"{sink.Readings.Count} readings ({summary.State.FullReadings} full) in {seconds:0.0} s; common {common:0.00} Hz; f0 beyond 95 %: "
            + $"{ratio.Average(r => r > 1 ? 1.0 : 0):P2}, worst {ratio.Max():0.00}, worst error {errors.Max(e => Math.Abs(e - common)):0.00} Hz; Q beyond {qRatio.Average(r => r > 1 ? 1.0 : 0):P2}, worst {qRatio.Max():0.00}; "
            + $"failures {summary.State.Failures}, gaps {gaps.Length}, longest {gaps.Max(g => (g.To! - g.From!).Value.TotalSeconds):0} s");
        Assert.True(ratio.Average(r => r > 1 ? 1.0 : 0) < 0.06);
        Assert.True(ratio.Max() < 2.5);
        Assert.True(qRatio.Average(r => r > 1 ? 1.0 : 0) < 0.06);
        Assert.True(sink.Readings.Count > 0.9 * Hours * 360);
    }

    /// <summary>The record has what the log gave it: readings in their order, events, stop; and it is intact.</summary>
    private static void AssertRecorded(string file, MemorySink sink)
    {
        using RecordReader reader = RecordReader.Open(file);
        Assert.Empty(reader.CheckIntegrity());
        long run = Assert.Single(reader.RunNumbers(new HistoryQuery()));
        Assert.Equal(sink.Readings.Select(reading => reading.Id), reader.AllReadingsOf(run).Select(number => reader.Figures(number).Id));
        RunDocument document = reader.Run(run);
        Assert.Equal(
            sink.Events.Select(e => (e.Id, e.Kind, Microseconds(e.From), Microseconds(e.To))),
            document.Events.Select(e => (e.Id, e.Kind, Microseconds(e.From), Microseconds(e.To))));
        Assert.Equal((sink.Stop!.Status, sink.Stop.Count), (document.Stop!.Status, document.Stop.Count));
    }

    // The record keeps times to the microsecond.
    private static long? Microseconds(DateTimeOffset? time) => time?.UtcTicks / TimeSpan.TicksPerMicrosecond;

    private static double MiddleS(Reading reading) => reading.MonotonicS - (TrackedReading.Is(reading) ? 0.07 : 2);
}
