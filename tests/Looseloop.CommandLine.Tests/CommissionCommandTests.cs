using System.Text.Json;
using Looseloop.Record;

namespace Looseloop.CommandLine.Tests;

/// <summary>commission on the virtual bench, with a record of its own, and what the next reading makes of it.</summary>
public sealed class CommissionCommandTests : IDisposable
{
    private const string NotCommissioned = "not-commissioned";

    private readonly string _record = Path.Combine(Path.GetTempPath(), $"looseloop-{Guid.NewGuid():N}.db");

    public void Dispose()
    {
        foreach (string file in Directory.EnumerateFiles(Path.GetTempPath(), Path.GetFileName(_record) + "*"))
        {
            File.Delete(file);
        }
    }

    private AppRun Run(params string[] args) => AppRun.Of([.. args, "--record", _record]);

    private AppRun Commission(params string[] more) => Run(["commission", "--box", "bench:wren", "--near", "150k", "--non-interactive", .. more]);

    private string[] Reasons()
    {
        AppRun run = Run("read", "--box", "bench:wren", "--near", "150k", "--json");
        using JsonDocument json = JsonDocument.Parse(run.Out);
        return [.. json.RootElement.GetProperty("reasons").EnumerateArray().Select(reason => reason.GetProperty("code").GetString()!)];
    }

    [Fact]
    public void A_reading_says_that_its_box_is_not_commissioned_until_it_is()
    {
        Assert.Contains(NotCommissioned, Reasons());
        using (RecordReader record = RecordReader.Open(_record))
        {
            Assert.Contains(record.Reading(record.Find("last")).Reasons, reason => reason.Name == NotCommissioned);
        }

        Assert.Contains("never commissioned", Run("read", "--box", "bench:wren", "--near", "150k", "--budget").Out);
        AppRun run = Commission();
        Assert.True(run.ExitCode == 0, run.Error + run.Out);
        Assert.Contains("is commissioned", run.Error);
        Assert.DoesNotContain(NotCommissioned, Reasons());
        Assert.DoesNotContain("never commissioned", Run("read", "--box", "bench:wren", "--near", "150k", "--budget").Out);
    }

    [Fact]
    public void The_cautions_come_first()
    {
        AppRun run = Commission("--only", "dark");
        Assert.StartsWith("For a coil that is not energised", run.Error);
        Assert.Contains("no proof that a coil is dead", run.Error);
    }

    [Fact]
    public void Steps_done_one_by_one_make_a_commissioned_box_and_every_run_stays_on_record()
    {
        AppRun first = Commission("--only", "frequency,duty,dark,ladder,direct", "--json");
        Assert.Equal(5, first.ExitCode);
        using (JsonDocument json = JsonDocument.Parse(first.Out))
        {
            Assert.False(json.RootElement.GetProperty("commissioned").GetBoolean());
            Assert.Equal(
                ["settling", "watchdog", "interlock", "first-coil"],
                json.RootElement.GetProperty("missing").EnumerateArray().Select(step => step.GetString()));
        }

        Assert.Equal(5, Commission("--only", "settling,watchdog,interlock").ExitCode);
        Assert.Equal(0, Commission("--only", "first-coil").ExitCode);
        using (RecordReader record = RecordReader.Open(_record))
        {
            Assert.Equal(3, record.Facts(FactSubject.Box, "bench:wren", "commissioning").Count);
        }

        // A step that fails later takes the commissioning away again; what stood before stays on record.
        Assert.Equal(5, Commission("--only", "frequency", "--counter", "40k,149812.7,300k").ExitCode);
        Assert.Contains(NotCommissioned, Reasons());
    }

    [Fact]
    public void Stated_means_in_volts_are_divided_by_the_supply()
    {
        AppRun run = Commission("--only", "duty", "--supply", "5", "--means", "2.5,1.670,3.330,0.996,4.004", "--json");
        using JsonDocument json = JsonDocument.Parse(run.Out);
        Assert.Equal("passed", json.RootElement.GetProperty("steps")[0].GetProperty("result").GetString());
    }

    [Fact]
    public void An_interruption_keeps_what_was_done_and_says_so()
    {
        AppRun run = AppRun.InterruptedAt("4. ladder", "commission", "--box", "bench:wren", "--non-interactive", "--json", "--record", _record);
        Assert.Equal(130, run.ExitCode);
        Assert.Contains("The steps that were done are kept", run.Error);
        using JsonDocument json = JsonDocument.Parse(run.Out);
        Assert.True(json.RootElement.GetProperty("interrupted").GetBoolean());
        Assert.Equal(
            ["passed", "passed", "passed", "not done", "not done", "not done", "not done", "not done", "not done"],
            json.RootElement.GetProperty("steps").EnumerateArray().Select(step => step.GetProperty("result").GetString()));
        Assert.Equal(0, Commission("--only", "ladder,direct,settling,watchdog,interlock,first-coil").ExitCode);
    }

    [Fact]
    public void A_person_is_asked_for_each_reading_and_an_empty_line_leaves_a_step_out()
    {
        string[] args = ["commission", "--box", "bench:wren", "--only", "frequency", "--hold", "1s", "--json", "--record", _record];
        AppRun read = AppRun.Answering(["", "40000", "a lot", "149812.73", "299.62547k"], args);
        Assert.Contains("'a lot' is no number", read.Error);
        Assert.Equal("passed", Result(read));
        Assert.Equal("skipped", Result(AppRun.Answering(["", "40000", ""], args)));
        Assert.Equal("skipped", Result(AppRun.Answering([], args)));
    }

    [Fact]
    public void A_person_without_a_tone_source_leaves_the_interlock_out()
    {
        string[] args = ["commission", "--box", "bench:wren", "--only", "interlock", "--json", "--record", _record];
        AppRun run = AppRun.Answering([""], args);
        Assert.Equal("skipped", Result(run));
        Assert.Equal(5, run.ExitCode);

        // Said to sound where nothing sounds: no test of the box, and no pass.
        Assert.Equal("skipped", Result(AppRun.Answering(["y", "y"], args)));
    }

    private static string? Result(AppRun run)
    {
        using JsonDocument json = JsonDocument.Parse(run.Out);
        return json.RootElement.GetProperty("steps")[0].GetProperty("result").GetString();
    }

    [Theory]
    [InlineData("--only", "frequenzy")]
    [InlineData("--only", ",")]
    [InlineData("--counter", "40k,150k")]
    [InlineData("--means", "0.5,a,0.3,0.2,0.8")]
    public void A_wrong_option_is_a_usage_error_and_keeps_nothing(string option, string value)
    {
        Assert.Equal(2, Commission(option, value).ExitCode);
        Assert.False(File.Exists(_record));
    }
}
