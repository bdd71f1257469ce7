using System.Diagnostics;
using Looseloop.Bench;
using Looseloop.Link;
using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Campaign;

/// <summary>Live memory of a log over many virtual hours, measured after a full collection every hour.</summary>
public static class LogMemory
{
    public static int Run(int hours)
    {
        var clock = Stopwatch.StartNew();
        using var box = new VirtualBox(new World { Room = new Room { WarmUp = new WarmUp { StartPpm = 800, TimeS = 5000 } } });
        var options = new LogOptions
        {
            Read = new ReadOptions { Law = Laws.Of(box.Board.World), NearHz = 150_000, HostVersion = "campaign", Time = box.Time },
            For = TimeSpan.FromHours(hours),
            Every = TimeSpan.FromSeconds(5),
        };
        LogSummary summary = new LogProcedure(new Source(box), options, new Nowhere(), new Watch(), CancellationToken.None).Run();
        Console.WriteLine($"{summary.Stop.Count} readings over {hours} h in {clock.Elapsed.TotalSeconds:0.0} s");
        return 0;
    }

    private sealed class Source(VirtualBox box) : IBoxSource
    {
        public string Name => box.Name;

        public TimeProvider Time => box.Time;

        public IByteLink Open() => box;

        public void Pause(TimeSpan duration, CancellationToken cancel) => box.Pause(duration);
    }

    private sealed class Nowhere : IRunSink
    {
        public void Append(RunStart document)
        {
        }

        public void Append(Guid runId, Reading reading)
        {
        }

        public void Append(RunEvent document)
        {
        }

        public void Append(RunStop document)
        {
        }
    }

    private sealed class Watch : ILogWatch
    {
        private double _nextS = 3600;

        public void Begin(string task, double boardSeconds)
        {
        }

        public void Progress(double share)
        {
        }

        public void Started(RunStart start)
        {
        }

        public void Kept(Reading reading, LogState state)
        {
            if (state.ElapsedS >= _nextS)
            {
                _nextS += 3600;
                Console.WriteLine($"  {state.ElapsedS / 3600:0} h: {state.Readings} readings, {GC.GetTotalMemory(forceFullCollection: true) / 1e6:0.00} MB live");
            }
        }

        public void Kept(RunEvent document)
        {
        }

        public void CoolDown(FieldEnd fieldEnd)
        {
        }

        public void Waiting(LogState state)
        {
        }

        public void Stopped(LogSummary summary)
        {
        }
    }
}
