using System.Text.Json;

namespace Looseloop.CommandLine.Tests.Record;

public sealed class DriftCommandTests : IDisposable
{
    private readonly SampleRecord _record = new();

    public void Dispose() => _record.Dispose();

    [Fact]
    public void The_warm_up_of_a_log_comes_back()
    {
        JsonElement drift = JsonDocument.Parse(_record.Run("drift", "last", "--window", "60Hz", "--json").Out).RootElement;
        JsonElement term = Assert.Single(drift.GetProperty("warm_up").GetProperty("terms").EnumerateArray());
        Assert.Equal(900, term.GetProperty("tau_s").GetDouble(), 4 * term.GetProperty("u_tau_s").GetDouble());

        // When its last third began, 120 exp(-4) = 2.2 Hz were still to come, against 0.6 Hz of one reading.
        Assert.Equal("not_settled", drift.GetProperty("settled").GetString());

        // 120 (1 - exp(-t/900)) = 60 at 900 ln 2 = 623.8 s.
        JsonElement window = drift.GetProperty("window");
        Assert.Equal(623.8, window.GetProperty("leaves_s").GetDouble(), 4 * window.GetProperty("u_leaves_s").GetDouble());
    }

    [Fact]
    public void It_is_printed_and_drawn()
    {
        AppRun run = _record.Run("drift", "4");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("settled", run.Out);
        Assert.Contains("time in min", run.Out);
        Assert.Contains("Allan deviation", run.Out);
        string picture = _record.File("drift.svg");
        Assert.Equal(0, _record.Run("drift", "4", "--plot", picture).ExitCode);
        Assert.Contains("<svg", File.ReadAllText(picture));
    }

    [Fact]
    public void A_single_reading_says_that_it_is_too_few()
    {
        AppRun run = _record.Run("drift", "1");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("not determinable", run.Out);
    }

    [Theory]
    [InlineData("77", 1)]
    [InlineData("yesterday", 2)]
    public void A_run_that_is_not_there_is_said_not_to_be(string which, int exitCode) => Assert.Equal(exitCode, _record.Run("drift", which).ExitCode);
}
