using System.Diagnostics;
using Looseloop.Protocol;
using Xunit.Abstractions;

namespace Looseloop.Interpreter.Tests;

public class EnduranceTests(ITestOutputHelper output)
{
    /// <summary>
    /// The heap is 48 KiB, hardly more than what the firmware and its libraries take at the start (32 do not suffice): sweeps
    /// that left more than 8 bytes each behind would exhaust it. Every line is counted.
    /// </summary>
    [InterpreterTheory]
    [InlineData("Esp32")]
    public void Two_thousand_sweeps_leave_nothing_on_the_heap(string name)
    {
        const int Sweeps = 2000;
        using InterpretedBoard board = InterpretedBoard.Start(name, "--no-baud", "--heap-kb", "48");
        using var client = new WireClient(board);
        client.Ask<BoxAnswer>("identify");
        client.Ask<PlannedAnswer>("run 9 264 -1 3 256");
        client.Ask("sweep 0 1 0 0 12 0");
        var watch = Stopwatch.StartNew();
        long bytes = client.BytesReceived;
        for (int sweep = 0; sweep < Sweeps; sweep++)
        {
            List<BoxMessage> said = client.Ask("sweep 0 1 0 0 12 0");
            DoneAnswer done = Assert.IsType<DoneAnswer>(said[^1]);
            Assert.Equal((3, Ending.Complete), (done.Count, done.Ending));
            PackAnswer pack = Assert.Single(said.OfType<PackAnswer>());
            Assert.InRange(pack.Sum[1], 2500, 2600);
        }

        output.WriteLine($"{Sweeps} sweeps in {watch.Elapsed.TotalSeconds:F1} s, {(client.BytesReceived - bytes) / Sweeps} bytes each");
        Assert.Equal(0, client.Lost);
        Assert.DoesNotContain(board.Other(), line => line.Contains("xception", StringComparison.Ordinal));
        client.Ask<HaltedAnswer>("halt");
    }
}
