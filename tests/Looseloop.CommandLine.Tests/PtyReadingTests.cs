using System.Text.Json;
using Looseloop.Bench;
using Looseloop.Link;
using Looseloop.Readings;
using Looseloop.Record;

namespace Looseloop.CommandLine.Tests;

/// <summary>The same world through a real tty: System.IO.Ports on a pseudo-terminal, in real time.</summary>
public sealed class PtyReadingTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("looseloop-tty").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public async Task A_box_on_a_tty_reads_as_it_does_in_the_process()
    {
        if (!PseudoTerminal.IsSupported)
        {
            return; // Linux only; the link's own tests say so
        }

        using var line = new PseudoTerminal();
        using var box = new VirtualBox(WorldShelf.Load("wren"), seed: 7);
        using var stop = new CancellationTokenSource();
        Task server = Task.Run(() => new BenchServer(box, line).Run(stop.Token));
        Know(line.SlavePath);
        AppRun onTty = Read("--box", line.SlavePath, "--near", "150k", "--json", "--quiet");
        await stop.CancelAsync();
        await server;
        AppRun inProcess = AppRun.Of("read", "--box", "bench", "--near", "150k", "--json", "--quiet");

        using JsonDocument one = JsonDocument.Parse(onTty.Out);
        using JsonDocument other = JsonDocument.Parse(inProcess.Out);
        Assert.Equal("sound", one.RootElement.GetProperty("verdict").GetString());
        Agree(one, other, "f0_hz", "f0_repeatability_95_hz");
        Agree(one, other, "q", "q_repeatability_95");
    }

    [Fact]
    public async Task A_port_that_vanishes_in_mid_sweep_is_exit_code_4()
    {
        if (!PseudoTerminal.IsSupported)
        {
            return;
        }

        using var line = new PseudoTerminal();
        using var box = new VirtualBox(WorldShelf.Load("wren"));
        using var stop = new CancellationTokenSource();
        Task server = Task.Run(() =>
        {
            try
            {
                new BenchServer(box, line).Run(stop.Token);
            }
            catch (ObjectDisposedException)
            {
                // that is the unplugging
            }
        });
        Task<AppRun> reading = Task.Run(() => Read("--box", line.SlavePath));
        await Task.Delay(TimeSpan.FromSeconds(2.5));
        line.Dispose();
        AppRun run = await reading;
        await stop.CancelAsync();
        await server;
        Assert.Equal(4, run.ExitCode);
        Assert.Contains("gone", run.Error);
        Assert.Empty(run.Out);
    }

    [Fact]
    public async Task Something_else_on_the_port_is_exit_code_3()
    {
        if (!PseudoTerminal.IsSupported)
        {
            return;
        }

        using var line = new PseudoTerminal();
        using var stop = new CancellationTokenSource();
        Task chatter = Task.Run(async () =>
        {
            while (!stop.IsCancellationRequested)
            {
                line.Write("$INSTRUMENT,12.5,OK\r\n"u8);
                await Task.Delay(50);
            }
        });
        AppRun run = Read("--box", line.SlavePath);
        await stop.CancelAsync();
        await chatter;
        Assert.Equal(3, run.ExitCode);
        Assert.Contains("something else is talking", run.Error);
    }

    /// <summary>Writes down of the box on the tty what the bench declares of the same one: both are then read by one law.</summary>
    private void Know(string port)
    {
        DetectorLaw law = Boxes.BoxChoice.LawOf(WorldShelf.Load("wren")) with { ReadOn = DateTimeOffset.UnixEpoch };
        using var store = RecordStore.Open(Path.Combine(_folder, "record.db"), DateTimeOffset.UnixEpoch);
        new RecordFacts(store, "test").Keep(port, law);
    }

    /// <summary>A box on a tty is no practice: its readings are kept, here in a record of the test's own.</summary>
    private AppRun Read(params string[] args) =>
        AppRun.With(new Dictionary<string, string> { ["LOOSELOOP_RECORD"] = Path.Combine(_folder, "record.db") }, ["read", .. args]);

    /// <summary>Two readings of different noise: their difference within 3 standard uncertainties of a difference.</summary>
    private static void Agree(JsonDocument one, JsonDocument other, string value, string interval)
    {
        double difference = one.RootElement.GetProperty(value).GetDouble() - other.RootElement.GetProperty(value).GetDouble();
        double first = one.RootElement.GetProperty(interval).GetDouble();
        double second = other.RootElement.GetProperty(interval).GetDouble();
        Assert.True(Math.Abs(difference) < 1.5 * double.Hypot(first, second), $"{value} differs by {difference}, intervals {first} and {second}");
    }
}
