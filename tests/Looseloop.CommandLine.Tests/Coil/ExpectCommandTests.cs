using System.Globalization;
using System.Text.Json;
using Looseloop.Readings;

namespace Looseloop.CommandLine.Tests;

/// <summary>The example "foyer" is the sample coil of which two independent field models were computed: 268.42 kHz, 15.675 pF at the top.</summary>
public class ExpectCommandTests
{
    [Fact]
    public void Foyer_is_the_sample_coil()
    {
        using var scene = new CoilScene();
        JsonElement e = scene.Json("expect", "foyer");
        Assert.Equal(1, e.GetProperty("f1_hz").GetDouble() / 268.42e3, .001);
        Assert.Equal(1, e.GetProperty("capacitance_top_f").GetDouble() / 15.675e-12, .001);
        Assert.Equal(1, e.GetProperty("modes")[1].GetProperty("over_f1").GetDouble() / 3.030, .002);
        Assert.Equal(JsonValueKind.Array, e.GetProperty("cautions").ValueKind);
        AppRun text = scene.Run("expect", "foyer", "--profile", "--sensitivities");
        Assert.Equal(0, text.ExitCode);
        Assert.Contains("268.4", text.Out, StringComparison.Ordinal);
        Assert.Contains("room and ground", text.Out, StringComparison.Ordinal);
        Assert.Contains("winding_diameter_mm", text.Out, StringComparison.Ordinal);
        Assert.Contains("estimates", text.Error, StringComparison.Ordinal);
        Assert.DoesNotContain("estimates", text.Out, StringComparison.Ordinal);
    }

    [Fact]
    public void A_change_for_this_once()
    {
        using var scene = new CoilScene();
        // -.990 per cent for one per cent of turns, by an independent field model.
        double ratio = scene.Json("expect", "foyer", "--set", "turns=1010").GetProperty("f1_hz").GetDouble()
            / scene.Json("expect", "foyer").GetProperty("f1_hz").GetDouble();
        Assert.Equal(1 - .0099, ratio, 1e-4);
    }

    [Fact]
    public void Against_a_reading_of_the_record()
    {
        using var scene = new CoilScene();
        scene.Keep(268e3, 210);
        scene.Keep(231e3, 90, note: "probe on");
        JsonElement good = scene.Json("expect", "foyer", "--against", "1", "--record", scene.Record).GetProperty("against");
        Assert.True(good.GetProperty("within_uncertainty").GetBoolean());
        JsonElement bad = scene.Json("expect", "foyer", "--against", "last", "--record", scene.Record).GetProperty("against");
        Assert.False(bad.GetProperty("within_uncertainty").GetBoolean());
        // f sqrt(C/(C + Cp)): 15.675 pF ((268.43/231)^2 - 1) = 5.5 pF, a little more for the changed profile.
        double pF = bad.GetProperty("causes").EnumerateArray().Single(c => c.GetProperty("unit").GetString() == "pF").GetProperty("to").GetDouble();
        Assert.Equal(5.49, pF, .1);
        AppRun text = scene.Run("expect", "foyer", "--against", "probe on", "--record", scene.Record);
        Assert.Contains("They do not agree", text.Out, StringComparison.Ordinal);
        Assert.Contains("added capacitance", text.Out, StringComparison.Ordinal);
        Assert.Contains("shorted turn", text.Out, StringComparison.Ordinal);
    }

    [Fact]
    public void A_doubtful_reading_leaves_with_5_and_says_so()
    {
        using var scene = new CoilScene();
        scene.Keep(268e3, 210, Verdict.Doubtful);
        AppRun run = scene.Run("expect", "foyer", "--against", "last", "--record", scene.Record);
        Assert.Equal(5, run.ExitCode);
        Assert.Contains("doubtful", run.Error, StringComparison.Ordinal);
        AppRun byEnvironment = AppRun.With(new Dictionary<string, string> { ["LOOSELOOP_RECORD"] = scene.Record }, "expect", "foyer", "--against", "last");
        Assert.Equal(5, byEnvironment.ExitCode);
    }

    [Fact]
    public void A_reading_of_the_primary_is_no_reading_of_the_coil()
    {
        using var scene = new CoilScene();
        scene.Keep(230e3, 60, of: "primary");
        AppRun run = scene.Run("expect", "foyer", "--against", "last", "--record", scene.Record);
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("primary tank", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Sweep_and_target()
    {
        using var scene = new CoilScene();
        JsonElement sweep = scene.Json("expect", "foyer", "--sweep", "top_load.major_diameter_mm=250..400:50", "--target", "250k");
        double[] f = [.. sweep.GetProperty("rows").EnumerateArray().Select(r => r.GetProperty("f1_hz").GetDouble())];
        Assert.Equal(4, f.Length);
        Assert.Equal(1, f[1] / 268.42e3, .001);
        double found = sweep.GetProperty("found").GetDouble();
        double there = scene.Json("expect", "foyer", "--set", FormattableString.Invariant($"top_load.major_diameter_mm={found}")).GetProperty("f1_hz").GetDouble();
        Assert.Equal(250e3, there, 1.0);
        AppRun text = scene.Run("expect", "foyer", "--sweep", "top_load.major_diameter_mm=250..400:50", "--target", "250k");
        Assert.Contains("gives f1", text.Out, StringComparison.Ordinal);
        Assert.Contains("expected f1", text.Out, StringComparison.Ordinal);
        Assert.Equal(1, scene.Run("expect", "foyer", "--target", "30k", "--vary", "top_load.height_mm").ExitCode);
    }

    [Fact]
    public void Output_does_not_follow_the_country()
    {
        using var scene = new CoilScene();
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            string here = scene.Run("expect", "classroom").Out;
            CultureInfo.CurrentCulture = new CultureInfo("de-DE");
            Assert.Equal(here, scene.Run("expect", "classroom").Out);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }
}
