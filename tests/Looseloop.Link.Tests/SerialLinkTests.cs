using System.Diagnostics;
using System.Text;

namespace Looseloop.Link.Tests;

/// <summary>
/// The runtime's serial port on a pseudo-terminal. What is expected of it was found by trying it on Linux: no published
/// source.
/// </summary>
public sealed class SerialLinkTests : IDisposable
{
    private static readonly TimeSpan _long = TimeSpan.FromSeconds(10);

    private readonly string _lockFolder = Directory.CreateTempSubdirectory("looseloop-locks-").FullName;

    public void Dispose() => Directory.Delete(_lockFolder, recursive: true);

    [LinuxFact]
    public void Bytes_pass_both_ways_unchanged()
    {
        using var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        byte[] all = [.. Enumerable.Range(0, 256).Select(i => (byte)i)];

        link.Write(all);
        Assert.Equal(all, ReadExactly(box.Read, all.Length));

        // All 256 values: no echo, no newline translation, no flow-control byte taken out.
        box.Write(all);
        Assert.Equal(all, ReadExactly(link.Read, all.Length));
        Assert.Equal(0, link.Read(new byte[16], TimeSpan.Zero));
        Assert.Equal(0, box.Read(new byte[16], TimeSpan.Zero));
    }

    [LinuxFact]
    public void A_line_in_pieces_arrives_in_order()
    {
        using var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        var got = new StringBuilder();
        byte[] buffer = new byte[64];
        foreach (string piece in (string[])["<1 ", "7 ali", "ve 12", "3 ABCD\n<2"])
        {
            box.Write(Encoding.ASCII.GetBytes(piece));
            int count = link.Read(buffer, _long);
            got.Append(Encoding.ASCII.GetString(buffer, 0, count));
        }

        Assert.Equal("<1 7 alive 123 ABCD\n<2", got.ToString());
    }

    [LinuxFact]
    public void A_small_buffer_leaves_the_rest_for_the_next_read()
    {
        using var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        box.Write("abcdef"u8);
        byte[] buffer = new byte[4];
        Assert.Equal("abcdef"u8.ToArray(), ReadExactly((b, t) => link.Read(b.Length > 4 ? b[..4] : b, t), 6));
        Assert.Equal(0, link.Read(buffer, TimeSpan.Zero));
    }

    [LinuxFact]
    public void A_read_without_bytes_ends_with_its_timeout()
    {
        using var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        long started = Stopwatch.GetTimestamp();
        Assert.Equal(0, link.Read(new byte[8], TimeSpan.FromMilliseconds(30)));
        Assert.InRange(Stopwatch.GetElapsedTime(started).TotalMilliseconds, 29, 5000);
    }

    [LinuxFact]
    public void A_megabyte_each_way_is_complete()
    {
        const int Size = 1 << 20;
        using var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        byte[] sent = new byte[Size];
        new Random(1).NextBytes(sent);

        Task writing = Task.Run(() => WriteInPieces(box.Write, sent));
        Assert.True(sent.AsSpan().SequenceEqual(ReadExactly(link.Read, Size)), "box to host");
        writing.Wait();

        writing = Task.Run(() => WriteInPieces(link.Write, sent));
        Assert.True(sent.AsSpan().SequenceEqual(ReadExactly(box.Read, Size)), "host to box");
        writing.Wait();
        Assert.Equal(0, box.DroppedBytes);
    }

    [LinuxFact]
    public void Unplugging_ends_a_read_that_waits()
    {
        var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        Task<Exception> reading = Task.Run(() => Record.Exception(() => link.Read(new byte[8], _long)));
        box.Dispose();
        Assert.True(reading.Wait(_long));
        var lost = Assert.IsType<LinkLostException>(reading.Result);
        Assert.Contains(link.Name, lost.Message, StringComparison.Ordinal);
    }

    [LinuxFact]
    public void Unplugging_an_idle_link_shows_at_the_next_call_and_stays()
    {
        var box = new PseudoTerminal();
        SerialLink link = Open(box);
        box.Dispose();
        Assert.Throws<LinkLostException>(() => link.Read(new byte[8], _long));
        Assert.Throws<LinkLostException>(() => link.Write("x"u8));
        Assert.Throws<LinkLostException>(() => link.Read(new byte[8], _long));
        AssertQuick(link.Dispose);
        Assert.Throws<ObjectDisposedException>(() => link.Write("x"u8));
        Assert.Throws<ObjectDisposedException>(() => link.Read(new byte[8], _long));
    }

    [LinuxFact]
    public void Bytes_that_came_before_the_unplugging_are_still_read()
    {
        var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        box.Write("last words"u8);
        byte[] first = new byte[1];
        Assert.Equal(1, link.Read(first, _long));
        box.Dispose();
        Assert.Equal("ast words"u8.ToArray(), ReadExactly(link.Read, 9));
        Assert.Throws<LinkLostException>(() => link.Read(new byte[8], _long));
    }

    [LinuxFact]
    public void Two_hundred_unplugs_leave_no_thread_and_no_descriptor_behind()
    {
        int threads = Directory.GetDirectories("/proc/self/task").Length;
        int descriptors = Directory.GetFiles("/proc/self/fd").Length;
        for (int i = 0; i < 200; i++)
        {
            var box = new PseudoTerminal();
            using SerialLink link = Open(box);
            box.Dispose();
            Assert.Throws<LinkLostException>(() => link.Read(new byte[8], _long));
        }

        // Other tests run at the same time and hold a few of their own.
        Assert.InRange(Directory.GetDirectories("/proc/self/task").Length, 0, threads + 50);
        Assert.InRange(Directory.GetFiles("/proc/self/fd").Length, 0, descriptors + 100);
    }

    [LinuxFact]
    public void Disposing_ends_a_read_that_waits()
    {
        using var box = new PseudoTerminal();
        SerialLink link = Open(box);
        Task<Exception> reading = Task.Run(() => Record.Exception(() => link.Read(new byte[8], _long)));
        AssertQuick(link.Dispose);
        Assert.True(reading.Wait(_long));
        Assert.IsType<ObjectDisposedException>(reading.Result);
        link.Dispose();
    }

    [LinuxFact]
    public void Disposing_a_live_link_ends_its_thread_and_frees_the_port_for_the_next()
    {
        using var box = new PseudoTerminal();
        for (int i = 0; i < 5; i++)
        {
            using SerialLink link = Open(box);
            box.Write("hello"u8);
            Assert.Equal("hello"u8.ToArray(), ReadExactly(link.Read, 5));
        }
    }

    [LinuxFact]
    public void The_second_link_to_a_port_is_refused_and_the_first_lives_on()
    {
        using var box = new PseudoTerminal();
        using SerialLink link = Open(box);
        var refused = Assert.Throws<LinkOpenException>(() => Open(box));
        Assert.Equal(LinkOpenFailure.Busy, refused.Kind);
        Assert.Contains($"process {Environment.ProcessId}", refused.Message, StringComparison.Ordinal);

        // Under another name it is the same port.
        string alias = Path.Combine(_lockFolder, "alias");
        File.CreateSymbolicLink(alias, box.SlavePath);
        Assert.Equal(LinkOpenFailure.Busy, Assert.Throws<LinkOpenException>(() => SerialLink.Open(alias, _lockFolder)).Kind);

        box.Write("still here"u8);
        Assert.Equal("still here"u8.ToArray(), ReadExactly(link.Read, 10));
    }

    [LinuxFact]
    public void The_lock_of_a_process_that_died_is_taken_over()
    {
        using var box = new PseudoTerminal();
        string lockFile = PortLock.FilePath(box.SlavePath, _lockFolder);

        // Process 2147483647 cannot exist on Linux: PID_MAX_LIMIT is 2^22 (proc(5)).
        File.WriteAllText(lockFile, string.Empty);
        File.WriteAllText(Path.ChangeExtension(lockFile, ".holder"), "2147483647");
        using SerialLink link = Open(box);
        Assert.Equal(LinkOpenFailure.Busy, Assert.Throws<LinkOpenException>(() => Open(box)).Kind);
    }

    [LinuxFact]
    public void Another_process_that_has_the_lock_is_respected_until_it_dies()
    {
        using var box = new PseudoTerminal();
        string lockFile = PortLock.FilePath(box.SlavePath, _lockFolder);
        File.WriteAllText(lockFile, string.Empty);
        using Process other = Process.Start(
            new ProcessStartInfo("flock", ["--exclusive", "--no-fork", lockFile, "sh", "-c", "echo locked; exec sleep 60"])
            {
                RedirectStandardOutput = true,
            })!;
        try
        {
            Assert.Equal("locked", other.StandardOutput.ReadLine());
            Assert.Equal(LinkOpenFailure.Busy, Assert.Throws<LinkOpenException>(() => Open(box)).Kind);
        }
        finally
        {
            other.Kill();
            other.WaitForExit();
        }

        Open(box).Dispose();
    }

    [LinuxFact]
    public void What_is_not_there_is_not_found()
    {
        var refused = Assert.Throws<LinkOpenException>(() => SerialLink.Open("/dev/ttyUSB-none", _lockFolder));
        Assert.Equal(LinkOpenFailure.NotFound, refused.Kind);
        Assert.Equal("/dev/ttyUSB-none", refused.PortName);
    }

    [LinuxTheory]
    [InlineData("file")]
    [InlineData("folder")]
    [InlineData("/dev/null")]
    public void What_is_no_terminal_is_called_so(string what)
    {
        string path = what.StartsWith('/') ? what : Path.Combine(_lockFolder, what);
        if (what == "file")
        {
            File.WriteAllText(path, "text");
        }
        else if (what == "folder")
        {
            Directory.CreateDirectory(path);
        }

        var refused = Assert.Throws<LinkOpenException>(() => SerialLink.Open(path, _lockFolder));
        Assert.Equal(LinkOpenFailure.NotASerialPort, refused.Kind);
        if (what == "file")
        {
            Assert.Equal("text", File.ReadAllText(path));
        }
    }

    [OrdinaryUserFact]
    public void A_port_without_permission_names_the_group_and_the_rule()
    {
        using var box = new PseudoTerminal();
        Debug.Assert(OperatingSystem.IsLinux());
        File.SetUnixFileMode(box.SlavePath, UnixFileMode.None);
        var refused = Assert.Throws<LinkOpenException>(() => Open(box));
        Assert.Equal(LinkOpenFailure.NoPermission, refused.Kind);
        Assert.Contains("dialout", refused.Message, StringComparison.Ordinal);
        Assert.Contains("udev", refused.Message, StringComparison.Ordinal);
    }

    [LinuxFact]
    public void A_lock_file_that_cannot_be_made_is_not_called_busy()
    {
        using var box = new PseudoTerminal();
        string folder = Path.Combine(_lockFolder, "absent");
        var refused = Assert.Throws<LinkOpenException>(() => SerialLink.Open(box.SlavePath, folder));
        Assert.Equal(LinkOpenFailure.Refused, refused.Kind);
        Assert.Contains(folder, refused.Message, StringComparison.Ordinal);
    }

    [LinuxFact]
    public void A_refused_port_leaves_no_lock_behind()
    {
        string path = Path.Combine(_lockFolder, "file");
        File.WriteAllText(path, "text");
        for (int i = 0; i < 2; i++)
        {
            Assert.Equal(
                LinkOpenFailure.NotASerialPort,
                Assert.Throws<LinkOpenException>(() => SerialLink.Open(path, _lockFolder)).Kind);
        }
    }

    [LinuxFact]
    public void A_host_that_does_not_read_holds_up_nothing_for_ever()
    {
        using var box = new PseudoTerminal();
        SerialLink link = Open(box);

        // More than the link's own buffer and the kernel's: the thread that reads the port is then held up.
        Task writing = Task.Run(() => WriteInPieces(box.Write, new byte[400_000]));
        Assert.Equal(1, link.Read(new byte[1], _long));
        AssertQuick(link.Dispose);
        Assert.True(writing.Wait(_long));
        Assert.True(box.DroppedBytes > 0);
    }

    private static void AssertQuick(Action action) => Assert.True(Task.Run(action).Wait(_long), "hung");

    private static void WriteInPieces(Writer write, byte[] bytes)
    {
        for (int at = 0; at < bytes.Length; at += 4096)
        {
            write(bytes.AsSpan(at, Math.Min(4096, bytes.Length - at)));
        }
    }

    private static byte[] ReadExactly(Reader read, int count)
    {
        byte[] bytes = new byte[count];
        int have = 0;
        while (have < count)
        {
            int part = read(bytes.AsSpan(have), _long);
            Assert.True(part > 0, $"nothing more after {have} of {count} bytes");
            have += part;
        }

        return bytes;
    }

    private SerialLink Open(PseudoTerminal box) => SerialLink.Open(box.SlavePath, _lockFolder);

    private delegate int Reader(Span<byte> buffer, TimeSpan timeout);

    private delegate void Writer(ReadOnlySpan<byte> bytes);
}
