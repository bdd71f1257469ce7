using Looseloop.Bench;

namespace Looseloop.Campaign;

/// <summary>What is wrong with a world, if anything.</summary>
public enum Defect
{
    Nothing,
    FeedThroughUpTo30,
    HighQ,
    PeakDetector,
    MeanDetector,
    LogDetector,
    DiodeDetector,
    PedestalOff,
    Hum,
    BurstsOn,
    WeakCarrier,
    OvertoneNearThree,
    QuickDrift,
    CoupledPrimary,
    SecondCoil,
    Energised,
    Interrupted,
    TooStrong,
    TooWeak,
    UnevenEdges,
    DeadZone,
    TightLoop,
    ClosePickup,
    PeopleNear,
    SlowDetector,
    ClockOff,
    FeedThroughNotFlat,
    BentConverter,
}

/// <summary>Draws worlds: an ordinary coil and box, and at most one thing wrong.</summary>
public static class RandomWorld
{
    /// <summary>A world and what its builder thinks he knows of its detector.</summary>
    public sealed record Drawn(World World, Defect Defect, bool LadderRead);

    public static Drawn Draw(ulong seed, Defect? only = null)
    {
        var random = new Random(unchecked((int)(seed * 2654435761)));
        Defect[] all = Enum.GetValues<Defect>();
        Defect defect = only ?? (random.NextDouble() < 0.35 ? Defect.Nothing : all[random.Next(1, all.Length)]);
        double f0 = LogUniform(random, 35_000, 550_000);
        double q = defect == Defect.HighQ ? LogUniform(random, 600, 1000) : LogUniform(random, 20, 600);
        DetectorKind kind = random.Next(4) switch { 0 => DetectorKind.RmsLog, 1 => DetectorKind.Square, _ => DetectorKind.RmsLinear };
        var world = new World
        {
            Name = $"w{seed}",
            Coil = Coil(random, f0, q, f0 * Uniform(random, 2.35, 2.85)),
            Loop = new DriveLoop
            {
                Coupling = LogUniform(random, 0.0008, 0.004),
                InductanceUh = Uniform(random, 4, 12),
                ResistanceOhm = Uniform(random, 30, 150),
            },
            Pickup = new PickupAntenna { CouplingPf = Uniform(random, 0.003, 0.015) },
            FeedThrough = new FeedThrough { Fraction = Uniform(random, 0, 0.1), PhaseDeg = Uniform(random, 0, 360) },
            Room = new Room { PeoplePf = Uniform(random, 0, 0.006), CablePf = Uniform(random, 0, 0.004) },
            Detector = new DetectorParameters { Kind = kind, TimeConstantUs = LogUniform(random, 10, 120) },
            Converter = new ConverterParameters { NoiseCounts = Uniform(random, 1, 5) },
            Board = new BoardParameters { ClockPpm = Uniform(random, -25, 25), MostDutyBits = random.Next(2) == 0 ? 13 : 19 },
        };
        world = Spoil(world, defect, random, f0, q);
        return new Drawn(Level(world, defect, random), defect, LadderRead: true);
    }

    private static World Spoil(World world, Defect defect, Random random, double f0, double q) => defect switch
    {
        Defect.FeedThroughUpTo30 => world with { FeedThrough = world.FeedThrough with { Fraction = Uniform(random, 0.1, 0.3) } },
        Defect.FeedThroughNotFlat => world with
        {
            FeedThrough = world.FeedThrough with
            {
                Fraction = Uniform(random, 0.02, 0.2),
                Transfer = random.Next(2) == 0 ? FeedThroughTransfer.Rising : FeedThroughTransfer.Pole,
                PoleHz = f0 * Uniform(random, 0.3, 3),
            },
        },
        Defect.PeakDetector => WithDetector(world, DetectorKind.Peak),
        Defect.MeanDetector => WithDetector(world, DetectorKind.MeanAbsolute),
        Defect.LogDetector => WithDetector(world, DetectorKind.Logarithm),
        Defect.DiodeDetector => WithDetector(world, DetectorKind.Diode),
        Defect.PedestalOff => world with { Detector = world.Detector with { PedestalVolts = world.Detector.PedestalVolts + Uniform(random, -0.01, 0.01) } },
        Defect.Hum => world with { Room = world.Room with { Hum = new MainsHum { FrequencyHz = random.Next(2) == 0 ? 50 : 60, OutputMv = LogUniform(random, 2, 60), Modulation = random.Next(3) == 0 ? 0.02 : 0 } } },
        Defect.BurstsOn => world with { Room = world.Room with { Bursts = new Bursts { PerSecond = LogUniform(random, 0.5, 100), OutputMv = LogUniform(random, 20, 400) } } },
        Defect.WeakCarrier => world with { Room = world.Room with { Carriers = [new Carrier { FrequencyHz = LogUniform(random, 60_000, 900_000), Volts = 1 }] } },
        Defect.OvertoneNearThree => world with { Coil = Coil(random, f0, q, f0 * Uniform(random, 2.97, 3.06)) },
        Defect.QuickDrift => world with { Room = world.Room with { WarmUp = new WarmUp { StartPpm = LogUniform(random, 100, 30_000), TimeS = LogUniform(random, 10, 200) } } },
        Defect.CoupledPrimary => world with { Room = world.Room with { Neighbours = [new Neighbour { F0Hz = f0 * Uniform(random, 0.9, 1.1), Q = Uniform(random, 20, 80), CouplingToCoil = Uniform(random, 0.03, 0.2), CouplingToLoop = Uniform(random, 0, 0.02) }] } },
        Defect.SecondCoil => world with { Room = world.Room with { Neighbours = [new Neighbour { F0Hz = f0 * (1 + (Uniform(random, -4, 4) / q)), Q = q * Uniform(random, 0.5, 1.5), CouplingToCoil = LogUniform(random, 0.05, 2) / q, CouplingToLoop = world.Loop.Coupling * Uniform(random, 0, 0.5), PickupShare = Uniform(random, 0, 0.5) }] } },
        Defect.Energised => world with { Room = world.Room with { Carriers = [new Carrier { FrequencyHz = f0 * 0.995, Volts = 1 }] } },
        Defect.Interrupted => world with { Room = world.Room with { Carriers = [new Carrier { FrequencyHz = f0 * 0.995, Volts = 1, PeriodS = Uniform(random, 0.05, 0.5), OnS = Uniform(random, 0.001, 0.01) }] } },
        Defect.UnevenEdges => world with { Drive = world.Drive with { HighExtraNs = Uniform(random, -150, 150) } },
        Defect.DeadZone => world with { Detector = world.Detector with { PedestalVolts = Uniform(random, 0, 0.13) } },
        Defect.TightLoop => world with { Loop = world.Loop with { Coupling = LogUniform(random, 0.008, 0.02) } },
        Defect.ClosePickup => world with { Pickup = world.Pickup with { CouplingPf = LogUniform(random, 0.02, 0.1) } },
        Defect.PeopleNear => world with { Room = world.Room with { PeoplePf = LogUniform(random, 0.01, 0.1) } },
        Defect.SlowDetector => world with { Detector = world.Detector with { TimeConstantUs = LogUniform(random, 200, 1500) } },
        Defect.ClockOff => world with { Board = world.Board with { ClockPpm = Uniform(random, -60, 60) } },
        Defect.BentConverter => world with { Converter = world.Converter with { BowCounts = Uniform(random, -20, 20), RippleCounts = Uniform(random, 0, 4) } },
        _ => world,
    };

    /// <summary>Sets the gain so that the peak at duty 1/2 stands at a drawn level, and the carriers at theirs.</summary>
    private static World Level(World world, Defect defect, Random random)
    {
        double counts = defect switch
        {
            Defect.TooStrong => Uniform(random, 4500, 20_000),
            Defect.TooWeak => LogUniform(random, 2, 150),
            _ => Uniform(random, 700, 3000),
        };
        double pedestal = world.Detector.PedestalVolts * 4095 / world.Converter.FullScaleVolts;
        World quiet = world with { Room = world.Room with { Carriers = [], Hum = new MainsHum(), Bursts = new Bursts() } };
        World levelled = ToLevel(quiet, pedestal + Math.Min(counts, 3000)) with { Room = world.Room };
        levelled = levelled with { Pickup = levelled.Pickup with { Gain = levelled.Pickup.Gain * Math.Max(counts / 3000, 1) } };
        double carrierCounts = defect switch
        {
            Defect.WeakCarrier => LogUniform(random, 2, 150),
            Defect.Energised or Defect.Interrupted => LogUniform(random, 400, 3000),
            _ => 0,
        };
        return carrierCounts == 0 ? levelled : WithCarrier(levelled, pedestal + carrierCounts);
    }

    /// <summary>A diode's gain is set at its output, so that its input spans square law to peak; all others' at the buffer.</summary>
    private static World ToLevel(World world, double counts)
    {
        if (world.Detector.Kind != DetectorKind.Diode)
        {
            return world.WithPeakCounts(counts);
        }

        World wide = world with { Detector = world.Detector with { Gain = 30 } };
        return wide.WithPeakCounts(counts);
    }

    /// <summary>Sets the carriers' strength so that the level with the drive off is raised to about these counts.</summary>
    private static World WithCarrier(World world, double counts)
    {
        double low = 1e-6;
        double high = 1e3;
        for (int i = 0; i < 40; i++)
        {
            double volts = Math.Sqrt(low * high);
            if (CarrierLevel(world, volts) < counts)
            {
                low = volts;
            }
            else
            {
                high = volts;
            }
        }

        return world with { Room = world.Room with { Carriers = [.. world.Room.Carriers.Select(carrier => carrier with { Volts = low })] } };
    }

    private static double CarrierLevel(World world, double volts)
    {
        World steady = world with
        {
            Room = world.Room with { Carriers = [.. world.Room.Carriers.Select(c => c with { Volts = volts, PeriodS = 0, OnS = 0 })] },
            Converter = world.Converter with { NoiseCounts = 0 },
        };
        var board = new VirtualBoard(steady, 1, new VirtualClock());
        board.WaitUntilUs(20_000);
        return board.Read(0);
    }

    private static VirtualCoil Coil(Random random, double f0, double q, double f2) => new()
    {
        InductanceMh = 1e3 / (39.48 * f0 * f0 * Uniform(random, 8e-12, 20e-12)),
        Modes =
        [
            new CoilMode(f0, q),
            new CoilMode(f2, q * Uniform(random, 0.5, 1)) { LoopShare = Uniform(random, 0.6, 1), PickupShare = Uniform(random, 0.3, 0.6) },
            new CoilMode(f2 * Uniform(random, 1.4, 1.7), q * Uniform(random, 0.4, 0.9)) { LoopShare = Uniform(random, 0.5, 0.9), PickupShare = Uniform(random, 0.2, 0.4) },
        ],
    };

    /// <summary>An ordinary detector of a kind. Where it is no peak detector, the drawn time constant stays.</summary>
    private static World WithDetector(World world, DetectorKind kind)
    {
        var ordinary = DetectorParameters.Of(kind);
        return world with
        {
            Detector = kind == DetectorKind.Peak ? ordinary : ordinary with { TimeConstantUs = world.Detector.TimeConstantUs },
        };
    }

    private static double Uniform(Random random, double low, double high) => low + ((high - low) * random.NextDouble());

    private static double LogUniform(Random random, double low, double high) => low * Math.Pow(high / low, random.NextDouble());
}
