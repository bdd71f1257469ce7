using System.Text.Json;

namespace Looseloop.CommandLine.Tests;

public sealed class LogCommandTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("log").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string Record => Path.Combine(_folder, "record.db");

    [Fact]
    public void A_log_without_a_terminal_is_json_lines_from_start_to_stop_and_is_in_the_record()
    {
        AppRun run = AppRun.Of("log", "--box", "bench", "--for", "2min", "--every", "10s", "--near", "150k", "--coil", "Wren", "--json", "--record", Record);
        Assert.Equal(0, run.ExitCode);
        JsonElement[] lines = [.. run.Out.Split('\n', StringSplitOptions.RemoveEmptyEntries).Select(line => JsonDocument.Parse(line).RootElement)];
        Assert.Equal("start", lines[0].GetProperty("type").GetString());
        JsonElement[] readings = [.. lines.Where(line => line.GetProperty("type").GetString() == "reading")];
        Assert.InRange(readings.Length, 12, 13);
        Assert.All(readings, reading => Assert.Equal("sound", reading.GetProperty("verdict").GetString()));
        Assert.True(readings.Skip(1).All(reading => reading.GetProperty("tracked").GetBoolean()));
        Assert.Equal("completed", lines[^1].GetProperty("status").GetString());
        Assert.Equal(readings.Length, lines[^1].GetProperty("readings").GetInt32());
        using var reader = Looseloop.Record.RecordReader.Open(Record);
        Looseloop.Record.RunSummary kept = Assert.Single(reader.Runs(new Looseloop.Record.HistoryQuery { Limit = 10 }));
        Assert.Equal("Wren", kept.Coil);
        Assert.Equal(readings.Length, kept.Count);
        Assert.NotNull(kept.Stop);
    }

    [Fact]
    public void Plain_lines_go_to_the_output_and_the_summary_to_the_error_stream()
    {
        AppRun run = AppRun.Of("log", "--box", "bench", "--for", "1min", "--near", "150k", "--record", Record);
        Assert.Equal(0, run.ExitCode);
        Assert.All(run.Out.Split('\n', StringSplitOptions.RemoveEmptyEntries), line => Assert.Contains("f0 149 95", line));
        Assert.Contains("The time was up.", run.Error);
    }

    [Fact]
    public void Between_runs_says_the_caution()
    {
        AppRun run = AppRun.Of("log", "--box", "bench", "--for", "10s", "--near", "150k", "--between-runs", "--record", Record);
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("Before each time it is energised", run.Error);
    }

    [Fact]
    public void A_log_on_the_bench_without_an_end_is_refused()
    {
        AppRun run = AppRun.Of("log", "--box", "bench", "--record", Record);
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("--for", run.Error);
        Assert.False(File.Exists(Record));
    }
}
