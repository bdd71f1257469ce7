using System.Text.Json;

namespace Looseloop.CommandLine.Tests;

public class DrivingCommandTests
{
    // Common practice, no source: worked out at 170 kHz, read at 61 kHz by a probe: 6.7667 times the coil's capacitance by (f/f')^2 - 1.
    [Fact]
    public void Probe_explains_two_readings()
    {
        using var scene = new CoilScene();
        JsonElement e = scene.Json("probe", "--without", "170k", "--with", "61k", "--own-pf", "7.5");
        Assert.Equal(6.7667, e.GetProperty("added_over_own").GetDouble(), 1e-4);
        Assert.Equal(50.8e-12, e.GetProperty("added_f").GetDouble(), 5e-14);
        Assert.Contains("6.767 times", scene.Run("probe", "--without", "170k", "--with", "61k").Out, StringComparison.Ordinal);
    }

    [Fact]
    public void Probe_foretells()
    {
        using var scene = new CoilScene();
        // f sqrt(C/(C + Cp)) is an upper bound; the voltage profile gives a little.
        JsonElement e = scene.Json("probe", "foyer", "--pf", "30");
        double bound = e.GetProperty("without_hz").GetDouble() * Math.Sqrt(15.675 / 45.675);
        Assert.InRange(e.GetProperty("with_hz").GetDouble() / bound, .97, 1);
        JsonElement simple = scene.Json("probe", "--own-pf", "8", "--pf", "10", "--without", "300k");
        Assert.Equal(200e3, simple.GetProperty("with_hz").GetDouble(), 10.0);
        // 2 pi eps0 l / arcosh(2h/d): a metre of 1 mm wire a metre up has 6.7 pF.
        Assert.Equal(6.71e-12, scene.Json("probe", "foyer", "--lead-mm", "1000").GetProperty("lead_f").GetDouble(), 1e-14);
    }

    // k = sqrt(1 - (fo/fs)^2): 250/253.2 -> .158483; u(k) = .00087 for 1e-4.
    [Fact]
    public void Couple()
    {
        using var scene = new CoilScene();
        JsonElement e = scene.Json("couple", "250k", "253.2k", "--u-hz", "25");
        Assert.Equal(.158483, e.GetProperty("k").GetDouble(), 1e-6);
        Assert.Equal(.00087, e.GetProperty("k_standard").GetDouble(), 1e-5);
        AppRun text = scene.Run("couple", "250k", "253.2k", "--u-hz", "25");
        Assert.Contains("k = 0.1585", text.Out, StringComparison.Ordinal);
        Assert.Contains("licence", text.Error, StringComparison.Ordinal);
        Assert.Contains("not known", scene.Run("couple", "250k", "253.2k").Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Couple_from_the_record_takes_repeatability_only()
    {
        using var scene = new CoilScene();
        scene.Keep(250e3, 200, note: "open");
        scene.Keep(253.2e3, 200, note: "shorted");
        JsonElement e = scene.Json("couple", "open", "shorted", "--record", scene.Record);
        // 1 Hz of noise each; the 20 Hz that are common to both drop out.
        Assert.Equal(.00087 / 25, e.GetProperty("k_standard").GetDouble(), 1e-6);
    }

    [Fact]
    public void Couple_looks_at_how_the_primary_stood()
    {
        using var scene = new CoilScene();
        scene.Keep(250e3, 200, note: "a", primary: "open");
        scene.Keep(253.2e3, 200, note: "b", primary: "absent");
        string error = scene.Run("couple", "a", "b", "--record", scene.Record).Error;
        Assert.Contains("with the primary absent, not shorted", error, StringComparison.Ordinal);
        Assert.DoesNotContain("not open", error, StringComparison.Ordinal);
    }

    // Two capacitors: with 5 pF on 16 pF an error comes out 8.4 times.
    [Fact]
    public void Pad()
    {
        using var scene = new CoilScene();
        double fa = 1 / (2 * Math.PI * Math.Sqrt(.0225 * 16e-12)) / 1e3;
        double fb = 1 / (2 * Math.PI * Math.Sqrt(.0225 * 21e-12)) / 1e3;
        string a = FormattableString.Invariant($"{fa:F6}k");
        string b = FormattableString.Invariant($"{fb:F6}k");
        JsonElement e = scene.Json("pad", a, b, "--pf", "5");
        Assert.Equal(.0225, e.GetProperty("inductance_top_h").GetDouble(), 1e-8);
        Assert.Equal(16e-12, e.GetProperty("capacitance_top_f").GetDouble(), 1e-17);
        Assert.Equal(8.4, e.GetProperty("error_amplification_second").GetDouble(), 1e-5);
        AppRun text = scene.Run("pad", a, b, "--pf", "5");
        Assert.Contains("8.4 times", text.Out, StringComparison.Ordinal);
        Assert.Contains("Effective at the top terminal", text.Out, StringComparison.Ordinal);
        Assert.DoesNotContain("bare coil", text.Error, StringComparison.Ordinal);
        Assert.Contains("bare coil", scene.Run("pad", "382.5k", "361.5k", "--pf", "1").Error, StringComparison.OrdinalIgnoreCase);
    }

    // Exact RLC edges at .9: 249.697482 and 250.302885 kHz.
    [Fact]
    public void Window()
    {
        using var scene = new CoilScene();
        JsonElement e = scene.Json("window", "--f0", "250k", "--q", "200", "--fraction", "0.9");
        Assert.Equal(249697.482, e.GetProperty("cold")[0].GetProperty("lower_hz").GetDouble(), .001);
        Assert.Equal(250302.885, e.GetProperty("cold")[0].GetProperty("upper_hz").GetDouble(), .001);
        Assert.False(e.GetProperty("untrimmed_will_do").GetBoolean());
        AppRun text = scene.Run("window", "--f0", "250k", "--q", "200");
        Assert.Contains("cold", text.Out, StringComparison.Ordinal);
        Assert.Contains("loaded", text.Out, StringComparison.Ordinal);
        Assert.Contains("no source", text.Error, StringComparison.Ordinal);
        Assert.Contains("copper allows", scene.Run("window", "foyer").Out, StringComparison.Ordinal);
    }

    // f_inf + d exp(-t/tau) with d = 900 Hz, tau = 900 s leaves the half window of 302.7 Hz after -tau ln(1 - 302.7/900) = 369 s.
    [Fact]
    public void Window_and_a_logged_warm_up()
    {
        using var scene = new CoilScene();
        scene.KeepWarmUp(250e3, 900, 900, 121);
        JsonElement e = scene.Json("window", "--f0", "250.9k", "--q", "200.72", "--fraction", "0.9", "--run", "1", "--record", scene.Record);
        Assert.Equal("leaves", e.GetProperty("warm_up").GetString());
        Assert.Equal(369, e.GetProperty("leaves_after_s").GetDouble(), 5.0);
        Assert.False(e.GetProperty("fixed_will_do").GetBoolean());
        Assert.Contains("Feedback is needed", scene.Run("window", "--f0", "250.9k", "--q", "200", "--run", "1", "--record", scene.Record).Out, StringComparison.Ordinal);
    }

    // Eight loops' own and mutual inductances: 23.721856 uH at radii from .100 m; M 95.032 uH (k .1299 with the coil's own 22.573 mH).
    [Fact]
    public void Tank_of_the_foyer()
    {
        using var scene = new CoilScene();
        JsonElement e = scene.Json("tank", "foyer");
        Assert.Equal(1, e.GetProperty("inductance_h").GetDouble() / 23.721856e-6, 1e-6);
        Assert.Equal(95.032e-6, e.GetProperty("mutual_h").GetDouble(), 1e-9);
        Assert.Equal(.1299, e.GetProperty("k").GetDouble(), 1e-4);
        double cold = e.GetProperty("cold").GetProperty("secondary_hz").GetDouble();
        // Thomson.
        Assert.Equal(1, e.GetProperty("cold").GetProperty("capacitor_for_tap_f").GetDouble() * Math.Pow(2 * Math.PI * cold, 2) * 23.721856e-6, 1e-5);
        Assert.True(e.GetProperty("loaded").GetProperty("secondary_hz").GetDouble() < cold);
        Assert.True(e.GetProperty("loaded").GetProperty("tap_for_capacitor_turns").GetDouble() > e.GetProperty("cold").GetProperty("tap_for_capacitor_turns").GetDouble());
        Assert.Equal(16, e.GetProperty("taps").GetArrayLength());
        AppRun text = scene.Run("tank", "foyer");
        Assert.Contains("Hz per cm", text.Out, StringComparison.Ordinal);
        Assert.Contains("locked out", text.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void A_tank_without_capacitor_shows_its_currents()
    {
        using var scene = new CoilScene();
        JsonElement e = scene.Json("tank", "classroom");
        JsonElement cold = e.GetProperty("cold");
        double l = e.GetProperty("inductance_h").GetDouble();
        // Triangle of a half bridge: (V/2)/(4 f L).
        Assert.Equal(1, cold.GetProperty("triangle_peak_a").GetDouble() / (15 / (4 * cold.GetProperty("secondary_hz").GetDouble() * l)), 1e-9);
        Assert.Contains("peak current, no secondary", scene.Run("tank", "classroom").Out, StringComparison.Ordinal);
    }

    [Fact]
    public void A_reading_of_the_primary_moves_the_tap()
    {
        using var scene = new CoilScene();
        scene.Keep(215e3, 60, of: "primary");
        JsonElement e = scene.Json("tank", "foyer", "--against", "last", "--record", scene.Record, "--tap", "7.5", "--f0", "268.42k");
        JsonElement moves = e.GetProperty("cold").GetProperty("moves");
        Assert.Equal(2, moves.GetArrayLength());
        Assert.All(moves.EnumerateArray(), move => Assert.Equal("fewer turns", move.GetProperty("direction").GetString()));
        // Put on the capacitor, L must fall as the square of the frequencies: 21.05 uH (215/268.42)^2 = 13.5 uH, six turns and a bit.
        Assert.InRange(moves[1].GetProperty("to_turns").GetDouble(), 5.95, 6.1);
        Assert.True(moves[1].GetProperty("along_mm").GetDouble() < 0);
        AppRun text = scene.Run("tank", "foyer", "--against", "215k", "--of", "primary", "--tap", "7.5");
        Assert.Contains("fewer turns", text.Out, StringComparison.Ordinal);
        Assert.Contains("cm along the conductor", text.Out, StringComparison.Ordinal);
    }
}
