using System.Diagnostics;
using System.Globalization;
using System.Text.RegularExpressions;

namespace Looseloop.Interpreter.Tests;

/// <summary>A board: the firmware of the check build in the real interpreter, with the built-in circuit behind its pins.</summary>
internal sealed partial class InterpretedBoard : IDisposable
{
    private readonly Process _process;
    private readonly List<PinChange> _pin = [];
    private readonly TaskCompletionSource<string> _port = new();
    private readonly List<string> _other = [];

    private InterpretedBoard(string board, string[] arguments)
    {
        var start = new ProcessStartInfo(Path.Combine(Folder, board == "Esp32S3" ? "nfrun-s3" : "nfrun"))
        {
            RedirectStandardError = true,
            RedirectStandardOutput = true,
        };
        foreach (string argument in (string[])["-q", "--tick-ms", "10", "--time-limit", "240", .. arguments, FirmwareOf(board)])
        {
            start.ArgumentList.Add(argument);
        }

        start.Environment["NF_TRACE_PWM"] = "1";
        _process = new Process { StartInfo = start };
        _process.ErrorDataReceived += (_, line) => Heard(line.Data);
        _process.Start();
        _process.BeginErrorReadLine();
        _process.BeginOutputReadLine();
    }

    /// <summary>A change of the drive pin, stamped when it was heard of (Stopwatch ticks).</summary>
    public sealed record PinChange(long Ticks, double FrequencyHz, int Count, int DutyBits, bool On);

    public static string Folder { get; } = Path.GetFullPath(Path.Combine(Repository.Root, "..", "shared", "tools", "nfrun"));

    /// <summary>The pseudo-terminal of the host's port.</summary>
    public string Port
    {
        get
        {
            Assert.True(_port.Task.Wait(TimeSpan.FromSeconds(30)), "no port: " + string.Join('\n', Other()));
            return _port.Task.Result;
        }
    }

    public bool IsDriving
    {
        get
        {
            lock (_pin)
            {
                return _pin.Count > 0 && _pin[^1].On;
            }
        }
    }

    public static InterpretedBoard Start(string board, params string[] arguments) => new(board, arguments);

    public IReadOnlyList<PinChange> PinChanges()
    {
        lock (_pin)
        {
            return [.. _pin];
        }
    }

    /// <summary>What the interpreter has said that is not a change of the pin.</summary>
    public IReadOnlyList<string> Other()
    {
        lock (_pin)
        {
            return [.. _other];
        }
    }

    public void WaitForDrive(bool on, double seconds)
    {
        var waited = Stopwatch.StartNew();
        while (IsDriving != on)
        {
            Assert.True(waited.Elapsed.TotalSeconds < seconds, on ? "the drive did not start" : "the drive did not stop");
            Thread.Sleep(1);
        }
    }

    public void Dispose()
    {
        if (!_process.HasExited)
        {
            _process.Kill();
        }

        _process.WaitForExit();
        _process.Dispose();
    }

    private static string FirmwareOf(string board) =>
        Path.Combine(Repository.Root, "firmware", "Check", board, "bin", $"Looseloop.{board}.dll");

    [GeneratedRegex(@"^PWM t=\S+ gpio=18 f=(?<f>\S+) count=(?<count>\d+) r=(?<r>\d+) on=(?<on>[01])")]
    private static partial Regex PinLine();

    [GeneratedRegex(@"^COM\d (?<path>/\S+)")]
    private static partial Regex PortLine();

    private void Heard(string? line)
    {
        if (line is null)
        {
            return;
        }

        long ticks = Stopwatch.GetTimestamp();
        Match pin = PinLine().Match(line);
        Match port = PortLine().Match(line);
        lock (_pin)
        {
            if (pin.Success)
            {
                _pin.Add(new PinChange(
                    ticks,
                    double.Parse(pin.Groups["f"].Value, CultureInfo.InvariantCulture),
                    int.Parse(pin.Groups["count"].Value, CultureInfo.InvariantCulture),
                    int.Parse(pin.Groups["r"].Value, CultureInfo.InvariantCulture),
                    pin.Groups["on"].Value == "1"));
            }
            else
            {
                _other.Add(line);
            }
        }

        if (port.Success)
        {
            _port.TrySetResult(port.Groups["path"].Value);
        }
    }
}
