using System.Diagnostics;
using System.Globalization;

namespace Looseloop.Link.Tests;

public sealed class PseudoTerminalTests
{
    private static readonly TimeSpan _long = TimeSpan.FromSeconds(10);

    [LinuxFact]
    public void The_other_end_is_a_terminal_device()
    {
        using var box = new PseudoTerminal();
        Assert.StartsWith("/dev/pts/", box.SlavePath, StringComparison.Ordinal);
        Assert.True(File.Exists(box.SlavePath));
    }

    [LinuxFact]
    public void Without_a_host_reads_time_out_and_writes_are_dropped()
    {
        using var box = new PseudoTerminal();
        Assert.Equal(0, box.Read(new byte[8], TimeSpan.FromMilliseconds(1)));
        OpenRaw(box).Dispose();

        // The host has gone: the system then reports a hang-up at every look.
        long started = Stopwatch.GetTimestamp();
        Assert.Equal(0, box.Read(new byte[8], TimeSpan.FromMilliseconds(20)));
        Assert.InRange(Stopwatch.GetElapsedTime(started).TotalMilliseconds, 19, 5000);
        box.Write(new byte[100]);
        Assert.Equal(100, box.DroppedBytes);
    }

    [LinuxFact]
    public void Waiting_for_a_host_takes_no_processor_time_to_speak_of()
    {
        using var box = new PseudoTerminal();
        OpenRaw(box).Dispose();

        // The kernel's own account of this thread: processor time in nanoseconds is the first number (proc(5), schedstat).
        long before = ThreadTimeNs();
        Assert.Equal(0, box.Read(new byte[8], TimeSpan.FromMilliseconds(200)));
        Assert.InRange(ThreadTimeNs() - before, 0, 60_000_000);
    }

    [LinuxFact]
    public void A_host_that_stops_reading_holds_the_box_up_once()
    {
        using var box = new PseudoTerminal();
        using FileStream host = OpenRaw(box);
        long started = Stopwatch.GetTimestamp();
        for (int i = 0; i < 200; i++)
        {
            box.Write(new byte[1000]);
        }

        Assert.InRange(Stopwatch.GetElapsedTime(started).TotalSeconds, 0.9, 10);
        Assert.InRange(box.DroppedBytes, 100_000, 200_000);

        // What it did take is still there, and once it reads again it is served again.
        long dropped = box.DroppedBytes;
        byte[] buffer = new byte[4096];
        long left = 200_000 - dropped;
        while (left > 0)
        {
            left -= host.Read(buffer);
        }

        box.Write("again"u8);
        Assert.Equal("again"u8.ToArray(), buffer[..host.Read(buffer)]);
        Assert.Equal(dropped, box.DroppedBytes);
    }

    [LinuxFact]
    public void A_host_that_comes_back_is_heard()
    {
        using var box = new PseudoTerminal();
        OpenRaw(box).Dispose();
        using FileStream host = OpenRaw(box);
        host.Write("again"u8);
        byte[] buffer = new byte[8];
        int count = box.Read(buffer, _long);
        Assert.Equal("again"u8.ToArray(), buffer[..count]);
    }

    [LinuxFact]
    public void Disposing_ends_a_read_that_waits()
    {
        var box = new PseudoTerminal();
        Task<Exception> reading = Task.Run(() => Record.Exception(() => box.Read(new byte[8], _long)));
        box.Dispose();
        Assert.True(reading.Wait(TimeSpan.FromSeconds(5)));
        Assert.IsType<ObjectDisposedException>(reading.Result);
        Assert.Throws<ObjectDisposedException>(() => box.Write("x"u8));
    }

    [LinuxFact]
    public void A_thousand_of_them_leak_no_descriptor()
    {
        int before = Directory.GetFiles("/proc/self/fd").Length;
        for (int i = 0; i < 1000; i++)
        {
            new PseudoTerminal().Dispose();
        }

        // Other tests run at the same time and hold a few of their own.
        Assert.InRange(Directory.GetFiles("/proc/self/fd").Length, 0, before + 100);
    }

    private static FileStream OpenRaw(PseudoTerminal box) =>
        new(box.SlavePath, FileMode.Open, FileAccess.ReadWrite, FileShare.ReadWrite, bufferSize: 0);

    private static long ThreadTimeNs() =>
        long.Parse(File.ReadAllText("/proc/thread-self/schedstat").Split(' ')[0], CultureInfo.InvariantCulture);
}
