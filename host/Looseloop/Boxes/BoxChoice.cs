using System.CommandLine;
using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Link;
using Looseloop.Readings;
using Looseloop.Terminal;
using BenchDetector = Looseloop.Bench.DetectorKind;

namespace Looseloop.Boxes;

/// <summary>Which box a command talks to, and what is known of its detector.</summary>
internal static class BoxChoice
{
    /// <summary>Names a box where the command line does not.</summary>
    public const string Variable = "LOOSELOOP_BOX";

    private const string BenchWord = "bench";
    private static readonly TimeSpan _patience = TimeSpan.FromSeconds(5);

    public static readonly Option<string?> BoxOption = new("--box")
    {
        Description = $"The box: a serial port, 'bench' for the virtual bench, or 'bench:WORLD' for one of its worlds or a world file. "
            + $"Without it: ${Variable}, or the only port that could be a box.",
        HelpName = "PORT",
    };

    public static readonly Option<ulong> SeedOption = new("--seed")
    {
        Description = "Seed of the virtual bench's noise.",
        DefaultValueFactory = _ => 1,
        HelpName = "N",
    };

    public static readonly Option<string?> TraceOption = new("--trace")
    {
        Description = "Write every line to and from the box, with its time, to a file.",
        HelpName = "FILE",
    };

    /// <summary>Adds the options that choose a box.</summary>
    public static void AddTo(Command command)
    {
        command.Options.Add(BoxOption);
        command.Options.Add(SeedOption);
        command.Options.Add(TraceOption);
    }

    /// <summary>Opens and identifies the box that was chosen.</summary>
    public static ChosenBox Open(Shell shell, ParseResult parsed)
    {
        string name = NameOf(shell, parsed);
        World? world = WorldOf(name);
        VirtualBox? bench = world is null ? null : new VirtualBox(world, parsed.GetValue(SeedOption));
        IByteLink link = bench ?? (IByteLink)OpenPort(name);
        TextWriter? trace = null;
        try
        {
            if (parsed.GetValue(TraceOption) is string path)
            {
                trace = new StreamWriter(path) { AutoFlush = true };
                link = new LinkTrace(link, trace);
            }

            BoxSession session = BoxSession.Open(link, _patience, shell.Cancel);
            DetectorLaw? law = world is null ? null : LawOf(world);
            if (law is not null)
            {
                Procedures.Interlock.Set(session, law);
            }

            return new ChosenBox(session, law, trace, bench);
        }
        catch
        {
            link.Dispose();
            trace?.Dispose();
            throw;
        }
    }

    /// <summary>The chosen box's name: flag, then environment, then the only port there is.</summary>
    public static string NameOf(Shell shell, ParseResult parsed) =>
        parsed.GetValue(BoxOption) ?? shell.Environment(Variable) ?? OnlyPort();

    /// <summary>The world behind a box's name, or null if the name is not one of the bench.</summary>
    public static World? WorldOf(string boxName)
    {
        if (boxName != BenchWord && !boxName.StartsWith(BenchWord + ":", StringComparison.Ordinal))
        {
            return null;
        }

        try
        {
            return WorldShelf.Load(boxName.Length > BenchWord.Length ? boxName[(BenchWord.Length + 1)..] : "");
        }
        catch (WorldFileException error)
        {
            throw new UserError(error.Message);
        }
    }

    private static SerialLink OpenPort(string name)
    {
        try
        {
            return SerialLink.Open(name);
        }
        catch (LinkOpenException error)
        {
            throw new UserError(error.Message, ExitCode.NoBox);
        }
    }

    private static string OnlyPort()
    {
        IReadOnlyList<PortCandidate> ports = PortList.Find();
        return ports.Count switch
        {
            1 => ports[0].Name,
            0 => throw new UserError(
                "No port that could be a box was found. Plug it in, name its port with --box, or try the virtual bench: --box bench.", ExitCode.NoBox),
            _ => throw new UserError(
                $"There are {ports.Count} ports that could be a box. Name one with --box: {string.Join(", ", ports.Select(port => port.Name))}.", ExitCode.NoBox),
        };
    }

    /// <summary>What the builder of this virtual box would have written down: the detector's kind, pedestal and time constant.</summary>
    public static DetectorLaw LawOf(World world)
    {
        DetectorParameters detector = world.Detector;
        double countsPerVolt = 4095 / world.Converter.FullScaleVolts;
        Readings.DetectorKind kind = detector.Kind switch
        {
            BenchDetector.RmsLog => Readings.DetectorKind.RmsLog,
            BenchDetector.Square => Readings.DetectorKind.SquareLaw,
            BenchDetector.MeanAbsolute => Readings.DetectorKind.Mean,
            BenchDetector.Logarithm => Readings.DetectorKind.LogOfWaveform,
            BenchDetector.Diode => Readings.DetectorKind.DiodeKnee,
            BenchDetector.Peak or BenchDetector.PeakToPeak => Readings.DetectorKind.Peak,
            _ => Readings.DetectorKind.RmsLinear,
        };
        DetectorLaw declared = DetectorLaw.Declared(kind, detector.PedestalVolts * countsPerVolt);
        bool logarithmic = kind is Readings.DetectorKind.RmsLog or Readings.DetectorKind.LogOfWaveform;
        double shape = logarithmic
            ? detector.MvPerDb * 1e-3 * countsPerVolt
            : detector.DiodeMv * 1e-3 * detector.Gain * countsPerVolt;
        double slowest = kind == Readings.DetectorKind.Peak ? detector.DecayUs : detector.TimeConstantUs;
        return declared with { Shape = shape, ShapeUncertainty = 0.03 * shape, TimeConstantS = slowest * 1e-6 };
    }
}
