using System.CommandLine;
using System.Globalization;
using Looseloop.Arguments;
using Looseloop.Box;
using Looseloop.Boxes;
using Looseloop.Procedures.Clock;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>trim clock</c>: how much faster the box's clock runs than it should.</summary>
internal sealed class TrimCommand(Shell shell)
{
    private const double DefaultSeconds = 300;
    private const double LeastSeconds = 60;
    private const double HoldSeconds = 60;
    private const double DefaultAtHz = 150_000;

    private readonly Option<double?> _for = Quantity.SecondsOption("--for", "How long to compare the clocks (5min).");
    private readonly Option<double?> _counter = Quantity.HertzOption("--counter", "What a frequency counter reads on the drive at --at.");
    private readonly Option<double?> _at = Quantity.HertzOption("--at", "Drive here for the counter (150k).");
    private readonly Option<double?> _hold = Quantity.SecondsOption("--hold", "Drive at --at for so long, for the counter to be read, and keep nothing.");
    private readonly Option<double> _counterPpm = new("--counter-ppm")
    {
        Description = "Standard uncertainty of the counter's time base, parts per million.",
        DefaultValueFactory = _ => 1,
        HelpName = "PPM",
    };

    private readonly Option<double> _digit = new("--counter-digit")
    {
        Description = "The counter's last digit, hertz.",
        DefaultValueFactory = _ => 1,
        HelpName = "HZ",
    };

    public static Command Create(Shell shell) => new TrimCommand(shell).Make();

    private Command Make()
    {
        var clock = new Command("clock", "Find the error of the box's clock: by this computer's clock where that is disciplined, or by a frequency counter.")
        {
            Options = { _for, _counter, _at, _hold, _counterPpm, _digit, RecordChoice.RecordOption },
        };
        BoxChoice.AddTo(clock);
        clock.SetAction(Run);
        return new Command("trim", "Trim a box.") { Subcommands = { clock } };
    }

    private int Run(ParseResult parsed)
    {
        double duration = parsed.GetValue(_for) ?? DefaultSeconds;
        if (duration < LeastSeconds)
        {
            throw new UserError($"--for wants a minute or more: a line's delays would decide a shorter comparison.");
        }

        bool virtualBox = BoxChoice.WorldOf(BoxChoice.NameOf(shell, parsed)) is not null;
        using ChosenBox box = BoxChoice.Open(shell, parsed);
        Setting setting = box.Session.Grid.Nearest(parsed.GetValue(_at) ?? DefaultAtHz, 0.5);
        if (parsed.GetValue(_hold) is double hold && parsed.GetValue(_counter) is null)
        {
            Hold(box, setting, hold > 0 ? hold : HoldSeconds);
            return ExitCode.Ok;
        }

        ClockTrim trim = parsed.GetValue(_counter) is double counter
            ? CounterTrim.Of(setting, counter, parsed.GetValue(_digit), parsed.GetValue(_counterPpm), shell.Time.GetUtcNow())
                ?? throw new UserError($"{Text(counter)} Hz is not the drive's {Text(setting.FrequencyHz)} Hz with any clock: check the counter's input and range. Nothing was kept.")
            : Compare(parsed, box, duration, virtualBox);
        using (RecordStore store = RecordChoice.OpenForWriting(shell, parsed))
        {
            new RecordFacts(store, AppVersion.Text).Keep(box.Session.Identity.Port, trim);
        }

        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.Figure("ppm", trim.Ppm);
                json.Figure("u_ppm", trim.UncertaintyPpm);
                json.WriteBoolean("kept", true);
            }));
        }
        else
        {
            string ppm = trim.Ppm.ToString("+0.0;-0.0", CultureInfo.InvariantCulture);
            string twice = (2 * trim.UncertaintyPpm).ToString("0.0", CultureInfo.InvariantCulture);
            shell.Out.WriteLine($"The box's clock runs {ppm} ± {twice} ppm fast; kept for this box.");
        }

        return ExitCode.Ok;
    }

    private ClockTrim Compare(ParseResult parsed, ChosenBox box, double seconds, bool virtualBox)
    {
        // A virtual box lives by a virtual clock, which is exact by definition.
        KernelClock kernel = virtualBox ? new KernelClock(true, "The bench's own clock.") : KernelClock.Ask();
        if (!kernel.IsDisciplined)
        {
            throw new UserError(
                $"{kernel.Detail} It is no better than the box's. Let it synchronise over the network first, or read the drive with a frequency counter: --hold, then --counter.",
                ExitCode.Failure);
        }

        var progress = new ProgressLine(shell, parsed.GetValue(CommonOptions.Quiet));
        ClockRegression? line;
        try
        {
            line = new ClockProcedure(box.Session, progress, shell.Cancel).Run(TimeSpan.FromSeconds(seconds));
        }
        finally
        {
            progress.End();
        }

        // What changed meanwhile would be in the line.
        bool still = virtualBox || KernelClock.Ask().IsDisciplined;
        return line is not null && still
            ? ClockProcedure.Trim(line, TimeSpan.FromSeconds(seconds), shell.Time.GetUtcNow())
            : throw new UserError(
                still ? "The box answered too seldom for a line. Check the cable, and try again. Nothing was kept."
                    : "This computer's clock lost its discipline meanwhile. Nothing was kept; try again.",
                ExitCode.Failure);
    }

    private void Hold(ChosenBox box, Setting setting, double seconds)
    {
        const int Samples = 10_000;
        shell.Say($"The drive is at {Text(setting.FrequencyHz)} Hz by the box's clock for {seconds:0} s. Read the counter, then give its reading with --counter and --at {Text(setting.FrequencyHz)}.");
        int spacingUs = (int)Math.Clamp(seconds * 1e6 / Samples, 1, 1_000_000);
        box.Session.Sweep(new SweepRequest([setting], 0, Samples) { SpacingUs = spacingUs }, cancel: shell.Cancel);
    }

    private static string Text(double hertz) => hertz.ToString("0.####", CultureInfo.InvariantCulture);
}
