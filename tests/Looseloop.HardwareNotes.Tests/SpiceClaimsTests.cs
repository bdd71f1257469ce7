using System.Text;
using Looseloop.Protocol;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>What the pages conclude from the simulated circuits.</summary>
public sealed class SpiceClaimsTests
{
    private readonly SpiceResults _results = SpiceResults.Committed;

    /// <summary>kT/q with the exact constants of the SI (2019), in millivolts.</summary>
    internal static double ThermalVoltageMv(double celsius) => 1e3 * 1.380649e-23 * (celsius + 273.15) / 1.602176634e-19;

    /// <summary>
    /// The law of an ideal junction at constant mean current: exp(V/Vt) is the mean of exp(v/Vt), which for a sine is
    /// I0(A/Vt) (DLMF 10.32.1). The circuit loses 1.5 % of the amplitude before the junction.
    /// </summary>
    [Fact]
    public void The_diode_pair_follows_the_logarithm_of_the_bessel_function()
    {
        double vt = ThermalVoltageMv(27);
        const double Reaches = 0.985;
        foreach ((double amplitudeV, double outputMv) in _results.Law("diode_pair").Where(point => point.AmplitudeV > 0))
        {
            double expected = vt * Math.Log(Bessel.I0(Reaches * 1e3 * amplitudeV / vt));
            Assert.InRange(outputMv / expected, 0.98, 1.02);
        }
    }

    /// <summary>The slope of ln I0 on log-log paper is x I1/(I0 ln I0); it is 1.5 near x = 3.2, computed from the series.</summary>
    [Fact]
    public void The_knee_of_the_diode_pair_is_where_the_law_puts_it()
    {
        double x = 1;
        while (x * (Bessel.I0(x + 1e-5) - Bessel.I0(x - 1e-5)) / 2e-5 / (Bessel.I0(x) * Math.Log(Bessel.I0(x))) > 1.5)
        {
            x += 0.001;
        }

        Assert.InRange(1e3 * _results["diode_pair.knee_volt"] / (x * ThermalVoltageMv(27)), 0.95, 1.05);
    }

    /// <summary>In the square-law range the output is A^2/4Vt: it falls as 1/T.</summary>
    [Fact]
    public void The_diode_pair_weakens_with_temperature_as_one_over_T()
    {
        double ratio = _results["diode_pair.law_mv.at_celsius_37"] / _results["diode_pair.law_mv.at_celsius_17"];
        Assert.InRange(ratio / (290.15 / 310.15), 0.99, 1.01);
    }

    /// <summary>
    /// A harmonic of 5 % adds 0.125 % of amplitude to true power, whatever its phase, and up to 5 % to a peak.
    /// </summary>
    [Fact]
    public void The_diode_pair_feels_a_harmonic_as_power_and_the_peak_detector_as_amplitude()
    {
        double inPhase = _results["diode_pair.third_harmonic_percent.in_phase"];
        double against = _results["diode_pair.third_harmonic_percent.against"];
        Assert.InRange((inPhase + against) / 2, 0.10, 0.15);
        Assert.InRange(Math.Abs(inPhase - against), 0, 0.5);
        Assert.InRange(_results["peak.third_harmonic_percent.in_phase"], -5.5, -4);
        Assert.InRange(_results["peak.third_harmonic_percent.against"], 4, 5.5);
    }

    /// <summary>Junction resistance Vt/I at 10.6 uA times 10 nF, and the amplifier's 10 us.</summary>
    [Fact]
    public void The_time_constant_of_the_diode_pair_is_that_of_its_parts()
    {
        double junctionUs = ThermalVoltageMv(27) / 10.6e-3 * 10e-9 * 1e6;
        Assert.InRange(_results["diode_pair.fall_us.from_volt_0.0129"] / (junctionUs + 10), 0.9, 1.1);
    }

    [Fact]
    public void The_screen_and_the_place_of_the_resistor_do_what_the_pages_say()
    {
        Assert.InRange(_results["drive.bare-after.feed_through_percent"], 10, 40);
        Assert.InRange(_results["drive.bare-before.feed_through_percent"], 0, 0.5);
        Assert.InRange(_results["drive.screened.feed_through_percent"], 0, 0.05);

        // The driver's 3 ohm and 47 ohm, and the reactance that the page on the loop gives.
        Assert.InRange(_results["drive.current_ma_per_volt.at_hertz_150k"], 0.99 * 20, 20);
    }

    /// <summary>
    /// Thresholds of a 5 V Schmitt inverter with TTL levels over all makers, from memory: rising 1.2 to 2.1 V, falling 0.5
    /// to 1.4 V.
    /// </summary>
    [Fact]
    public void The_enable_is_up_on_the_sparsest_traffic_and_down_in_half_a_second()
    {
        foreach (string corner in (string[])["typical", "weak"])
        {
            Assert.InRange(_results[$"enable.{corner}.single.up_ms_to_2.1_volt"], 0, 2.1);
            Assert.InRange(_results[$"enable.{corner}.single.volt_after_the_line"], 2.2, 5);
            Assert.InRange(_results[$"enable.{corner}.sparse.lowest_volt"], 1.6, 5);
        }

        Assert.InRange(_results["enable.slow.full.down_ms_to_0.5_volt"], 0, 450);
    }

    /// <summary>The line whose edges pump the enable is one that a box may send, and not a long one.</summary>
    [Fact]
    public void The_simulated_line_is_a_line_of_the_protocol()
    {
        string netlist = File.ReadAllText(NotesFolder.File(Path.Combine("spice", "enable.awk")));
        string script = File.ReadAllText(NotesFolder.File(Path.Combine("spice", "run.sh")));
        const string Line = "<7 41 alive 612345";
        Assert.Contains($"\"{Line} \" crc", netlist, StringComparison.Ordinal);
        byte[] bytes = Encoding.ASCII.GetBytes(Line);
        Assert.Contains($"crc={Crc16.Of(bytes, 0, bytes.Length):X4}\n", script, StringComparison.Ordinal);
        Assert.InRange(Line.Length + 6, 20, 25);
    }
}
