using System.Numerics;
using Looseloop.Bench.Board;
using Looseloop.Bench.Physics;
using Looseloop.Protocol;

namespace Looseloop.Bench.Tests;

/// <summary>The square wave's harmonics (section D of the measurement notes) and the timer (section 4 of the board notes).</summary>
public class DriveTests
{
    private static readonly DriveStage _sharp = new() { SwingVolts = 1, RiseNs = 0, FallNs = 0 };

    [Theory]
    [InlineData(0.5, 0.636620, 0, 0.212207, 0, 0.127324)]
    [InlineData(1.0 / 3, 0.551329, 0.275664, 0, 0.137832, 0.110266)]
    [InlineData(0.2, 0.374196, 0.302731, 0.201820, 0.093549, 0)] // K 21
    public void HarmonicsAreThoseOfAPulseTrain(double duty, double a1, double a2, double a3, double a4, double a5)
    {
        double[] amplitudes = [a1, a2, a3, a4, a5];
        var phasors = new Complex[6];
        SquareWave.Fill(_sharp, 150e3, duty, phasors);
        for (int n = 1; n <= 5; n++)
        {
            Assert.Equal(amplitudes[n - 1], phasors[n].Magnitude, 1e-6);
        }
    }

    [Theory]
    [InlineData(1, 0.5878)]
    [InlineData(3, 0.9511)]
    [InlineData(5, 0)]
    public void TheDutyTestTellsHarmonicsApart(int n, double ratio)
    {
        // K 22: y at duty 1/5 against 1/2.
        var fifth = new Complex[6];
        var half = new Complex[6];
        SquareWave.Fill(_sharp, 50e3, 0.2, fifth);
        SquareWave.Fill(_sharp, 50e3, 0.5, half);
        Assert.Equal(ratio, fifth[n].Magnitude / half[n].Magnitude, 1e-4);
    }

    [Fact]
    public void ALongerHighTimeMakesAnEvenHarmonic()
    {
        // Section L: 50 ns is .75 % of duty at 150 kHz; it makes a second harmonic of about 2 % "even at 1/2".
        var phasors = new Complex[4];
        SquareWave.Fill(_sharp with { HighExtraNs = 50 }, 150e3, 0.5, phasors);
        Assert.Equal(0.5075, phasors[0].Real, 1e-12);
        Assert.InRange(phasors[2].Magnitude / phasors[1].Magnitude, 0.020, 0.027);
    }

    [Fact]
    public void EdgesAreThoseOfATrapezium()
    {
        // Against a plain numerical Fourier integral of the waveform.
        DriveStage stage = _sharp with { RiseNs = 300, FallNs = 700, HighExtraNs = 100 };
        var phasors = new Complex[8];
        SquareWave.Fill(stage, 150e3, 0.4, phasors);
        const int points = 200_000;
        double high = 0.4 + (100e-9 * 150e3);
        for (int h = 1; h < phasors.Length; h++)
        {
            Complex sum = 0;
            for (int i = 0; i < points; i++)
            {
                double at = ((i + 0.5) / points) - 0.25;
                double rise = Math.Clamp((at / (300e-9 * 150e3)) + 0.5, 0, 1);
                double fall = Math.Clamp(((at - high) / (700e-9 * 150e3)) + 0.5, 0, 1);
                sum += (rise - fall) * Complex.FromPolarCoordinates(2.0 / points, -2 * Math.PI * h * at);
            }

            Assert.True((sum - phasors[h]).Magnitude < 1e-6, $"harmonic {h}: {sum} {phasors[h]}");
        }
    }

    [Theory]
    [InlineData(40_000, 10, 500, 40_000.00)]
    [InlineData(65_000, 10, 308, 64_935.06)]
    [InlineData(150_000, 9, 267, 149_812.7)]
    [InlineData(300_000, 8, 267, 299_625.5)]
    [InlineData(1_000_000, 6, 320, 1_000_000)]
    public void TheTimerMakesOfARequestWhatTheRuntimeMakes(int request, int bits, int divider, double hertz)
    {
        LedcTimer timer = LedcTimer.Request(request, 0.5, 19);
        Assert.Equal((bits, divider), (timer.Bits, (int)timer.PartsPerCount));
        Assert.Equal(hertz, timer.NominalHz, 0.05);
    }

    [Fact]
    public void DutyIsCutOffTwice()
    {
        // Section 4: asking for count / 2^r lands one low for 120 of the 128 counts of up to one half at r = 8.
        int low = 0;
        for (int count = 1; count <= 128; count++)
        {
            low += LedcTimer.Request(300_000, count / 256.0, 19).HighCounts == count - 1 ? 1 : 0;
        }

        Assert.Equal(120, low);
        Assert.Equal(50, LedcTimer.Request(300_000, 51 / 256.0, 19).HighCounts);
        Assert.Equal(7, LedcTimer.Request(300_000, 8 / 256.0, 19).HighCounts);
    }

    [Theory]
    [InlineData(19)]
    [InlineData(13)]
    public void EveryCountArrivesWhenItIsAskedForRightly(int mostBits)
    {
        // One request for each number of duty bits in use, 8 kHz to 1 MHz; every count through both truncations.
        var seen = new HashSet<int>();
        for (int request = 8000; request <= 1_000_000; request += 997)
        {
            int bits = LedcTimer.Request(request, 0.5, mostBits).Bits;
            if (!seen.Add(bits))
            {
                continue;
            }

            for (int count = 1; count < 1 << bits; count++)
            {
                Assert.Equal(count, LedcTimer.Request(request, FrequencyGrid.AskedDuty(count, bits), mostBits).HighCounts);
            }
        }

        Assert.Equal([6, 7, 8, 9, 10, 11, 12, 13], seen.Order().Where(bits => bits <= 13));
    }

    [Fact]
    public void TheTimerAndTheGridAgreeOnEverySetting()
    {
        int bits = FrequencyGrid.DutyBits(8000, 19);
        int divider = FrequencyGrid.Divider(8000, bits);
        int settings = 0;
        while (FrequencyGrid.FrequencyHz(bits, divider) < 1_000_000)
        {
            LedcTimer timer = LedcTimer.Request(FrequencyGrid.RequestHz(bits, divider), 0.5, 19);
            Assert.Equal((bits, (long)divider), (timer.Bits, timer.PartsPerCount));
            Assert.Equal(FrequencyGrid.FrequencyHz(bits, divider), timer.NominalHz, 1e-6);
            FrequencyGrid.StepUp(ref bits, ref divider, 19);
            settings++;
        }

        Assert.InRange(settings, 1500, 2000);
    }

    [Fact]
    public void ImpossibleRequestsAreRefused()
    {
        Assert.Throws<ArgumentException>(() => LedcTimer.Request(0, 0.5, 19));
        Assert.Throws<ArgumentException>(() => LedcTimer.Request(50_000_000, 0.5, 19));
        Assert.Throws<ArgumentException>(() => LedcTimer.Request(150_000, 1.1, 19));
        Assert.Throws<ArgumentException>(() => LedcTimer.Request(150_000, double.NaN, 19));
    }
}
