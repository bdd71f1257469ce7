using System.Text.Json;

namespace Looseloop.CommandLine.Tests.Record;

public sealed class CompareCommandTests : IDisposable
{
    private readonly SampleRecord _record = new();

    public void Dispose() => _record.Dispose();

    [Fact]
    public void A_change_is_told_with_what_it_means()
    {
        AppRun run = _record.Run("compare", "before", "top moved");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("changed", run.Out);

        // dC/C = (150000/150200)^2 - 1 = -0.266 %.
        Assert.Contains("-0.266", run.Out);
    }

    [Fact]
    public void The_same_coil_again_is_not_changed()
    {
        JsonElement compared = JsonDocument.Parse(_record.Run("compare", "1", "2", "--json").Out).RootElement;
        Assert.Equal("not_changed", compared.GetProperty("f0_hz").GetProperty("verdict").GetString());
        Assert.Equal("not_changed", compared.GetProperty("q_relative").GetProperty("verdict").GetString());
        Assert.Equal("not_suspect", compared.GetProperty("winding").GetString());
    }

    [Fact]
    public void Where_things_were_moved_the_same_change_cannot_be_told()
    {
        // The pull of 60 Hz no longer cancels: 0.2 Hz is nothing, and a tenth of a bandwidth (75 Hz) cannot be excluded.
        AppRun run = _record.Run("compare", "1", "2", "--moved");
        Assert.Equal(5, run.ExitCode);
        Assert.Contains("cannot tell", run.Out);
    }

    [Fact]
    public void A_reading_is_not_compared_with_itself() => Assert.Equal(2, _record.Run("compare", "1", "before").ExitCode);
}
