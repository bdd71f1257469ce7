using System.Text.Json;

namespace Looseloop.CommandLine.Tests;

public sealed class ReadCommandTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("looseloop-read").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public void The_first_command_of_the_readme_reads_a_coil_and_calls_it_sound()
    {
        AppRun run = AppRun.Of("read", "--box", "bench");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("f0", run.Out);
        Assert.Contains("sound", run.Out);
        Assert.Contains("between readings", run.Out);
    }

    [Fact]
    public void Json_is_one_object_with_units_in_its_names_and_nothing_else()
    {
        AppRun run = AppRun.Of("read", "--box", "bench", "--near", "150k", "--json", "--quiet");
        using JsonDocument json = JsonDocument.Parse(run.Out);
        Assert.Equal("sound", json.RootElement.GetProperty("verdict").GetString());
        Assert.InRange(json.RootElement.GetProperty("f0_hz").GetDouble(), 149_000, 151_000);
        Assert.True(json.RootElement.GetProperty("points").GetArrayLength() > 8);
        Assert.Equal(JsonValueKind.Null, json.RootElement.GetProperty("ring_q").ValueKind);
        Assert.Empty(run.Error);
    }

    [Theory]
    [InlineData("kestrel", "energised")]
    [InlineData("nightjar", "energised")]
    public void A_live_coil_is_refused_with_what_to_do(string world, string word)
    {
        AppRun run = AppRun.Of("read", "--box", $"bench:{world}");
        Assert.Equal(5, run.ExitCode);
        Assert.Empty(run.Out);
        Assert.Contains(word, run.Error);
        Assert.Contains("lock it out", run.Error);
    }

    [Theory]
    [InlineData("bittern", "saturated")]
    [InlineData("jackdaw", "")]
    [InlineData("owl", "carrier")]
    public void A_trap_is_never_called_sound(string world, string reason)
    {
        AppRun run = AppRun.Of("read", "--box", $"bench:{world}");
        Assert.Equal(5, run.ExitCode);
        Assert.DoesNotContain("sound", run.Out);
        Assert.Contains(reason, run.Out);
        Assert.Contains("->", run.Out);
    }

    [Fact]
    public void A_ghost_that_the_user_was_told_is_not_read()
    {
        AppRun run = AppRun.Of("read", "--box", "bench", "--near", "50k");
        Assert.Equal(5, run.ExitCode);
        Assert.Contains("ghost", run.Out);
        Assert.Contains("150 kHz", run.Out);
    }

    [Theory]
    [InlineData("/dev/no-such-port", "There is no port")]
    [InlineData("bench:no-such-world", "no world")]
    public void A_box_that_is_not_there_is_said_plainly(string box, string what)
    {
        AppRun run = AppRun.Of("read", "--box", box);
        Assert.Equal(box.StartsWith('/') ? 3 : 2, run.ExitCode);
        Assert.Contains(what, run.Error);
        Assert.Empty(run.Out);
    }

    [Fact]
    public void Saved_points_fit_to_the_same_figures_and_are_never_overwritten()
    {
        string path = Path.Combine(_folder, "points.csv");
        AppRun run = AppRun.Of("read", "--box", "bench:swift", "--json", "--quiet", "--save", path);
        using JsonDocument read = JsonDocument.Parse(run.Out);
        AppRun fit = AppRun.Of("fit", path, "--json", "--quiet");
        using JsonDocument refit = JsonDocument.Parse(fit.Out);
        Assert.Equal(read.RootElement.GetProperty("f0_hz").GetDouble(), refit.RootElement.GetProperty("f0_hz").GetDouble(), 0.05);
        AppRun again = AppRun.Of("read", "--box", "bench:swift", "--quiet", "--save", path);
        Assert.Equal(1, again.ExitCode);
        Assert.Contains("left as it is", again.Error);
    }

    [Theory]
    [InlineData("--near", "abc")]
    [InlineData("--delay", "fast")]
    public void A_quantity_that_is_none_is_a_usage_error(string option, string value)
    {
        AppRun run = AppRun.Of("read", "--box", "bench", option, value);
        Assert.Equal(2, run.ExitCode);
        Assert.Contains(value, run.Error);
    }
}
