using static Looseloop.HardwareNotes.Tests.MarkdownTable;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>The tables that show what ngspice printed.</summary>
internal static class SpiceTables
{
    private static readonly SpiceResults _results = SpiceResults.Committed;

    public static string DiodeLaw()
    {
        var table = new MarkdownTable("amplitude, mV", "out before the gain, mV", "Vt ln I0(A/Vt), mV", "square law A^2/4Vt, mV");
        double vt = SpiceClaimsTests.ThermalVoltageMv(27);
        foreach ((double amplitudeV, double outputMv) in _results.Law("diode_pair").Where(point => point.AmplitudeV > 0))
        {
            double amplitudeMv = 1e3 * amplitudeV;
            table.Row(
                Digits(amplitudeMv, 3),
                Digits(outputMv, 3),
                Digits(vt * Math.Log(Bessel.I0(amplitudeMv / vt)), 3),
                Digits(amplitudeMv * amplitudeMv / 4 / vt, 3));
        }

        return table.ToString();
    }

    public static string DiodeFigures()
    {
        double cool = _results["diode_pair.law_mv.at_celsius_17"];
        double warm = _results["diode_pair.law_mv.at_celsius_37"];
        double middle = _results["diode_pair.law_mv.at_volt_0.0129"];
        return new MarkdownTable("what", "above 80 kHz (10 nF)", "below 80 kHz (47 nF)")
            .Row("slope on log-log paper falls to 1.5 at", Digits(1e3 * _results["diode_pair.knee_volt"], 2) + " mV", "the same")
            .Row("rises to 63 % of a 13 mV carrier in", Us("diode_pair.rise_us.to_volt_0.0129"), Us("diode_pair.low_band.rise_us.to_volt_0.0129"))
            .Row("falls to 37 % after a 13 mV carrier in", Us("diode_pair.fall_us.from_volt_0.0129"), Us("diode_pair.low_band.fall_us.from_volt_0.0129"))
            .Row("falls to 37 % after a 103 mV carrier in", Us("diode_pair.fall_us.from_volt_0.1034"), "not simulated")
            .Row("ripple at 26 mV, lowest frequency of the range", Mv("diode_pair.ripple_mv_pp.at_hertz_80k"), Mv("diode_pair.low_band.ripple_mv_pp.at_hertz_30k"))
            .Row("ripple at 26 mV, 150 kHz", Mv("diode_pair.ripple_mv_pp.at_hertz_150k"), "not simulated")
            .Row("noise at the converter, no carrier", Digits(_results["diode_pair.noise_mv_rms"], 2) + " mV rms", "less")
            .Row("change of the output with temperature", Digits(100 * (warm - cool) / middle / 20, 2) + " %/K", "the same")
            .Row(
                "third harmonic of 5 % moves the amplitude by",
                $"{Digits(_results["diode_pair.third_harmonic_percent.in_phase"], 2)} to {Digits(_results["diode_pair.third_harmonic_percent.against"], 2)} %",
                "the same")
            .ToString();
    }

    public static string PeakLaw()
    {
        var table = new MarkdownTable("amplitude, mV", "out, mV", "out / amplitude");
        foreach ((double amplitudeV, double outputMv) in _results.Law("peak"))
        {
            table.Row(Fixed(1e3 * amplitudeV, 0), Digits(outputMv, 3), Fixed(outputMv / 1e3 / amplitudeV, 3));
        }

        return table.ToString();
    }

    public static string PeakFigures() =>
        new MarkdownTable("what", "value")
            .Row("slope on log-log paper falls to 1.5 at", Digits(1e3 * _results["peak.knee_volt"], 2) + " mV")
            .Row("rises to 63 % of a 1 V carrier in", Us("peak.rise_us.to_volt_1"))
            .Row("falls to 37 % after a 1 V carrier in", Us("peak.fall_us.from_volt_1"))
            .Row("ripple at 1 V, 30 kHz", Mv("peak.ripple_mv_pp.at_hertz_30k"))
            .Row("ripple at 1 V, 150 kHz", Mv("peak.ripple_mv_pp.at_hertz_150k"))
            .Row("output at 1 V, 30 kHz against 600 kHz", $"{Digits(_results["peak.law_mv.at_hertz_30k"], 3)} against {Digits(_results["peak.law_mv.at_hertz_600k"], 3)} mV")
            .Row(
                "third harmonic of 5 % moves the amplitude by",
                $"{Digits(_results["peak.third_harmonic_percent.in_phase"], 2)} to {Digits(_results["peak.third_harmonic_percent.against"], 2)} %")
            .ToString();

    public static string Drive()
    {
        var table = new MarkdownTable("arrangement", "at the antenna on resonance, mV per volt of drive", "feed-through / peak, %");
        foreach ((string name, string text) in ((string, string)[])
        [
            ("bare-after", "no screen, resistor at the far end: the whole loop swings"),
            ("bare-before", "no screen, resistor before the loop"),
            ("screened", "screened, resistor before the loop"),
        ])
        {
            table.Row(text, Digits(_results[$"drive.{name}.antenna_mv_per_volt"], 3), Digits(_results[$"drive.{name}.feed_through_percent"], 2));
        }

        return table.ToString();
    }

    public static string Current()
    {
        var table = new MarkdownTable("frequency", "loop current, mA per volt of drive");
        foreach ((string key, string text) in ((string, string)[])
        [
            ("8k", "8 kHz"), ("30k", "30 kHz"), ("150k", "150 kHz"), ("268k", "268 kHz"), ("600k", "600 kHz"), ("1meg", "1 MHz"), ("3meg", "3 MHz"),
        ])
        {
            table.Row(text, Fixed(_results[$"drive.current_ma_per_volt.at_hertz_{key}"], 2));
        }

        return table + $"\nAs a square wave of 5 V at 150 kHz: {Digits(_results["drive.current_ma_pp"], 3)} mA peak to peak, "
            + $"{Digits(_results["drive.current_ma_rms"], 3)} mA RMS (the 4.7 uF block takes the mean away; ringing is what exceeds "
            + $"100 mA), edges of {Digits(_results["drive.edge_ns_10_to_90"], 2)} ns.\n";
    }

    public static string Enable() =>
        new MarkdownTable("what", "needed", "typical parts", "parts at their worst")
            .Row(
                "up to 2.1 V after the first byte of one line",
                "within the line, 2.1 ms",
                Ms("enable.typical.single.up_ms_to_2.1_volt"),
                Ms("enable.weak.single.up_ms_to_2.1_volt"))
            .Row("after that one line", "above 2.1 V", V("enable.typical.single.volt_after_the_line"), V("enable.weak.single.volt_after_the_line"))
            .Row("lowest on one line each 50 ms", "above 1.4 V", V("enable.typical.sparse.lowest_volt"), V("enable.weak.sparse.lowest_volt"))
            .Row(
                "down to 0.5 V after the last byte",
                "below 500 ms",
                Ms("enable.typical.sparse.down_ms_to_0.5_volt"),
                Ms("enable.slow.full.down_ms_to_0.5_volt"))
            .ToString();

    private static string Us(string name) => Digits(_results[name], 3) + " us";

    private static string Ms(string name) => Digits(_results[name], 2) + " ms";

    private static string Mv(string name) => Digits(_results[name], 2) + " mV peak to peak";

    private static string V(string name) => Fixed(_results[name], 2) + " V";
}
