using System.Text;
using Looseloop.Link;
using Looseloop.Protocol;

namespace Looseloop.Bench.Tests;

/// <summary>The firmware's own loop on the virtual board, by the line protocol.</summary>
public class VirtualBoxTests
{
    private readonly LineWriter _writer = new(WireLimits.HostLineBytes);
    private int _request;

    [Fact]
    public void ItTellsWhatItIs()
    {
        using var box = new VirtualBox(new World());
        string answer = Ask(box, "identify").Single();
        Assert.Equal("box", answer.Split(' ')[2]);
        Assert.Contains($" {box.BootId} 80000000 19 ", answer, StringComparison.Ordinal);
    }

    [Fact]
    public void TheSameSeedGivesTheSameLines()
    {
        string[] first = Sweep(new VirtualBox(WorldShelf.Load("wren"), 7));
        string[] second = Sweep(new VirtualBox(WorldShelf.Load("wren"), 7));
        string[] third = Sweep(new VirtualBox(WorldShelf.Load("wren"), 8));
        Assert.Equal(first, second);
        Assert.NotEqual(first, third);
        Assert.Equal(11, first.Count(static line => line.Contains(" point ", StringComparison.Ordinal)));
    }

    [Fact]
    public void AnUnpluggedBoxIsALostLink()
    {
        using var box = new VirtualBox(new World());
        Ask(box, "identify");
        box.Unplug();
        Assert.Throws<LinkLostException>(() => box.Read(new byte[10], TimeSpan.FromSeconds(1)));
        Assert.Throws<LinkLostException>(() => box.Write("x"u8));
    }

    [Fact]
    public void AResetBoxHasAnotherBootNumber()
    {
        using var box = new VirtualBox(new World());
        int before = box.BootId;
        box.Reset();
        Assert.NotEqual(before, box.BootId);
        Assert.Contains($" {box.BootId} ", Ask(box, "identify").Single(), StringComparison.Ordinal);
    }

    [Fact]
    public void ATimeOutPassesInVirtualTime()
    {
        using var box = new VirtualBox(new World());
        double before = box.Clock.Seconds;
        Assert.Equal(0, box.Read(new byte[10], TimeSpan.FromSeconds(30)));
        Assert.InRange(box.Clock.Seconds - before, 30, 30.01);
    }

    [Theory]
    [InlineData("kestrel", "7 field-present")]
    [InlineData("nightjar", "7 field-present")]
    [InlineData("coot", "13 pickup-below-range")]
    public void ItDoesNotDriveWhereItMustNot(string world, string fault)
    {
        string[] lines = Sweep(new VirtualBox(WorldShelf.Load(world)));
        Assert.Contains(lines, line => line.Contains($" fault {fault} ", StringComparison.Ordinal));
        Assert.DoesNotContain(lines, line => line.Contains(" point ", StringComparison.Ordinal));
    }

    [Fact]
    public void AClockThatIsFastDrivesHighAndCountsFast()
    {
        World world = new() { Board = new BoardParameters { ClockPpm = 100 } };
        var board = new VirtualBoard(world, 1, new VirtualClock());
        board.Set(150_000, 0.5005);
        board.Start();
        Assert.True(board.IsDriving);
        Assert.Equal(80e6 * 256 / (267 * 512) * 1.0001, board.DriveHz, 1e-6);
        var clock = new VirtualClock();
        var timed = new VirtualBoard(world, 1, clock);
        clock.Advance(10_000);
        Assert.InRange(timed.NowUs() - 10_000_000_000, 1_000_000, 1_000_010);
    }

    [Fact]
    public void TextCostsWhatTheWireAndTheInterpreterTake()
    {
        // 1000 bytes: 60 us each to build, and on a wire of 115200 baud 86.8 us each; the port holds 256.
        var clock = new VirtualClock();
        var board = new VirtualBoard(new World(), 1, clock);
        for (int i = 0; i < 10; i++)
        {
            board.Send(new byte[100], 100);
        }

        Assert.InRange(clock.Seconds, (1000 - 256) * 10.0 / 115_200, (1000 * 10.0 / 115_200) + 0.006);
        Assert.Equal(0, board.ToHost.Take(new byte[2000], 0.005));
        Assert.Equal(1000, board.ToHost.Take(new byte[2000], 0.1));
    }

    [Fact]
    public void UnreadInputOverflows()
    {
        var clock = new VirtualClock();
        var board = new VirtualBoard(new World(), 1, clock);
        board.FromHost.Send(new byte[300], 0);
        clock.Advance(1);
        Assert.Equal(0, board.Receive(new byte[512]));
        board.FromHost.Send(new byte[200], clock.Seconds);
        clock.Advance(1);
        Assert.Equal(200, board.Receive(new byte[512]));
    }

    private string[] Sweep(VirtualBox box)
    {
        using (box)
        {
            _request = 0;
            Ask(box, "identify");
            Ask(box, "limits", 30000, 600000, 310, 180);
            Ask(box, "plan");
            Ask(box, "run", 9, 262, 1, 11, 256);
            return Ask(box, "sweep", 6000, 64, 0, 0, 0, 0);
        }
    }

    private string[] Ask(VirtualBox box, string verb, params int[] fields)
    {
        _writer.BeginHost(++_request);
        _writer.Word(verb);
        foreach (int field in fields)
        {
            _writer.Number(field);
        }

        int count = _writer.End();
        box.Write(_writer.Buffer.AsSpan(0, count));
        var text = new StringBuilder();
        var buffer = new byte[256];
        int read;
        while ((read = box.Read(buffer, TimeSpan.FromSeconds(0.5))) > 0)
        {
            text.Append(Encoding.ASCII.GetString(buffer, 0, read));
        }

        return text.ToString().Split('\n', StringSplitOptions.RemoveEmptyEntries);
    }
}
