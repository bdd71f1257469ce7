using Looseloop.Bench;
using Looseloop.Bench.Board;

namespace Looseloop.Campaign;

/// <summary>Sets a world's gains so that its peak stands at a wanted level, by trying it on its own board.</summary>
public static class PeakLevel
{
    /// <summary>What an ordinary pickup and buffer give a detector at the peak, volts rms.</summary>
    private const double OrdinaryInputVolts = 0.3;

    /// <summary>A diode is offered less: from its square-law range to its peak range.</summary>
    private const double DiodeInputVolts = 0.06;

    /// <summary>A world whose peak at duty 1/2 stands this many counts above its pedestal (were the range long enough).</summary>
    public static World Set(World world, double counts)
    {
        double wanted = world.Detector.Kind == DetectorKind.Diode ? DiodeInputVolts : OrdinaryInputVolts;
        World scaled = world with { Pickup = world.Pickup with { Gain = world.Pickup.Gain * wanted / InputRms(world) } };
        double volts = counts / CountsPerVolt(world);
        DetectorParameters detector = scaled.Detector;
        double decibel = 20 * Math.Log10(wanted);
        double nepersOfDiode = wanted * Math.Sqrt(2) / (detector.DiodeMv * 1e-3);
        double diodeOutput = detector.DiodeMv * 1e-3 * LogI0(nepersOfDiode);
        return scaled with
        {
            Detector = detector.Kind switch
            {
                DetectorKind.Square => detector with { Gain = volts / (wanted * wanted) },
                DetectorKind.RmsLog or DetectorKind.Logarithm => detector with { InterceptDbV = decibel - (volts / (detector.MvPerDb * 1e-3)) },
                DetectorKind.Diode => detector with { Gain = volts / diodeOutput },
                DetectorKind.MeanAbsolute => detector with { Gain = volts / (wanted * Math.Sqrt(2) * 2 / Math.PI) },
                DetectorKind.Peak => detector with { Gain = volts / (wanted * Math.Sqrt(2)) },
                _ => detector with { Gain = volts / wanted },
            },
        };
    }

    /// <summary>Amplitude at the detector's input that a linear output would show as this many counts, volts.</summary>
    public static double InputVolts(World levelled, double counts)
    {
        double wanted = levelled.Detector.Kind == DetectorKind.Diode ? DiodeInputVolts : OrdinaryInputVolts;
        return counts / 2000 * wanted * Math.Sqrt(2);
    }

    private static double CountsPerVolt(World world) => 4095 / world.Converter.FullScaleVolts;

    /// <summary>What the detector gets at the peak, volts rms, with the pickup's present gain.</summary>
    private static double InputRms(World world)
    {
        Truth truth = Truth.Loaded(world);
        for (double gain = 1e-3; gain < 1e9; gain *= 8)
        {
            World probe = world with
            {
                Room = new Room { Neighbours = world.Room.Neighbours, PeoplePf = world.Room.PeoplePf, CablePf = world.Room.CablePf },
                Detector = new DetectorParameters { Kind = DetectorKind.RmsLinear, Gain = gain, FloorMv = 0, TimeConstantUs = 10 },
                Converter = new ConverterParameters { NoiseCounts = 0 },
            };
            var board = new VirtualBoard(probe, 1, new VirtualClock());
            int best = 0;
            for (int step = -4; step <= 4; step++)
            {
                board.Set((int)(truth.F0Hz * (1 + (step * 0.001))), 0.50005);
                if (step == -4)
                {
                    board.Start();
                }

                board.WaitUntilUs(board.NowUs() + (long)(1e6 * 12 * truth.Q / (Math.PI * truth.F0Hz)) + 300);
                best = Math.Max(best, board.Read(0));
            }

            double counts = best - (probe.Detector.PedestalVolts * CountsPerVolt(probe));
            if (counts > 200)
            {
                return counts / CountsPerVolt(probe) / gain;
            }
        }

        throw new InvalidOperationException("The pickup sees nothing of this coil.");
    }

    private static double LogI0(double z)
    {
        double sum = 1;
        double term = 1;
        for (int k = 1; k < 400; k++)
        {
            term *= z * z / (4.0 * k * k);
            sum += term;
        }

        return Math.Log(sum);
    }
}
