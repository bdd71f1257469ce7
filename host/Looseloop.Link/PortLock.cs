using System.Diagnostics;
using System.Globalization;
using System.Text;

namespace Looseloop.Link;

/// <summary>
/// Keeps a port to one link at a time. The runtime opens a serial port twice without complaint, so each open port has a
/// lock file of ours. What counts is the system's lock on that file, which dies with its process: the file of a process
/// that was killed is simply taken over. The process's id in the file beside it is for the message only.
/// </summary>
internal sealed class PortLock : IDisposable
{
    private readonly FileStream _file;
    private readonly string _holderPath;

    private PortLock(FileStream file, string holderPath)
    {
        _file = file;
        _holderPath = holderPath;
    }

    /// <summary>Where lock files stand unless a test says otherwise: the same place for every user of the machine.</summary>
    public static string DefaultFolder => OperatingSystem.IsWindows() ? Path.GetTempPath() : "/tmp";

    /// <summary>Takes the lock of a port.</summary>
    /// <param name="portPath">The port; links to it are followed, so that all its names share a lock.</param>
    /// <param name="folder">Where the lock file stands.</param>
    /// <param name="holder">If it is taken already, the id of the process that has it, where that can be known.</param>
    /// <returns>The lock, or null if it is taken already.</returns>
    /// <exception cref="IOException">The lock file cannot be made.</exception>
    /// <exception cref="UnauthorizedAccessException">The lock file cannot be made.</exception>
    public static PortLock? TryTake(string portPath, string folder, out int? holder)
    {
        holder = null;
        string path = FilePath(portPath, folder);
        string holderPath = Path.ChangeExtension(path, ".holder");
        FileStream file;
        try
        {
            file = OpenOrCreate(path);
        }
        catch (IOException e) when (IsHeld(e))
        {
            holder = ReadHolder(holderPath);
            return null;
        }

        WriteHolder(holderPath);
        return new PortLock(file, holderPath);
    }

    /// <summary>Gives the port free. The lock file stays: deleting it could take away a lock that somebody has just taken.</summary>
    public void Dispose()
    {
        try
        {
            File.Delete(_holderPath);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            // It names a process that no longer holds the lock, and is read only while one does.
        }

        _file.Dispose();
    }

    /// <summary>The lock file of a port.</summary>
    internal static string FilePath(string portPath, string folder)
    {
        string target = portPath;
        if (!OperatingSystem.IsWindows() && File.Exists(portPath))
        {
            target = File.ResolveLinkTarget(portPath, returnFinalTarget: true)?.FullName ?? Path.GetFullPath(portPath);
        }

        var name = new StringBuilder("looseloop");
        foreach (char c in target)
        {
            name.Append(char.IsAsciiLetterOrDigit(c) ? c : '-');
        }

        return Path.Combine(folder, name.Append(".lock").ToString());
    }

    private static FileStream OpenOrCreate(string path)
    {
        // In a shared folder the kernel may refuse to "create" a file that another user owns, though opening it is allowed.
        if (File.Exists(path))
        {
            return new FileStream(path, FileMode.Open, FileAccess.ReadWrite, FileShare.None);
        }

        var file = new FileStream(path, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
        if (!OperatingSystem.IsWindows())
        {
            const UnixFileMode ReadWrite = UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.GroupRead
                | UnixFileMode.GroupWrite | UnixFileMode.OtherRead | UnixFileMode.OtherWrite;
            File.SetUnixFileMode(file.SafeFileHandle, ReadWrite);
        }

        return file;
    }

    private static bool IsHeld(IOException e)
    {
        const int WouldBlock = 11;
        const int WouldBlockOnMacOs = 35;
        const int SharingViolation = unchecked((int)0x80070020);
        return e.HResult is WouldBlock or WouldBlockOnMacOs or SharingViolation;
    }

    private static void WriteHolder(string path)
    {
        try
        {
            File.WriteAllText(path, Environment.ProcessId.ToString(CultureInfo.InvariantCulture));
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            // Another user's file may stand there; the message of a second program then names no process.
        }
    }

    private static int? ReadHolder(string path)
    {
        try
        {
            if (!int.TryParse(File.ReadAllText(path), NumberStyles.None, CultureInfo.InvariantCulture, out int id))
            {
                return null;
            }

            using Process process = Process.GetProcessById(id);
            return id;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException)
        {
            return null;
        }
    }
}
