using System.ComponentModel;
using System.Runtime.InteropServices;
using Microsoft.Win32.SafeHandles;

namespace Looseloop.Link;

/// <summary>The system calls of a pseudo-terminal's own end, with Linux's numbers.</summary>
internal static partial class Posix
{
    public const short Readable = 0x1;
    public const short Writable = 0x4;
    public const short HungUp = 0x10;

    private const int OpenReadWrite = 0x2;
    private const int OpenNoControllingTerminal = 0x100;
    private const int OpenCloseOnExec = 0x80000;
    private const int SetNonBlocking = 4;
    private const int NonBlocking = 0x800;
    private const int Interrupted = 4;
    private const int TryAgain = 11;
    private const int IoError = 5;

    /// <summary>More than any system's struct termios (60 bytes with glibc on Linux).</summary>
    private const int TermiosRoomBytes = 256;

    /// <summary>The controlling end of a new pseudo-terminal, its other end unlocked.</summary>
    public static SafeFileHandle OpenMaster()
    {
        int descriptor = posix_openpt(OpenReadWrite | OpenNoControllingTerminal | OpenCloseOnExec);
        if (descriptor < 0)
        {
            throw Failed("posix_openpt");
        }

        var master = new SafeFileHandle(descriptor, ownsHandle: true);
        Check(grantpt(master), "grantpt");
        Check(unlockpt(master), "unlockpt");
        Check(fcntl(master, SetNonBlocking, OpenReadWrite | NonBlocking), "fcntl");
        return master;
    }

    /// <summary>Switches echo and line editing off, as a wire has none.</summary>
    /// <returns>The other end's path.</returns>
    public static unsafe string MakeRaw(SafeFileHandle master)
    {
        byte* name = stackalloc byte[256];
        int error = ptsname_r(master, name, 256);
        if (error != 0)
        {
            throw new IOException($"ptsname_r failed: {new Win32Exception(error).Message}");
        }

        byte* termios = stackalloc byte[TermiosRoomBytes];
        Check(tcgetattr(master, termios), "tcgetattr");
        cfmakeraw(termios);
        Check(tcsetattr(master, 0, termios), "tcsetattr");
        return Marshal.PtrToStringUTF8((nint)name)!;
    }

    /// <summary>A pipe whose reader hangs up when its writer is closed.</summary>
    public static unsafe (SafeFileHandle Reader, SafeFileHandle Writer) MakePipe()
    {
        int* ends = stackalloc int[2];
        Check(pipe2(ends, OpenCloseOnExec), "pipe2");
        return (new SafeFileHandle(ends[0], true), new SafeFileHandle(ends[1], true));
    }

    /// <summary>Waits for events on the terminal, or for the wake pipe to hang up.</summary>
    /// <returns>The terminal's events, 0 if there were none.</returns>
    public static unsafe int Poll(SafeFileHandle terminal, short events, SafeFileHandle wake, TimeSpan timeout)
    {
        bool terminalHeld = false;
        bool wakeHeld = false;
        try
        {
            terminal.DangerousAddRef(ref terminalHeld);
            wake.DangerousAddRef(ref wakeHeld);
            PollEntry* entries = stackalloc PollEntry[2];

            // With no events asked for, a terminal without a host would still report that at once.
            entries[0] = new PollEntry { Descriptor = events == 0 ? -1 : (int)terminal.DangerousGetHandle(), Events = events };
            entries[1] = new PollEntry { Descriptor = (int)wake.DangerousGetHandle() };
            int milliseconds = (int)Math.Clamp(Math.Ceiling(timeout.TotalMilliseconds), 0, int.MaxValue);
            int count = poll(entries, 2, milliseconds);
            if (count < 0 && Marshal.GetLastPInvokeError() != Interrupted)
            {
                throw Failed("poll");
            }

            return count <= 0 ? 0 : entries[0].Happened;
        }
        finally
        {
            if (terminalHeld)
            {
                terminal.DangerousRelease();
            }

            if (wakeHeld)
            {
                wake.DangerousRelease();
            }
        }
    }

    /// <returns>Bytes read; 0 if there are none, or nobody is at the other end.</returns>
    public static unsafe int Read(SafeFileHandle terminal, Span<byte> buffer)
    {
        fixed (byte* start = buffer)
        {
            return Transferred(read(terminal, start, buffer.Length), "read");
        }
    }

    /// <returns>Bytes written; 0 if there is no room, or nobody is at the other end.</returns>
    public static unsafe int Write(SafeFileHandle terminal, ReadOnlySpan<byte> bytes)
    {
        fixed (byte* start = bytes)
        {
            return Transferred(write(terminal, start, bytes.Length), "write");
        }
    }

    private static int Transferred(nint count, string call)
    {
        if (count >= 0)
        {
            return (int)count;
        }

        return Marshal.GetLastPInvokeError() is Interrupted or TryAgain or IoError ? 0 : throw Failed(call);
    }

    private static void Check(int result, string call)
    {
        if (result < 0)
        {
            throw Failed(call);
        }
    }

    private static IOException Failed(string call) => new($"{call} failed: {Marshal.GetLastPInvokeErrorMessage()}");

    // The names and shapes are POSIX's own.
#pragma warning disable IDE1006
    [LibraryImport("libc", SetLastError = true)]
    private static partial int posix_openpt(int flags);

    [LibraryImport("libc", SetLastError = true)]
    private static partial int grantpt(SafeFileHandle master);

    [LibraryImport("libc", SetLastError = true)]
    private static partial int unlockpt(SafeFileHandle master);

    [LibraryImport("libc")]
    private static unsafe partial int ptsname_r(SafeFileHandle master, byte* name, nint size);

    [LibraryImport("libc", SetLastError = true)]
    private static unsafe partial int tcgetattr(SafeFileHandle terminal, byte* termios);

    [LibraryImport("libc", SetLastError = true)]
    private static unsafe partial int tcsetattr(SafeFileHandle terminal, int when, byte* termios);

    [LibraryImport("libc")]
    private static unsafe partial void cfmakeraw(byte* termios);

    // Variadic in C: called with its one argument as an int, which every Linux calling convention of .NET passes alike.
    [LibraryImport("libc", SetLastError = true)]
    private static partial int fcntl(SafeFileHandle file, int command, int argument);

    [LibraryImport("libc", SetLastError = true)]
    private static unsafe partial int pipe2(int* ends, int flags);

    [LibraryImport("libc", SetLastError = true)]
    private static unsafe partial int poll(PollEntry* entries, nuint count, int timeoutMs);

    [LibraryImport("libc", SetLastError = true)]
    private static unsafe partial nint read(SafeFileHandle file, byte* buffer, nint count);

    [LibraryImport("libc", SetLastError = true)]
    private static unsafe partial nint write(SafeFileHandle file, byte* buffer, nint count);
#pragma warning restore IDE1006

    [StructLayout(LayoutKind.Sequential)]
    private struct PollEntry
    {
        public int Descriptor;
        public short Events;
        public short Happened;
    }
}
