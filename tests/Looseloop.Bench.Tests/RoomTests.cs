using Looseloop.Bench.Physics;

namespace Looseloop.Bench.Tests;

/// <summary>Drift, carriers, hum, the direct input, the converter.</summary>
public class RoomTests
{
    private const double CountsPerVolt = 4095 / 3.3;

    [Fact]
    public void AWarmingCoilIsFollowed()
    {
        // Driven at one frequency while f0 drifts through it: the level must be that of a coil that stands still there.
        World still = WorldShelf.Load("wren");
        World warming = still with { Room = still.Room with { WarmUp = new WarmUp { StartPpm = 10_000, TimeS = 10 } } };
        var scene = new Scene(warming, 1);
        scene.Drive(0, 150.2e3, 0.5);
        foreach (double timeS in new[] { 10.0, 15, 18, 20, 22, 30 })
        {
            double scale = 1 + (0.01 * Math.Exp(-timeS / 10));
            var coil = still.Coil with { Modes = [.. still.Coil.Modes.Select(mode => mode with { F0Hz = mode.F0Hz * scale })] };

            // The same capacitance pulls the same frequency by the same amount only if C stays: keep it by L.
            coil = coil with { InductanceMh = still.Coil.InductanceMh / (scale * scale) };

            // With it the voltage for each unit of charge rises by the scale; a warming coil's stays.
            PickupAntenna pickup = still.Pickup with { Gain = still.Pickup.Gain / scale };
            var reference = new Scene(still with { Coil = coil, Pickup = pickup, FeedThrough = still.FeedThrough with { Fraction = 0 } }, 1);
            var plain = new Scene(warming with { FeedThrough = still.FeedThrough with { Fraction = 0 } }, 1);
            reference.Drive(0, 150.2e3, 0.5);
            plain.Drive(0, 150.2e3, 0.5);
            for (double at = 1e-3; at < timeS; at += 1e-2)
            {
                plain.DetectorVolts(at);
            }

            Assert.Equal(reference.DetectorVolts(timeS), plain.DetectorVolts(timeS), 0.003);
            Assert.Equal(reference.Response.F0Hz, Truth.Loaded(warming, timeS).F0Hz, 0.5);
        }
    }

    [Fact]
    public void TheDirectInputScattersByTheTruePower()
    {
        // Section L: the variance of samples at unrelated times is the power; relative SD of amplitude .354/sqrt(N) for a sine.
        World world = WorldShelf.Load("dipper") with { Converter = new ConverterParameters { NoiseCounts = 0 } };
        world = world with { Detector = world.Detector with { Kind = DetectorKind.RmsLinear, Gain = 1, PedestalVolts = 0 } };
        var scene = new Scene(world, 3);
        scene.Drive(0, scene.Response.F0Hz, 1.0 / 3);
        var jitter = new NoiseSource(9);
        double timeS = 0.05;
        const int samples = 40_000;
        double sum = 0;
        double squares = 0;
        for (int i = 0; i < samples; i++)
        {
            timeS += 130e-6 + (8e-6 * jitter.Uniform());
            double value = scene.ReadDirect(timeS);
            sum += value;
            squares += value * value;
        }

        double mean = sum / samples;
        double rms = Math.Sqrt((squares / samples) - (mean * mean)) / CountsPerVolt;
        Assert.Equal(4095 / 2.0, mean, 10.0);
        double expected = scene.DetectorVolts(timeS);
        Assert.Equal(1, rms / expected, 5 * 0.354 / Math.Sqrt(samples));
    }

    [Fact]
    public void ACarrierAddsItsPowerAndBeats()
    {
        World world = new()
        {
            Room = new Room { Carriers = [new Carrier { FrequencyHz = 150.1e3, Volts = 0.1 }] },
            Detector = new DetectorParameters { PedestalVolts = 0, Gain = 1, FloorMv = 0 },
        };
        var scene = new Scene(world, 1);
        Assert.Equal(0.1 / Math.Sqrt(2), scene.DetectorVolts(0.01), 1e-9);
        scene.Drive(0.02, 150e3, 0.5);
        double own = 0;
        foreach (var phasor in scene.Response.Steady)
        {
            own += 0.5 * phasor.Magnitude * phasor.Magnitude;
        }

        // Over whole beats of 100 Hz the powers add; the beat swings by twice the product of the two amplitudes' rms.
        double mean = 0;
        double low = double.MaxValue;
        double high = 0;
        for (int i = 0; i < 1000; i++)
        {
            double volts = scene.DetectorVolts(0.1 + (i * 1e-5));
            double power = volts * volts;
            mean += power / 1000;
            low = Math.Min(low, power);
            high = Math.Max(high, power);
        }

        Assert.Equal(own + 0.005, mean, 1e-6);
        Assert.Equal(2 * 0.1 * scene.Response.Steady[1].Magnitude, high - low, 1e-3 * high);
    }

    [Fact]
    public void HumSwingsAndAveragesOut()
    {
        World world = new() { Room = new Room { Hum = new MainsHum { OutputMv = 40, SecondShare = 0 } }, Converter = new ConverterParameters { NoiseCounts = 0 } };
        var scene = new Scene(world, 1);
        double sum = 0;
        int low = int.MaxValue;
        int high = 0;
        for (int i = 0; i < 2000; i++)
        {
            int counts = scene.ReadDetector(i * 1e-4);
            sum += counts;
            low = Math.Min(low, counts);
            high = Math.Max(high, counts);
        }

        Assert.Equal(0.08 * CountsPerVolt, high - low, 2.0);
        Assert.Equal((0.25 + (5 * 0.3e-3)) * CountsPerVolt, sum / 2000, 0.5);
    }

    [Fact]
    public void NoiseHasItsStatedScatterAndTheDeadZoneHasNone()
    {
        var scene = new Scene(new World { Converter = new ConverterParameters { NoiseCounts = 4 } }, 5);
        double sum = 0;
        double squares = 0;
        const int samples = 50_000;
        for (int i = 0; i < samples; i++)
        {
            double value = scene.ReadDetector(i * 1e-4);
            sum += value;
            squares += value * value;
        }

        double mean = sum / samples;
        double deviation = Math.Sqrt((squares / samples) - (mean * mean));

        // Rounding adds 1/12 to the variance (Widrow and Kollar 2008, from memory).
        Assert.Equal(Math.Sqrt(16 + (1 / 12.0)), deviation, 5 * 4 / Math.Sqrt(2.0 * samples));

        var blind = new Scene(new World { Detector = new DetectorParameters { PedestalVolts = 0.1 } }, 5);
        for (int i = 0; i < 1000; i++)
        {
            Assert.Equal(0, blind.ReadDetector(i * 1e-4));
        }
    }

    [Fact]
    public void BurstsComeAtTheirRate()
    {
        World world = new()
        {
            Room = new Room { Bursts = new Bursts { PerSecond = 20, OutputMv = 400, LengthUs = 1000 } },
            Converter = new ConverterParameters { NoiseCounts = 0 },
        };
        var scene = new Scene(world, 11);
        int hit = 0;
        for (int i = 0; i < 200_000; i++)
        {
            hit += scene.ReadDetector(i * 1e-4) > 315 ? 1 : 0;
        }

        // 20 a second of 1 ms each: nearly 2 % of the time; 20 seconds hold 400 of them.
        Assert.InRange(hit / 200_000.0, 0.016, 0.023);
    }

    [Fact]
    public void AThermistorTellsTheTemperature()
    {
        World world = new() { Room = new Room { TemperatureC = 25 }, Converter = new ConverterParameters { NoiseCounts = 0 } };
        Assert.InRange(new Scene(world, 1).ReadThermistor(), 2047, 2048);
        Assert.True(new Scene(world with { Room = new Room { TemperatureC = 40 } }, 1).ReadThermistor() < 1500);
    }
}
