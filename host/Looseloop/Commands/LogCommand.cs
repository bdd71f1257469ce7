using System.CommandLine;
using System.Globalization;
using Looseloop.Arguments;
using Looseloop.Bench;
using Looseloop.Boxes;
using Looseloop.Link;
using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>log</c>: f0 and Q over hours, in the record.</summary>
internal sealed class LogCommand(Shell shell)
{
    private readonly Option<double?> _for = Quantity.SecondsOption("--for", "For how long (until interrupted).");
    private readonly Option<double?> _every = Quantity.SecondsOption("--every", "From reading to reading (10s); 0 for one after the other.");
    private readonly Option<double?> _fullEvery = Quantity.SecondsOption("--full-every", "From full reading to full reading (15min); five settings each are read between.");
    private readonly Option<double?> _lockOut = Quantity.SecondsOption("--lock-out", "How long no field may have been seen before the box drives again (30s).");
    private readonly Option<double?> _near = Quantity.HertzOption("--near", "Look only near this frequency at first, without a survey.");
    private readonly Option<double?> _mains = Quantity.HertzOption("--mains", "Mains frequency, 50 or 60 (50).");
    private readonly Option<string?> _coil = new("--coil") { Description = "The coil's name.", HelpName = "NAME" };
    private readonly Option<string?> _note = new("--note") { Description = "A note to the run.", HelpName = "TEXT" };
    private readonly Option<bool> _untilSettled = new("--until-settled") { Description = "End when f0 is settled." };

    private readonly Option<bool> _betweenRuns = new("--between-runs")
    {
        Description = "The coil is energised now and then: pause meanwhile, and extrapolate f0 and Q from each cool-down back to the moment it stopped.",
    };

    public static Command Create(Shell shell) => new LogCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("log", "Read f0 and Q again and again, into the record, until the time is up, f0 is settled, or you interrupt.")
        {
            Options = { _for, _every, _untilSettled, _betweenRuns, _lockOut, _fullEvery, _near, _mains, _coil, _note, RecordChoice.RecordOption },
        };
        BoxChoice.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        bool quiet = parsed.GetValue(CommonOptions.Quiet);
        string name = BoxChoice.NameOf(shell, parsed);
        World? world = BoxChoice.WorldOf(name);
        if (world is not null && parsed.GetValue(_for) is null && !parsed.GetValue(_untilSettled))
        {
            throw new UserError("Time flies on the bench: say how long with --for, or end with --until-settled.");
        }

        bool betweenRuns = parsed.GetValue(_betweenRuns);
        if (betweenRuns && !LogCaution.Accepted(shell, quiet))
        {
            throw new UserError("Nothing was done.", ExitCode.Failure);
        }

        using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
        using TextWriter? trace = parsed.GetValue(BoxChoice.TraceOption) is string path ? new StreamWriter(path) { AutoFlush = true } : null;
        IBoxSource source = world is null ? new PortSource(name, trace) : new BenchSource(new VirtualBox(world, parsed.GetValue(BoxChoice.SeedOption)), trace);
        LogOptions options = Options(parsed, world, new RecordedFacts(store.Reader));
        LogSummary summary = LogScreen.Run(
            shell, parsed.GetValue(CommonOptions.Json), quiet, options,
            watch => RunLog(new LogProcedure(source, options, store, watch, shell.Cancel)));
        return summary.Stop.Status switch
        {
            RunStatus.Completed => ExitCode.Ok,
            RunStatus.Interrupted => shell.InterruptCode(),
            RunStatus.LinkLost => ExitCode.LinkLost,
            _ => ExitCode.Failure,
        };
    }

    private static LogSummary RunLog(LogProcedure log)
    {
        try
        {
            return log.Run();
        }
        catch (LinkOpenException error)
        {
            throw new UserError(error.Message, ExitCode.NoBox);
        }
    }

    private LogOptions Options(ParseResult parsed, World? world, RecordedFacts facts)
    {
        var read = new ReadOptions
        {
            Law = DetectorLaw.Declared(Readings.DetectorKind.RmsLinear, 0),
            NearHz = parsed.GetValue(_near),
            MainsHz = parsed.GetValue(_mains) ?? 50,
            Coil = parsed.GetValue(_coil),
            Note = parsed.GetValue(_note),
            HostVersion = AppVersion.Text,
            Time = shell.Time,
        };
        var plain = new LogOptions { Read = read };
        return plain with
        {
            ReadOf = box => KnownFacts.Apply(
                read with { Law = world is null ? UndeclaredBox.LawOf(box) : BoxChoice.LawOf(world) }, box.Identity, facts),
            Every = Seconds(parsed.GetValue(_every)) ?? plain.Every,
            For = Seconds(parsed.GetValue(_for)),
            UntilSettled = parsed.GetValue(_untilSettled),
            BetweenRuns = parsed.GetValue(_betweenRuns),
            LockOut = Seconds(parsed.GetValue(_lockOut)) ?? plain.LockOut,
            FullEvery = Seconds(parsed.GetValue(_fullEvery)) ?? plain.FullEvery,
            Stated = Stated(parsed),
        };
    }

    private Dictionary<string, string> Stated(ParseResult parsed)
    {
        var stated = new Dictionary<string, string>();
        foreach ((string key, Option<double?> option) in new[] { ("for", _for), ("every", _every), ("full-every", _fullEvery), ("lock-out", _lockOut) })
        {
            if (parsed.GetValue(option) is double seconds)
            {
                stated[key] = string.Create(CultureInfo.InvariantCulture, $"{seconds} s");
            }
        }

        stated["mode"] = parsed.GetValue(_betweenRuns) ? "between runs" : "ambient";
        if (parsed.GetValue(_untilSettled))
        {
            stated["until-settled"] = "yes";
        }

        return stated;
    }

    private static TimeSpan? Seconds(double? seconds) => seconds is double s ? TimeSpan.FromSeconds(s) : null;
}
