namespace Looseloop.Link;

/// <summary>A port could not be opened. The message says what to do about it.</summary>
public sealed class LinkOpenException : IOException
{
    private LinkOpenException(LinkOpenFailure kind, string portName, string message, Exception? inner = null)
        : base(message, inner)
    {
        Kind = kind;
        PortName = portName;
    }

    public LinkOpenFailure Kind { get; }

    /// <summary>The port as it was asked for.</summary>
    public string PortName { get; }

    internal static LinkOpenException NotFound(string portName) =>
        new(
            LinkOpenFailure.NotFound,
            portName,
            $"There is no port {portName}. Plug the box in, or name one of the ports that the list of boxes shows.");

    internal static LinkOpenException NotASerialPort(string portName, Exception? inner = null) =>
        new(
            LinkOpenFailure.NotASerialPort,
            portName,
            $"{portName} is not a serial port. Name the box's own port, such as one below /dev/serial/by-id.",
            inner);

    internal static LinkOpenException NoPermission(string portName, Exception inner) =>
        new(
            LinkOpenFailure.NoPermission,
            portName,
            $"This user may not open {portName}. On Linux, add yourself to the port's group (sudo usermod -aG dialout $USER) "
            + "and log in again; or give the port to whoever sits at the machine with a udev rule: a line "
            + "SUBSYSTEM==\"tty\", ATTRS{idVendor}==\"VVVV\", TAG+=\"uaccess\" in /etc/udev/rules.d/70-looseloop.rules, "
            + "VVVV as lsusb shows it, and plug the box in again.",
            inner);

    internal static LinkOpenException Busy(string portName, int? holder, Exception? inner)
    {
        string who = holder is int id ? $" (process {id})" : string.Empty;
        return new(
            LinkOpenFailure.Busy,
            portName,
            $"{portName} is in use by another program{who}. Close it there, then try again.",
            inner);
    }

    internal static LinkOpenException NoLockFile(string portName, Exception inner) =>
        new(
            LinkOpenFailure.Refused,
            portName,
            $"The lock file that keeps {portName} to one program could not be made: {inner.Message} Make room or give access there.",
            inner);

    internal static LinkOpenException Refused(string portName, Exception inner) =>
        new(
            LinkOpenFailure.Refused,
            portName,
            $"{portName} could not be opened: {inner.Message} Unplug the box, plug it in again and try once more.",
            inner);
}
