using System.Runtime.InteropServices;

namespace Looseloop.Link;

/// <summary>
/// Finds out why a port does not open. The runtime says UnauthorizedAccessException to a missing port, a plain file, a folder
/// and a port without permission alike.
/// </summary>
internal static partial class PortCheck
{
    private const int ReadAndWrite = 4 | 2;

    /// <summary>Throws if nothing, or a folder, has this name.</summary>
    public static void ThrowIfNoPort(string portName)
    {
        if (OperatingSystem.IsWindows())
        {
            return;
        }

        if (Directory.Exists(portName))
        {
            throw LinkOpenException.NotASerialPort(portName);
        }

        if (!File.Exists(portName))
        {
            throw LinkOpenException.NotFound(portName);
        }
    }

    /// <summary>Turns what the runtime threw into the exception that says what to do.</summary>
    public static LinkOpenException Explain(string portName, Exception thrown)
    {
        if (OperatingSystem.IsWindows())
        {
            return thrown switch
            {
                FileNotFoundException => LinkOpenException.NotFound(portName),
                UnauthorizedAccessException => LinkOpenException.Busy(portName, holder: null, thrown),
                ArgumentException => LinkOpenException.NotASerialPort(portName, thrown),
                _ => LinkOpenException.Refused(portName, thrown),
            };
        }

        if (!File.Exists(portName))
        {
            return LinkOpenException.NotFound(portName);
        }

        if (Access(portName, ReadAndWrite) != 0)
        {
            return LinkOpenException.NoPermission(portName, thrown);
        }

        // What is left with access granted: not a terminal, or kept by a program that asked the kernel to share it with none.
        return IsBusy(thrown)
            ? LinkOpenException.Busy(portName, holder: null, thrown)
            : LinkOpenException.NotASerialPort(portName, thrown);
    }

    private static bool IsBusy(Exception thrown)
    {
        const int DeviceBusy = 16;
        for (Exception? e = thrown; e is not null; e = e.InnerException)
        {
            if (e.HResult == DeviceBusy)
            {
                return true;
            }
        }

        return false;
    }

    [LibraryImport("libc", EntryPoint = "access", StringMarshalling = StringMarshalling.Utf8, SetLastError = true)]
    private static partial int Access(string path, int mode);
}
