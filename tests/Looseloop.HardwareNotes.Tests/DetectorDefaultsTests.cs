using System.Globalization;
using System.Text.RegularExpressions;
using Looseloop.Bench;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>The virtual detectors are those of the notes: their defaults are held to what ngspice printed and to its netlists.</summary>
public sealed partial class DetectorDefaultsTests
{
    private readonly SpiceResults _results = SpiceResults.Committed;
    private readonly DetectorParameters _diode = DetectorParameters.Of(DetectorKind.Diode);
    private readonly DetectorParameters _peak = DetectorParameters.Of(DetectorKind.Peak);

    /// <summary>
    /// The law V = n Vt ln I0(A/n Vt) with n Vt and a loss before the junction free, least squares over a grid. The two trade
    /// against each other, so that n Vt is known to some 2 % by it; a transistor's is kT/q.
    /// </summary>
    [Fact]
    public void The_diodes_voltage_is_that_of_the_netlists_law()
    {
        (double AmplitudeV, double OutputMv)[] law = [.. _results.Law("diode_pair").Where(point => point.AmplitudeV > 0)];
        (double Mv, double Loss, double Error) best = (0, 0, double.PositiveInfinity);
        for (double mv = 24; mv < 28; mv += 0.05)
        {
            for (double loss = 0; loss < 0.03; loss += 0.0005)
            {
                double error = Math.Sqrt(law.Average(point => Square(Law(1e3 * point.AmplitudeV * (1 - loss), mv) / point.OutputMv - 1)));
                best = error < best.Error ? (mv, loss, error) : best;
            }
        }

        Assert.InRange(best.Error, 0, 0.01);
        Assert.InRange(best.Loss, 0.005, 0.025);
        Assert.InRange(_diode.DiodeMv / best.Mv, 0.975, 1.025);
        Assert.InRange(_diode.DiodeMv / SpiceClaimsTests.ThermalVoltageMv(27), 0.998, 1.002);

        // With the default and without the loss the bench's law is the netlist's to the square of that loss.
        Assert.All(law, point => Assert.InRange(Law(1e3 * point.AmplitudeV, _diode.DiodeMv) / point.OutputMv, 1, 1.045));
    }

    [Fact]
    public void The_diodes_time_constant_is_the_netlists_near_the_square_law()
    {
        double rise = _results["diode_pair.rise_us.to_volt_0.0129"];
        double fall = _results["diode_pair.fall_us.from_volt_0.0129"];
        Assert.InRange(_diode.TimeConstantUs / ((rise + fall) / 2), 0.98, 1.02);
    }

    [Fact]
    public void The_diodes_noise_gain_and_pedestal_are_the_netlists()
    {
        Assert.InRange(_diode.OutputNoiseMv / _results["diode_pair.noise_mv_rms"], 0.98, 1.02);
        string netlist = File.ReadAllText(NotesFolder.File(Path.Combine("spice", "diode-pair.cir")));
        Assert.Equal(Number(Gain().Match(netlist)), _diode.Gain);
        Assert.Equal(Number(DiodePedestal().Match(netlist)), _diode.PedestalVolts);
    }

    [Fact]
    public void The_peak_detector_is_the_netlists_at_one_volt()
    {
        Assert.InRange(_peak.TimeConstantUs / _results["peak.rise_us.to_volt_1"], 0.98, 1.02);
        Assert.InRange(_peak.DecayUs / _results["peak.fall_us.from_volt_1"], 0.98, 1.02);

        // A sine of amplitude A has the level A / sqrt(2) on the bench.
        Assert.InRange(_peak.Gain * 1000 / Math.Sqrt(2) / _results["peak.law_mv.at_volt_1"], 0.98, 1.02);

        // A hundredth of a count is no noise.
        Assert.Equal(0, _peak.OutputNoiseMv);
        Assert.InRange(_results["peak.noise_mv_rms"], 0, 0.008);
        string netlist = File.ReadAllText(NotesFolder.File(Path.Combine("spice", "peak-detector.cir")));
        Assert.Equal(Number(PeakPedestal().Match(netlist)), _peak.PedestalVolts);
        Assert.Equal(_peak with { Kind = DetectorKind.PeakToPeak }, DetectorParameters.Of(DetectorKind.PeakToPeak));
    }

    private static double Law(double amplitudeMv, double diodeMv) => diodeMv * Math.Log(Bessel.I0(amplitudeMv / diodeMv));

    private static double Square(double x) => x * x;

    private static double Number(Match match) => double.Parse(match.Groups["value"].Value, CultureInfo.InvariantCulture);

    [GeneratedRegex(@"^Ediff \S+ \S+ \S+ \S+ (?<value>[0-9.]+)$", RegexOptions.Multiline)]
    private static partial Regex Gain();

    [GeneratedRegex(@"^Eped .*\+(?<value>[0-9.]+)'$", RegexOptions.Multiline)]
    private static partial Regex DiodePedestal();

    [GeneratedRegex(@"^Vped \S+ \S+ (?<value>[0-9.]+)$", RegexOptions.Multiline)]
    private static partial Regex PeakPedestal();
}
