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
