using Looseloop.Firmware.Tests.Board;
using Looseloop.Protocol;

namespace Looseloop.Firmware.Tests;

public class RingTests
{
    private const double TauUs = 380; // Q of 180 at 152.3 kHz

    private readonly TestHost _host = new();

    [Fact]
    public void The_decay_of_a_ring_is_followed_with_its_times()
    {
        // What the converter sees is the level at the middle of its conversion.
        _host.Board.Level = (board, _) => board.IsDriving
            ? 2400
            : 400 + (int)Math.Round(2000 * Math.Exp(-(board.TimeUs - (board.ReadCostUs / 2) - board.StoppedUs) / TauUs));
        List<BoxLine> lines = _host.Ask("ring 9 263 256 5000 50 20 16 6");
        List<BoxLine> decays = lines.Where(line => line.Word == "decay").ToList();
        Assert.Equal(12, decays.Count);
        for (int repeat = 0; repeat < 6; repeat++)
        {
            List<(long Us, long Counts)> pairs = decays.Where(line => line[0] == repeat).SelectMany(Pairs).ToList();
            Assert.Equal(16, pairs.Count);
            Assert.InRange(pairs[0].Us, 50 + (20 * repeat) + 60, 50 + (20 * repeat) + 90);
            foreach ((long us, long counts) in pairs.Where(pair => pair.Counts > 500))
            {
                double seenUs = -TauUs * Math.Log((counts - 400) / 2000.0);
                Assert.InRange(us - seenUs, -15, 15);
            }
        }

        Assert.Equal([6, Ending.Complete, 0], Enumerable.Range(0, 3).Select(field => lines[^1][field]));
        Assert.Equal(6, _host.Board.Starts);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(5000)]
    [InlineData(9999)]
    [InlineData(10001)]
    [InlineData(123456)]
    [InlineData(2000000)]
    public void The_drive_lasts_as_long_as_asked(int driveUs)
    {
        long startedUs = 0;
        _host.Board.BeforeStart = board => startedUs = board.TimeUs + board.SetCostUs;
        _host.Ask($"ring 9 263 256 {driveUs} 0 0 4 1");
        Assert.InRange(_host.Board.StoppedUs - startedUs, driveUs, driveUs + 40);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(9999)]
    [InlineData(10001)]
    [InlineData(400000)]
    public void The_wait_lasts_as_long_as_asked(int delayUs)
    {
        BoxLine decay = _host.Ask($"ring 9 263 256 5000 {delayUs} 0 1 1").Single(line => line.Word == "decay");
        Assert.InRange(decay[1], delayUs + 50, delayUs + 90);
    }

    [Fact]
    public void Halt_in_mid_ring_ends_with_the_repeats_that_were_whole()
    {
        int ring = _host.Type("ring 9 263 256 50000 0 0 4 100");
        _host.RunFor(1500);
        _host.Type("halt");
        _host.RunFor(100);
        List<BoxLine> lines = _host.Take();
        BoxLine done = lines.Single(line => line.Word == "done");
        Assert.Equal(ring, done.Request);
        Assert.Equal(lines.Count(line => line.Word == "decay"), done[0]);
        Assert.InRange(done[0], 2, 99);
        Assert.False(_host.Board.IsDriving);
    }

    private static IEnumerable<(long Us, long Counts)> Pairs(BoxLine line)
    {
        for (int i = 1; i + 1 < line.Fields.Length; i += 2)
        {
            yield return (line[i], line[i + 1]);
        }
    }
}
