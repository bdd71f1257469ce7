using System.Text.Json;

namespace Looseloop.CommandLine.Tests.Record;

public sealed class HistoryCommandTests : IDisposable
{
    private readonly SampleRecord _record = new();

    public void Dispose() => _record.Dispose();

    [Fact]
    public void Runs_are_listed_the_newest_first()
    {
        AppRun run = _record.Run("history");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("top moved", run.Out);
        Assert.True(run.Out.IndexOf("log", StringComparison.Ordinal) < run.Out.IndexOf("read ", StringComparison.Ordinal));
    }

    [Fact]
    public void Readings_as_JSON_carry_figures_and_units()
    {
        AppRun run = _record.Run("history", "--readings", "--limit", "2", "--note", "top", "--json");
        JsonElement reading = Assert.Single(JsonDocument.Parse(run.Out).RootElement.GetProperty("readings").EnumerateArray());
        Assert.Equal(150200, reading.GetProperty("f0_hz").GetDouble());
        Assert.Equal(3, reading.GetProperty("reading").GetInt32());
        Assert.Equal(JsonValueKind.Null, reading.GetProperty("refit_of").ValueKind);
    }

    [Fact]
    public void A_time_that_is_none_is_a_usage_error()
    {
        AppRun run = _record.Run("history", "--since", "yesterdayish");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("--since", run.Error);
    }

    [Fact]
    public void A_record_that_is_not_there_is_said_so_and_not_made()
    {
        string missing = _record.File("none.db");
        AppRun run = AppRun.Of("history", "--record", missing);
        Assert.Equal(1, run.ExitCode);
        Assert.Contains("no record", run.Error);
        Assert.False(File.Exists(missing));
    }

    [Fact]
    public void The_environment_names_the_record_where_no_flag_does()
    {
        AppRun run = AppRun.With(new Dictionary<string, string> { ["LOOSELOOP_RECORD"] = _record.Path }, "history");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("tall", run.Out);
    }
}
