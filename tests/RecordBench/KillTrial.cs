using System.Diagnostics;
using Looseloop.Readings;
using Looseloop.Record;

namespace Looseloop.RecordBench;

/// <summary>
/// Starts a child that appends, ends it by SIGKILL at a random moment, and looks whether every reading that it had called kept
/// is in the record. This shows what a crash of the process does; of a power failure it says nothing.
/// </summary>
public sealed class KillTrial(string path, int seed)
{
    private readonly Random _random = new(seed);
    private readonly HashSet<Guid> _acknowledged = [];

    /// <summary>How many readings were called kept so far.</summary>
    public int Acknowledged => _acknowledged.Count;

    /// <summary>One child, one kill, one look. Returns what is wrong, or null.</summary>
    public string? Once(string program)
    {
        using Process child = Process.Start(new ProcessStartInfo("dotnet", [program, "append", path]) { RedirectStandardOutput = true })!;
        if (child.StandardOutput.ReadLine() != "open")
        {
            child.WaitForExit();
            return $"the child did not open the record (exit code {child.ExitCode})";
        }

        // Killed from another thread, so that the moment has nothing to do with the lines read here.
        int delayMs = _random.Next(0, 400);
        Task kill = Task.Run(() =>
        {
            Thread.Sleep(delayMs);
            child.Kill();
        });
        while (child.StandardOutput.ReadLine() is { } line)
        {
            // The last line may be cut short by the kill; a cut line acknowledges nothing.
            if (Guid.TryParseExact(line, "D", out Guid id))
            {
                _acknowledged.Add(id);
            }
        }

        child.WaitForExit();
        kill.Wait();
        return Look();
    }

    private string? Look()
    {
        using RecordStore store = RecordStore.Open(path, DateTimeOffset.UtcNow);
        RecordReader reader = store.Reader;
        IReadOnlyList<string> damage = reader.CheckIntegrity();
        if (damage.Count > 0)
        {
            return "damaged: " + string.Join("; ", damage);
        }

        HashSet<Guid> there = [.. reader.Readings(new HistoryQuery { Limit = int.MaxValue }).Select(r => r.Id)];
        int lost = _acknowledged.Count(id => !there.Contains(id));
        if (lost > 0)
        {
            return $"{lost} acknowledged readings are lost";
        }

        RunSummary run = reader.Runs(new HistoryQuery { Limit = 1 })[0];
        if (run.Stop is not { Status: RunStatus.Interrupted } stop || stop.Count != run.Count)
        {
            return "the run was not closed as interrupted";
        }

        // A reading stands whole or not at all.
        return run.Last is { } last && reader.Reading(last.Number) is not { Points.Count: 13, Dark.Count: 3, Budget.Lines.Count: 6 }
            ? "the last reading is in pieces"
            : null;
    }
}
