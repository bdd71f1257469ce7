using System.Text.Json;

namespace Looseloop.CommandLine.Tests;

public class CoilFileCommandTests
{
    [Fact]
    public void New_list_show_check_and_change()
    {
        using var scene = new CoilScene();
        AppRun made = scene.Run("coil", "new", "hall", "--like", "classroom", "--set", "turns=800");
        Assert.Equal(0, made.ExitCode);
        string file = made.Out.Trim();
        Assert.True(File.Exists(file));
        Assert.StartsWith(scene.Folder, file, StringComparison.Ordinal);

        JsonElement list = scene.Json("coil", "list");
        Assert.Equal(["hall", "foyer", "classroom", "stage"], list.GetProperty("coils").EnumerateArray().Select(c => c.GetProperty("name").GetString()));
        AppRun text = scene.Run("coil", "list");
        Assert.Contains("hall", text.Out, StringComparison.Ordinal);

        JsonElement shown = scene.Json("coil", "show", "hall");
        Assert.Equal(800, shown.GetProperty("dimensions").EnumerateArray().Single(d => d.GetProperty("key").GetString() == "turns").GetProperty("value").GetDouble());
        Assert.Contains("800 turns", scene.Run("coil", "show", "hall").Out, StringComparison.Ordinal);
        Assert.Contains("700 turns", scene.Run("coil", "show", "hall", "--set", "turns=700").Out, StringComparison.Ordinal);
        Assert.Contains("good", scene.Run("coil", "check", "hall").Out, StringComparison.Ordinal);
    }

    [Fact]
    public void A_coil_is_not_written_over_unasked()
    {
        using var scene = new CoilScene();
        string file = scene.Run("coil", "new", "hall").Out.Trim();
        File.AppendAllText(file, "# mine\n");
        AppRun again = scene.Run("coil", "new", "hall");
        Assert.Equal(2, again.ExitCode);
        Assert.Contains("left as it is", again.Error, StringComparison.Ordinal);
        Assert.Contains("# mine", File.ReadAllText(file), StringComparison.Ordinal);
        Assert.Equal(0, scene.Run("coil", "new", "hall", "--force").ExitCode);
        Assert.DoesNotContain("# mine", File.ReadAllText(file), StringComparison.Ordinal);
    }

    [Fact]
    public void Errors_are_told_with_their_lines()
    {
        using var scene = new CoilScene();
        string file = scene.Write("bad.toml", "name = \"x\"\nwinding_diameter_mm = 110\nwinding_length_mm = 480\nturns = 3000\nwire_diameter_mm = 0.4\nbase_height_mm = 30\nwalls = 3\n");
        AppRun check = scene.Run("coil", "check", file);
        Assert.Equal(2, check.ExitCode);
        Assert.Contains("bad.toml:5: wire_diameter_mm", check.Out, StringComparison.Ordinal);
        Assert.Contains("bad.toml:7: unknown key walls", check.Out, StringComparison.Ordinal);
        AppRun expect = scene.Run("expect", file);
        Assert.Equal(2, expect.ExitCode);
        Assert.Empty(expect.Out);
        Assert.Contains("line 5:", expect.Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("coil", "show", "nowhere")]
    [InlineData("coil", "check", "./nowhere.toml")]
    [InlineData("coil", "new", "../escape")]
    [InlineData("coil", "new", "a/b")]
    [InlineData("coil", "new", "x", "--like", "nowhere")]
    [InlineData("expect", "foyer", "--set", "turns")]
    [InlineData("expect", "foyer", "--set", "turns=many")]
    [InlineData("expect", "foyer", "--set", "legs=3")]
    [InlineData("expect", "foyer", "--set", "turns=NaN")]
    [InlineData("expect", "foyer", "--set", "turns=-4")]
    [InlineData("expect", "foyer", "--set", "turns=1e99")]
    [InlineData("expect", "foyer", "--sweep", "turns")]
    [InlineData("expect", "foyer", "--sweep", "turns=5..1:1")]
    [InlineData("expect", "foyer", "--sweep", "turns=1..100000:0.001")]
    [InlineData("expect", "foyer", "--sweep", "primary.turns=1..5:1")]
    [InlineData("expect", "foyer", "--target", "200k")]
    [InlineData("expect", "foyer", "--vary", "turns")]
    [InlineData("expect", "foyer", "--against", "last", "--record", "nowhere.db")]
    [InlineData("expect")]
    [InlineData("probe")]
    [InlineData("probe", "--pf", "30")]
    [InlineData("probe", "foyer", "--pf", "-3")]
    [InlineData("probe", "foyer", "--pf", "x")]
    [InlineData("probe", "--without", "170k", "--with", "0k")]
    [InlineData("couple", "250k", "240k")]
    [InlineData("couple", "250k")]
    [InlineData("pad", "250k", "240k")]
    [InlineData("pad", "240k", "250k", "--pf", "5")]
    [InlineData("pad", "240k", "230k", "--pf", "0")]
    [InlineData("window")]
    [InlineData("window", "--f0", "250k")]
    [InlineData("window", "--f0", "250k", "--q", "-2")]
    [InlineData("window", "--f0", "250k", "--q", "200", "--fraction", "1.5")]
    [InlineData("window", "--f0", "250k", "--q", "200", "--oscillator", "tube")]
    [InlineData("window", "--f0", "250k", "--q", "200", "--run", "1", "--record", "nowhere.db")]
    [InlineData("tank", "foyer", "--tap", "80")]
    [InlineData("tank", "foyer", "--tap", "-1")]
    [InlineData("tank", "foyer", "--of", "floor")]
    [InlineData("tank", "foyer", "--capacitor-nf", "0")]
    public void What_is_wrong_is_told_in_a_sentence(params string[] args)
    {
        using var scene = new CoilScene();
        AppRun run = scene.Run(args);
        Assert.Equal(2, run.ExitCode);
        Assert.StartsWith("looseloop: ", run.Error, StringComparison.Ordinal);
        Assert.DoesNotContain("   at ", run.Error, StringComparison.Ordinal);
        Assert.DoesNotContain("inside the program", run.Error, StringComparison.Ordinal);
        Assert.DoesNotContain("Parameter", run.Error, StringComparison.Ordinal);
        Assert.Empty(run.Out);
    }

    [Fact]
    public void A_coil_without_a_primary_has_no_tank()
    {
        using var scene = new CoilScene();
        string file = scene.Write("bare.toml", "name = \"x\"\nwinding_diameter_mm = 110\nwinding_length_mm = 480\nturns = 1000\nwire_diameter_mm = 0.4\nbase_height_mm = 30\n");
        AppRun run = scene.Run("tank", file);
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("no [primary]", run.Error, StringComparison.Ordinal);
    }
}
