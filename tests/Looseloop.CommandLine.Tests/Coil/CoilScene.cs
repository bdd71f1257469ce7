using System.Text.Json;
using Looseloop.Readings;
using Looseloop.Record;

namespace Looseloop.CommandLine.Tests;

/// <summary>A user's data folder of its own, with a record of made-up readings where a test wants one.</summary>
internal sealed class CoilScene : IDisposable
{
    public CoilScene() => Directory.CreateDirectory(Folder);

    public string Folder { get; } = Path.Combine(Path.GetTempPath(), "looseloop-" + Guid.NewGuid().ToString("N"));

    public string Record => Path.Combine(Folder, "record.db");

    public AppRun Run(params string[] args) => AppRun.With(new Dictionary<string, string> { ["XDG_DATA_HOME"] = Folder, ["HOME"] = Folder }, args);

    /// <summary>Runs with --json, expects success, and reads what came out.</summary>
    public JsonElement Json(params string[] args)
    {
        AppRun run = Run([.. args, "--json"]);
        Assert.True(run.ExitCode == 0, run.Error);
        return JsonDocument.Parse(run.Out).RootElement;
    }

    /// <summary>Writes a file into the folder.</summary>
    public string Write(string name, string text)
    {
        string file = Path.Combine(Folder, name);
        File.WriteAllText(file, text);
        return file;
    }

    /// <summary>Keeps a reading in the record, in a run of its own.</summary>
    public void Keep(double f0Hz, double q, Verdict verdict = Verdict.Sound, string? of = null, string? note = null, string? primary = null)
    {
        DateTimeOffset utc = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);
        using RecordStore store = RecordStore.Open(Record, utc);
        Guid run = Guid.CreateVersion7();
        store.Append(new RunStart { Id = run, Utc = utc, Procedure = "read", HostVersion = "0" });
        store.Append(run, Made(f0Hz, q, verdict, of, note, utc, primary));
        store.Append(new RunStop(run, utc, RunStatus.Completed, "done", 1));
    }

    /// <summary>Keeps a logged warm-up: f_inf + d exp(-t/tau) every 30 s.</summary>
    public void KeepWarmUp(double endHz, double driftHz, double tauS, int count)
    {
        DateTimeOffset utc = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);
        using RecordStore store = RecordStore.Open(Record, utc);
        Guid run = Guid.CreateVersion7();
        var random = new Random(5);
        store.Append(new RunStart { Id = run, Utc = utc, Procedure = "log", HostVersion = "0" });
        for (int i = 0; i < count; i++)
        {
            double f = endHz + (driftHz * Math.Exp(-30.0 * i / tauS)) + random.NextDouble() - 0.5;
            store.Append(run, Made(f, 200, Verdict.Sound, null, null, utc.AddSeconds(30 * i)));
        }

        store.Append(new RunStop(run, utc.AddSeconds(30 * count), RunStatus.Completed, "done", count));
    }

    public void Dispose() => Directory.Delete(Folder, recursive: true);

    private static Reading Made(double f0Hz, double q, Verdict verdict, string? of, string? note, DateTimeOffset utc, string? primary = null) => new()
    {
        Id = Guid.CreateVersion7(),
        Utc = utc,
        BoardTimeUs = 0,
        BoardSeconds = 1,
        Box = new BoxIdentity("virtual", "virtual", "1.0.0", 1, 1, 19, 8000, 600000, 4095, 1),
        HostVersion = "0",
        Coil = "sample",
        Note = note,
        SetUp = new[] { ("of", of), ("primary", primary) }.Where(p => p.Item2 is not null).ToDictionary(p => p.Item1, p => p.Item2!),
        F0Hz = f0Hz,
        Q = q,
        PeakCounts = 1000,
        Budget = new Budget([
            new BudgetLine("noise", 1, 0.001, true, double.PositiveInfinity, "made up"),
            new BudgetLine("pull", 20, 0.01, false, double.PositiveInfinity, "made up")]),
        Verdict = verdict,
        Reasons = verdict == Verdict.Sound ? [] : [new Reason(ReasonCode.Drift, "made up")],
        Points = [new RawPoint(new Setting(10, 256, 512, f0Hz), 10, 1000, 100100, 90, 110, 0)],
        Dark = [],
    };
}
