using System.IO.Ports;

namespace Looseloop.Link;

/// <summary>The ports behind which a box may be. Looking opens none of them.</summary>
public static class PortList
{
    /// <summary>
    /// The candidates, sorted by name. On Linux the USB serial devices, each under its lasting name below
    /// /dev/serial/by-id where it has one; elsewhere all serial ports.
    /// </summary>
    public static IReadOnlyList<PortCandidate> Find() =>
        OperatingSystem.IsLinux()
            ? FindBelow("/dev")
            : [.. SerialPort.GetPortNames().Distinct().Order(StringComparer.Ordinal).Select(name => new PortCandidate(name, name))];

    internal static IReadOnlyList<PortCandidate> FindBelow(string deviceFolder)
    {
        var found = new List<PortCandidate>();
        var named = new HashSet<string>(StringComparer.Ordinal);
        foreach (string link in Entries(Path.Combine(deviceFolder, "serial", "by-id"), "*"))
        {
            // A link whose device has just been unplugged may still stand for a moment.
            if (File.ResolveLinkTarget(link, returnFinalTarget: true) is { Exists: true } target && named.Add(target.FullName))
            {
                found.Add(new PortCandidate(link, target.FullName));
            }
        }

        foreach (string pattern in (string[])["ttyUSB*", "ttyACM*"])
        {
            found.AddRange(Entries(deviceFolder, pattern).Where(named.Add).Select(device => new PortCandidate(device, device)));
        }

        return found;
    }

    private static IEnumerable<string> Entries(string folder, string pattern)
    {
        try
        {
            return Directory.GetFileSystemEntries(folder, pattern).Order(StringComparer.Ordinal);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return [];
        }
    }
}
