using Looseloop.Firmware.Tests.Board;
using Xunit.Abstractions;

namespace Looseloop.Firmware.Tests;

/// <summary>The box allocates nothing once it is made: a collection in mid-sweep would show as a gap.</summary>
public class AllocationTests(ITestOutputHelper output)
{
    [Theory]
    [InlineData("sweep 500 16 0 0 0 0")]
    [InlineData("sweep 500 16 100 2 0 0")]
    [InlineData("sweep 500 16 0 0 12 0")]
    [InlineData("ring 9 263 256 3000 100 10 64 5")]
    [InlineData("dark 200 0 0")]
    public void Work_allocates_nothing(string request)
    {
        TestHost host = Forgetful();
        host.Type(request);
        host.RunFor(3000);
        host.Type(request);
        long lines = host.Board.SentLines;
        long before = GC.GetAllocatedBytesForCurrentThread();
        host.RunFor(3000);
        long allocated = GC.GetAllocatedBytesForCurrentThread() - before;
        Assert.True(host.Board.SentLines > lines);
        Assert.Equal(0, allocated);
    }

    [Fact]
    public void A_thousand_lines_are_parsed_and_answered_without_allocating()
    {
        TestHost host = Forgetful();
        string[] requests =
        [
            "identify", "limits", "limits 8000 1000000 400 184", "plan", "run 9 300 -1 20 256", "list 9 267 256 8 300 128", "halt",
            "keep", "nonsense", "run 9 1 1 1 1", "sweep 0 0 0 0 0 0",
        ];
        TypeAll();
        host.RunFor(3000);
        for (int i = 0; i < 100; i++)
        {
            TypeAll();
        }

        host.Board.RingBytes = 1 << 20;
        host.Board.ByteUs = 0;
        long lines = host.Board.SentLines;
        long before = GC.GetAllocatedBytesForCurrentThread();
        host.RunFor(20000);
        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
        Assert.Equal(1000, host.Board.SentLines - lines); // keep has no answer

        void TypeAll()
        {
            foreach (string request in requests)
            {
                host.Type(request);
            }
        }
    }

    [Fact]
    public void Bytes_on_the_wire_are_few()
    {
        // A survey of every setting from 30 to 600 kHz, in one run a number of duty bits, 12 points to a line.
        var host = new TestHost();
        host.Board.Level = (board, _) => board.IsDriving ? 412 + (board.Reads % 9) : 400;
        host.Ok("identify");
        long requests = host.Request;
        host.Ok("plan");
        host.Ok("run 11 325 -1 68 1024");
        foreach ((int bits, int count) in new[] { (10, 256), (9, 256), (8, 256) })
        {
            host.Ok($"run {bits} 513 -1 {count} {1 << (bits - 1)}");
        }

        host.Ok("run 7 513 -1 248 64");
        long from = host.Board.SentBytes;
        List<BoxLine> lines = host.Ask("sweep 2000 8 0 0 12 0", 60000);
        long points = lines[^1][0];
        double perPoint = (host.Board.SentBytes - from) / (double)points;
        output.WriteLine($"survey: {points} points, {perPoint:F1} bytes a point, {host.Request - requests} requests");
        Assert.InRange(points, 1050, 1150);
        Assert.InRange(perPoint, 5, 25);

        host.PlanRun(60, 400);
        from = host.Board.SentBytes;
        points = host.Ask("sweep 3000 64 0 2 0 0")[^1][0];
        perPoint = (host.Board.SentBytes - from) / (double)points;
        output.WriteLine($"reading: {points} points, {perPoint:F1} bytes a point, 3 requests");
        Assert.InRange(perPoint, 50, 90);
    }

    private static TestHost Forgetful()
    {
        var host = new TestHost();
        host.Ok("identify");
        host.PlanRun(20);
        host.Board.Forgetful = true;
        return host;
    }
}
