using Looseloop.Bench;
using Looseloop.Drift;
using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Tests.Tracking;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Logging;

public class LogEndTests
{
    [Fact]
    public void An_interrupt_ends_with_a_stop_document_and_the_drive_off()
    {
        using var socket = new BenchSocket(BenchTracking.World(), 1);
        using var cancel = new CancellationTokenSource();
        var sink = new MemorySink();
        int kept = 0;
        var watch = new TestWatch { OnKept = _ => { if (++kept == 5) { cancel.Cancel(); } } };
        LogSummary summary = LogRun.Run(socket, sink, watch, LogRun.Options(socket.Time, null, TimeSpan.FromSeconds(5)), cancel.Token);
        Assert.Equal(RunStatus.Interrupted, summary.Stop.Status);
        Assert.Equal(5, sink.Stop!.Count);
        Assert.Same(summary, watch.Summary);
        Assert.False(socket.Box.Board.IsDriving);
    }

    [Fact]
    public void A_warm_up_ends_when_it_is_settled()
    {
        // f0 moves by 75 Hz with 300 s: within .3 Hz after 5.5 time constants, and no sooner than after 4. How much later it is
        // said depends on the noise; the middle of three logs counts.
        World world = BenchTracking.World(warmUp: new WarmUp { StartPpm = 500, TimeS = 300 });
        var elapsedS = new List<double>();
        for (ulong seed = 1; seed <= 3; seed++)
        {
            using var socket = new BenchSocket(world, seed);
            var sink = new MemorySink();
            LogOptions options = LogRun.Options(socket.Time, TimeSpan.FromHours(3), TimeSpan.FromSeconds(10)) with { UntilSettled = true };
            LogSummary summary = LogRun.Run(socket, sink, new TestWatch(), options);
            Assert.Equal(RunStatus.Completed, summary.Stop.Status);
            Assert.Equal(SettledState.Settled, summary.Settling!.State);
            Assert.True(summary.State.ElapsedS > 4 * 300);
            elapsedS.Add(summary.State.ElapsedS);
            double still = Truth.Loaded(world, 1e6).F0Hz - Truth.Loaded(world, socket.Seconds).F0Hz;
            Assert.True(Math.Abs(still) < 2 * sink.Readings[^1].Budget.F0Hz(absolute: false), $"{still:0.00} Hz are still to come");
        }

        Assert.InRange(elapsedS.Order().ElementAt(1), 4 * 300, 3600);
    }

    [Fact]
    public void A_box_that_does_not_come_back_ends_as_link_lost_when_the_time_is_up()
    {
        using var socket = new BenchSocket(BenchTracking.World(), 1, [new MishapAt(60, Mishap.PowerOff, 1e6)]);
        var sink = new MemorySink();
        LogSummary summary = LogRun.Run(socket, sink, new TestWatch(), LogRun.Options(socket.Time, TimeSpan.FromMinutes(5), TimeSpan.FromSeconds(5)));
        Assert.Equal(RunStatus.LinkLost, summary.Stop.Status);
        RunEvent gap = Assert.Single(sink.Of(RunEventKind.Gap));
        Assert.Equal(sink.Readings[^1].Utc, gap.From);
        Assert.InRange(summary.State.ElapsedS, 299.9, 312);
    }

    [Fact]
    public void A_host_that_was_killed_in_mid_sweep_starts_a_new_log_on_the_same_box()
    {
        using var socket = new BenchSocket(BenchTracking.World(), 1);
        var first = new MemorySink();
        var killing = new TestWatch { OnKept = _ => { if (first.Readings.Count == 3) { throw new InvalidOperationException("killed"); } } };
        Assert.Throws<InvalidOperationException>(() => LogRun.Run(socket, first, killing, LogRun.Options(socket.Time, null, TimeSpan.FromSeconds(5))));

        // What a dead host leaves behind: half a request in the board's ear, and a sweep that runs into its silence.
        using (Link.IByteLink left = socket.Open())
        {
            left.Write(">12 swe"u8);
        }

        var second = new MemorySink();
        LogSummary summary = LogRun.Run(socket, second, new TestWatch(), LogRun.Options(socket.Time, TimeSpan.FromMinutes(1), TimeSpan.FromSeconds(5)));
        Assert.Equal(RunStatus.Completed, summary.Stop.Status);
        Assert.True(second.Readings.Count >= 11);
    }

    [Fact]
    public void A_coil_that_moves_away_is_followed_by_a_full_reading()
    {
        // A top load that is changed: f0 runs 3 % in two minutes, far faster than readings every 30 s can follow.
        World world = BenchTracking.World(warmUp: new WarmUp { StartPpm = 30_000, TimeS = 60 });
        using var socket = new BenchSocket(world, 1);
        var sink = new MemorySink();
        LogOptions options = LogRun.Options(socket.Time, TimeSpan.FromMinutes(12), TimeSpan.FromSeconds(30));
        LogSummary summary = LogRun.Run(socket, sink, new TestWatch(), options with { Read = options.Read with { NearHz = null } });
        Assert.Contains(sink.Of(RunEventKind.Note), note => note.Detail.StartsWith("Tracking ended", StringComparison.Ordinal));
        Assert.True(summary.State.FullReadings > 1);
        Reading last = sink.Readings[^1];
        Assert.Equal(Truth.Loaded(world, socket.Seconds).F0Hz, last.F0Hz, 1.5);
    }
}
