using Looseloop.Bench.Detectors;
using Looseloop.Bench.Physics;
using MathNet.Numerics;

namespace Looseloop.Bench.Tests;

/// <summary>What each detector makes of a sine, against textbook means; the diode's against a library's Bessel function.</summary>
public class DetectorLawTests
{
    [Theory]
    [InlineData(0.01)]
    [InlineData(0.1)]
    [InlineData(1.3)]
    public void ASineGivesItsTextbookMeans(double amplitude)
    {
        var wave = Sine(amplitude, 0.3);

        // Mean |sin| = 2/pi, mean ln|sin| = -ln 2; both through straight lines between 128 points.
        Assert.Equal(2 / Math.PI * amplitude, wave.MeanAbsolute(), 3e-4 * amplitude);
        Assert.Equal(Math.Log(amplitude / 2), wave.MeanLogarithm(), 1e-3);
        Assert.Equal(amplitude, wave.Peak(1), 1e-5 * amplitude);
        Assert.Equal(amplitude, wave.Peak(-1), 1e-5 * amplitude);
    }

    [Theory]
    [InlineData(0.3)]
    [InlineData(1)]
    [InlineData(5)]
    [InlineData(20)]
    [InlineData(60)]
    public void ADiodeGivesTheLogarithmOfABesselFunction(double amplitudeOverDiode)
    {
        // Section L: for a sine nVt ln I0(A / nVt).
        const double diode = 0.027;
        double expected = diode * Math.Log(SpecialFunctions.BesselI0(amplitudeOverDiode));
        Assert.Equal(expected, Sine(amplitudeOverDiode * diode, 1.1).LogMeanExponential(diode), 1e-9 * diode);
    }

    [Fact]
    public void APeriodWithManyHarmonicsIsThatOfADirectSum()
    {
        var phasors = new System.Numerics.Complex[16];
        var noise = new NoiseSource(3);
        for (int h = 1; h < phasors.Length; h++)
        {
            phasors[h] = new System.Numerics.Complex(noise.Normal() / h, noise.Normal() / h);
        }

        var wave = new Waveform();
        wave.Fill(phasors);
        const int fine = 200_000;
        double absolute = 0;
        double logarithm = 0;
        double peak = 0;
        for (int i = 0; i < fine; i++)
        {
            double angle = 2 * Math.PI * i / fine;
            double value = 0;
            for (int h = 1; h < phasors.Length; h++)
            {
                value += (phasors[h] * System.Numerics.Complex.FromPolarCoordinates(1, h * angle)).Real;
            }

            absolute += Math.Abs(value);
            logarithm += Math.Log(Math.Abs(value));
            peak = Math.Max(peak, value);
        }

        Assert.Equal(absolute / fine, wave.MeanAbsolute(), 0.005 * absolute / fine);
        Assert.Equal(logarithm / fine, wave.MeanLogarithm(), 0.01);
        Assert.Equal(peak, wave.Peak(1), 0.01 * peak);
    }

    [Theory]
    [InlineData(0.01)]
    [InlineData(0.4)]
    [InlineData(5)]
    public void TheLowPassIsExactForAParabola(double steps)
    {
        // T y' = g - y with g = a + b s + c s^2, s = t / T: y = g - (b + 2 c s) + 2 c + rest e^-s.
        const double a = 0.7;
        const double b = -0.3;
        const double c = 0.2;
        double G(double s) => a + (b * s) + (c * s * s);
        double Particular(double s) => G(s) - (b + (2 * c * s)) + (2 * c);
        const double start = 1.9;
        double expected = Particular(steps) + ((start - Particular(0)) * Math.Exp(-steps));
        Assert.Equal(expected, LowPass.Step(start, G(0), G(steps / 2), G(steps), steps), 1e-10);
    }

    [Fact]
    public void PowerAndItsLogarithmAgree()
    {
        // 20 dB a decade: the two outputs of the same power must be the same level.
        World linear = WorldShelf.Load("") with { Detector = new DetectorParameters { Gain = 1, PedestalVolts = 0 } };
        World log = linear with { Detector = linear.Detector with { Kind = DetectorKind.RmsLog, InterceptDbV = -70, MvPerDb = 25 } };
        var first = new Scene(linear, 1);
        var second = new Scene(log, 1);
        first.Drive(0, 150e3, 0.5);
        second.Drive(0, 150e3, 0.5);
        double rms = first.DetectorVolts(0.1);
        Assert.Equal(0.025 * ((20 * Math.Log10(rms)) + 70), second.DetectorVolts(0.1), 1e-9);
    }

    private static Waveform Sine(double amplitude, double phase)
    {
        var wave = new Waveform();
        wave.Fill([0, System.Numerics.Complex.FromPolarCoordinates(amplitude, phase)]);
        return wave;
    }
}
