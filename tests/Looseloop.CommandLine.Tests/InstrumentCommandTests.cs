using System.Text.Json;

namespace Looseloop.CommandLine.Tests;

/// <summary>ladder, standoff, setup, trim and read --ring on the virtual bench, with a record of their own.</summary>
public sealed class InstrumentCommandTests : IDisposable
{
    private readonly string _record = Path.Combine(Path.GetTempPath(), $"looseloop-{Guid.NewGuid():N}.db");

    public void Dispose()
    {
        foreach (string file in Directory.EnumerateFiles(Path.GetTempPath(), Path.GetFileName(_record) + "*"))
        {
            File.Delete(file);
        }
    }

    private AppRun Run(params string[] args) => AppRun.Of([.. args, "--record", _record]);

    [Fact]
    public void A_set_up_is_kept_shown_and_changed()
    {
        Assert.Equal(0, Run("setup", "kestrel", "--primary", "absent", "--top-load", "toroid").ExitCode);
        AppRun shown = Run("setup", "kestrel", "--primary", "open", "--json");
        using JsonDocument json = JsonDocument.Parse(shown.Out);
        JsonElement setUp = json.RootElement.GetProperty("set_up");
        Assert.Equal("toroid", setUp.GetProperty("top_load").GetString());
        Assert.Equal("open", setUp.GetProperty("primary").GetString());
        Assert.Equal(2, Run("setup", "kestrel", "--primary", "maybe").ExitCode);
    }

    [Fact]
    public void The_cautions_stand_beside_a_set_up()
    {
        AppRun run = Run("setup", "kestrel");
        Assert.Contains("locked out", run.Error);
        Assert.Contains("no proof that a coil is dead", run.Error);
    }

    [Fact]
    public void What_ladder_trim_and_standoff_find_narrows_the_next_reading()
    {
        double wide = AbsoluteHz(Run("read", "--box", "bench", "--near", "150k", "--coil", "kestrel", "--json"));
        Assert.Equal(0, Run("ladder", "--box", "bench", "--near", "150k").ExitCode);
        Assert.Equal(0, Run("trim", "clock", "--box", "bench", "--for", "60s").ExitCode);
        Assert.Equal(0, Run("setup", "kestrel", "--primary", "absent").ExitCode);
        AppRun standoff = Run("standoff", "--box", "bench", "--coil", "kestrel", "--near", "150k", "--non-interactive");
        Assert.True(standoff.ExitCode == 0, standoff.Error);
        double narrow = AbsoluteHz(Run("read", "--box", "bench", "--near", "150k", "--coil", "kestrel", "--ring", "--json"));
        Assert.InRange(narrow, 0, wide / 5);
    }

    [Fact]
    public void A_counter_on_another_frequency_is_refused_and_keeps_nothing()
    {
        AppRun run = Run("trim", "clock", "--box", "bench", "--at", "150k", "--counter", "450k");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("Nothing was kept", run.Error);
    }

    private static double AbsoluteHz(AppRun run)
    {
        using JsonDocument json = JsonDocument.Parse(run.Out);
        return json.RootElement.EnumerateObject()
            .First(member => member.Name.StartsWith("f0", StringComparison.Ordinal) && member.Name.Contains("absolute", StringComparison.Ordinal))
            .Value.GetDouble();
    }
}
