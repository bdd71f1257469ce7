using System.Diagnostics;
using Looseloop.Interpreter.Tests.Plant;
using Looseloop.Protocol;

namespace Looseloop.Interpreter.Tests;

/// <summary>
/// Core and Board, as the check build makes them, in the boards' own interpreter with the native PWM, ADC and serial code of
/// the ESP32 target. The circuit behind the pins: 152.3 kHz, Q 180, pedestal 400 counts.
/// </summary>
public class BoardTests
{
    [InterpreterTheory]
    [InlineData("Esp32", "esp32", 19)]
    [InlineData("Esp32S3", "esp32-s3", 13)]
    public void A_board_identifies_itself_and_draws_a_new_boot_number_after_a_reset(string name, string word, int mostBits)
    {
        var boots = new HashSet<long>();
        for (int start = 0; start < 2; start++)
        {
            using InterpretedBoard board = InterpretedBoard.Start(name);
            using var client = new WireClient(board);
            BoxAnswer box = client.Ask<BoxAnswer>("identify");
            Assert.Equal((word, mostBits, 1, 4095), (box.Board, box.MostDutyBits, box.Inputs, box.FullCounts));
            boots.Add(box.BootId);
            Assert.Equal(FaultCode.BadFields, client.Ask<FaultAnswer>("halt 1").Code);
            client.Ask<PlannedAnswer>("run 9 263 -1 3 256");
            Assert.False(board.IsDriving);
        }

        Assert.Equal(2, boots.Count);
    }

    [InterpreterTheory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void The_pin_makes_exactly_the_settings_that_were_asked_for(string name)
    {
        using InterpretedBoard board = InterpretedBoard.Start(name);
        using var client = new WireClient(board);
        client.Ask<PlannedAnswer>("list 9 263 256 9 263 8 9 263 51 9 400 511 8 320 85 7 300 1 13 312 8191 10 500 333");
        Assert.Equal(8, Assert.IsType<DoneAnswer>(client.Ask("sweep 2000 4 0 0 0 0")[^1]).Count);
        board.WaitForDrive(false, 5);
        var made = board.PinChanges().Where(change => change.On).Select(change => (change.DutyBits, change.Count)).Distinct().ToList();
        foreach ((int bits, int divider, int count) in new[]
        {
            (9, 263, 256), (9, 263, 8), (9, 263, 51), (9, 400, 511), (8, 320, 85), (7, 300, 1), (13, 312, 8191), (10, 500, 333),
        })
        {
            Assert.Contains((bits, count), made);
            double hz = 80e6 * 256 / ((double)divider * (1 << bits));
            Assert.Contains(board.PinChanges(), change => change.Count == count && Math.Abs(change.FrequencyHz - hz) < 1e-3);
        }
    }

    [InterpreterTheory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void A_sweep_meets_the_circuit_and_says_something_all_the_time(string name)
    {
        using InterpretedBoard board = InterpretedBoard.Start(name);
        using var client = new WireClient(board);
        client.Ask<BoxAnswer>("identify");
        client.Ask<PlannedAnswer>("run 9 273 -1 16 256");
        List<BoxMessage> said = client.Ask("sweep 60000 16 0 2 0 0");
        List<PointAnswer> points = said.OfType<PointAnswer>().ToList();
        Assert.Equal(32, points.Count);
        Assert.Equal(263, points.MaxBy(point => point.Sum)!.Divider);
        DarkAnswer look = Assert.Single(said.OfType<DarkAnswer>());
        Assert.InRange((double)look.Sum / look.Samples, 399.5, 400.5);
        Assert.InRange(look.ToUs - look.FromUs, 1_000_000, 1_050_000);
        Assert.Equal(0, client.Lost);
        List<long> times = said.OfType<AliveAnswer>().Select(alive => alive.TimeUs).ToList();
        double typicalMs = times.Zip(times.Skip(1), (a, b) => (b - a) / 1000.0).Order().ElementAt(times.Count / 2);
        Assert.InRange(typicalMs, 25, 50);
        board.WaitForDrive(false, 5);
    }

    [InterpreterTheory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void A_ring_is_followed_after_the_stop(string name)
    {
        using InterpretedBoard board = InterpretedBoard.Start(name);
        using var client = new WireClient(board);
        const int Repeats = 9;
        List<BoxMessage> said = client.Ask($"ring 9 263 256 5000 200 500 64 {Repeats}");
        List<DecayAnswer> decays = said.OfType<DecayAnswer>().ToList();
        Assert.Equal(5 * Repeats, decays.Count);
        var lateUs = new List<long>();
        for (int repeat = 0; repeat < Repeats; repeat++)
        {
            List<DecayAnswer> lines = decays.Where(decay => decay.Repeat == repeat).ToList();
            long[] times = lines.SelectMany(line => line.SinceStopUs).ToArray();
            Assert.Equal(64, times.Length);
            Assert.Equal(times.Order(), times);
            lateUs.Add(times[0] - 200 - (500 * repeat));

            // This circuit has no memory: after the stop there is only the pedestal.
            Assert.All(lines.SelectMany(line => line.Counts), count => Assert.InRange(count, 370, 430));
        }

        // Never early; a busy machine can hold up single repeats, not most of them.
        Assert.All(lateUs, late => Assert.True(late >= 0));
        Assert.InRange(lateUs.Order().ElementAt(Repeats / 2), 0, 5_000);

        board.WaitForDrive(false, 5);
        // The trace of the pin comes by another way than the lines, and later.
        int Starts()
        {
            var pin = board.PinChanges().ToList();
            return pin.Zip(pin.Skip(1)).Count(pair => !pair.First.On && pair.Second.On) + (pin.Count > 0 && pin[0].On ? 1 : 0);
        }

        SpinWait.SpinUntil(() => Starts() == Repeats, TimeSpan.FromSeconds(10));
        Assert.Equal(Repeats, Starts());
    }

    [InterpreterTheory(CompilesPlant = true)]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void A_ring_of_a_circuit_with_a_memory_gives_its_ring_time(string name)
    {
        const double RingTimeUs = 180 / (Math.PI * 0.1523);
        using var plant = new CompiledPlant("decaying.c");
        using InterpretedBoard board = InterpretedBoard.Start(name, "--plant", plant.Path);
        using var client = new WireClient(board);

        // Forty repeats, each later by 25 us: the interpreter here is so fast that one repeat spans little of the decay.
        List<BoxMessage> said = client.Ask("ring 9 263 256 8000 50 25 32 40");
        Assert.Equal(Ending.Complete, Assert.IsType<DoneAnswer>(said[^1]).Ending);
        var points = said.OfType<DecayAnswer>()
            .SelectMany(decay => decay.SinceStopUs.Zip(decay.Counts))
            .Where(pair => pair.Second > 700)
            .Select(pair => (X: (double)pair.First, Y: Math.Log(pair.Second - 400)))
            .ToList();
        Assert.True(points.Count > 300);
        Assert.InRange(-1 / MedianSlope(points), RingTimeUs * 0.97, RingTimeUs * 1.03);
    }

    [InterpreterTheory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void Halt_stops_a_sweep_at_once(string name)
    {
        using InterpretedBoard board = InterpretedBoard.Start(name);
        using var client = new WireClient(board);
        client.Ask<PlannedAnswer>("run 9 500 -1 200 256");
        Assert.InRange(Soonest(200, () => MillisecondsToStop(board, client)), 0, 200);
    }

    [InterpreterTheory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void A_silent_host_has_the_drive_stopped_within_two_seconds(string name)
    {
        using InterpretedBoard board = InterpretedBoard.Start(name);
        using var client = new WireClient(board);
        client.Ask<PlannedAnswer>("run 9 500 -1 200 256");
        Assert.InRange(Soonest(2000, () => MillisecondsOfSilence(board, client)), 1500, 2000);
        client.Ask<HaltedAnswer>("halt"); // and it still answers
    }

    [InterpreterTheory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void Garbage_and_floods_neither_stop_the_sweep_nor_leave_the_drive_on(string name)
    {
        using InterpretedBoard board = InterpretedBoard.Start(name);
        using var client = new WireClient(board);
        client.Ask<PlannedAnswer>("run 9 300 -1 40 256");
        int sweep = client.Send("sweep 50000 16 0 0 0 0");
        board.WaitForDrive(true, 5);
        var random = new Random(8);
        string garbage = string.Concat(Enumerable.Range(0, 1500).Select(_ => (char)random.Next(1, 256)));
        client.SendRaw(garbage);
        client.SendRaw(new string('x', 700));
        client.SendRaw("\n" + WireClient.Line(sweep, "keep"));
        client.SendRaw(string.Concat(Enumerable.Repeat(WireClient.Line(sweep, "keep"), 40))); // 700 bytes at once
        var said = new List<BoxMessage>();
        var waited = Stopwatch.StartNew();
        while (waited.Elapsed.TotalSeconds < 30 && client.Receive(5) is (int _, BoxMessage message))
        {
            said.Add(message);
            if (Stopwatch.GetElapsedTime(client.SentTicks).TotalSeconds > 0.5)
            {
                client.SendRaw(WireClient.Line(sweep, "keep"));
            }

            if (message is DoneAnswer)
            {
                break;
            }
        }

        DoneAnswer done = Assert.IsType<DoneAnswer>(said[^1]);
        Assert.Equal((40, Ending.Complete), (done.Count, done.Ending));
        Assert.Contains(said, message => message is FaultAnswer { Code: FaultCode.UnreadableLine or FaultCode.LineTooLong });
        Assert.All(said.OfType<FaultAnswer>(), fault => Assert.True(fault.Code is FaultCode.UnreadableLine or FaultCode.LineTooLong));
        board.WaitForDrive(false, 5);
        client.Ask<BoxAnswer>("identify");
    }

    [InterpreterTheory]
    [InlineData("Esp32")]
    public void A_reset_in_mid_sweep_forgets_the_plan_and_drives_nothing(string name)
    {
        using (InterpretedBoard board = InterpretedBoard.Start(name))
        using (var client = new WireClient(board))
        {
            client.Ask<PlannedAnswer>("run 9 300 -1 40 256");
            client.Send("sweep 50000 16 0 0 0 0");
            board.WaitForDrive(true, 5);
        }

        using InterpretedBoard again = InterpretedBoard.Start(name);
        using var second = new WireClient(again);
        second.Send("sweep 1000 16 0 0 0 0");
        Assert.True(second.Receive(5) is (_, FaultAnswer { Code: FaultCode.PlanEmpty }));
        Assert.False(again.IsDriving);
    }

    private static double MillisecondsToStop(InterpretedBoard board, WireClient client)
    {
        int sweep = client.Send("sweep 20000 64 0 0 12 0");
        board.WaitForDrive(true, 10);
        int halt = client.Send("halt");
        board.WaitForDrive(false, 2); // the sweep itself would take 4 s
        double stopMs = Stopwatch.GetElapsedTime(client.SentTicks, board.PinChanges()[^1].Ticks).TotalMilliseconds;
        var ends = new List<(int, BoxMessage)>();
        while (ends.Count < 2 && client.Receive(5) is (int request, BoxMessage message))
        {
            if (message is DoneAnswer or HaltedAnswer)
            {
                ends.Add((request, message));
            }
        }

        Assert.Equal([sweep, halt], ends.Select(end => end.Item1));
        Assert.Equal(Ending.Halted, Assert.IsType<DoneAnswer>(ends[0].Item2).Ending);
        return stopMs;
    }

    private static double MillisecondsOfSilence(InterpretedBoard board, WireClient client)
    {
        int sweep = client.Send("sweep 100000 64 0 0 0 0");
        board.WaitForDrive(true, 1.9);
        client.SendRaw(WireClient.Line(sweep, "keep"));
        board.WaitForDrive(false, 5); // the sweep itself would take 20 s
        double silentMs = Stopwatch.GetElapsedTime(client.SentTicks, board.PinChanges()[^1].Ticks).TotalMilliseconds;
        Assert.True(silentMs > 1500);
        var said = new List<BoxMessage>();
        while (said.LastOrDefault() is not DoneAnswer && client.Receive(5) is (int _, BoxMessage message))
        {
            said.Add(message);
        }

        Assert.Equal(FaultCode.HostSilent, Assert.Single(said.OfType<FaultAnswer>()).Code);
        DoneAnswer done = Assert.IsType<DoneAnswer>(said[^1]);
        Assert.Equal((Ending.Faulted, FaultCode.HostSilent), (done.Ending, done.FaultCode));
        return silentMs;
    }

    // A busy machine makes what it measures later, never sooner: up to three tries, the soonest counts.
    private static double Soonest(double limitMs, Func<double> tryOnce)
    {
        double soonest = double.MaxValue;
        for (int i = 0; i < 3 && soonest > limitMs; i++)
        {
            soonest = Math.Min(soonest, tryOnce());
        }

        return soonest;
    }

    // Theil and Sen's slope, the median over all pairs: a repeat that a busy machine held up between the clock and the pin
    // is an outlier, and least squares would follow it.
    private static double MedianSlope(List<(double X, double Y)> points)
    {
        var slopes = new List<double>();
        for (int i = 0; i < points.Count; i++)
        {
            for (int k = 0; k < i; k++)
            {
                if (Math.Abs(points[i].X - points[k].X) > 100)
                {
                    slopes.Add((points[i].Y - points[k].Y) / (points[i].X - points[k].X));
                }
            }
        }

        slopes.Sort();
        return slopes[slopes.Count / 2];
    }
}
