namespace Looseloop.Link.Tests;

public sealed class PortListTests : IDisposable
{
    private readonly string _dev = Directory.CreateTempSubdirectory("looseloop-dev-").FullName;

    public void Dispose() => Directory.Delete(_dev, recursive: true);

    [LinuxFact]
    public void Each_device_stands_once_under_its_lasting_name()
    {
        string byId = Directory.CreateDirectory(Path.Combine(_dev, "serial", "by-id")).FullName;
        foreach (string name in (string[])["ttyUSB0", "ttyUSB1", "ttyACM0", "ttyS0", "tty1", "null"])
        {
            File.WriteAllText(Path.Combine(_dev, name), string.Empty);
        }

        File.CreateSymbolicLink(Path.Combine(byId, "usb-Bridge_0001-if00-port0"), "../../ttyUSB1");
        File.CreateSymbolicLink(Path.Combine(byId, "usb-Unplugged-if00"), "../../ttyUSB7");

        Assert.Equal(
            [
                (Path.Combine(byId, "usb-Bridge_0001-if00-port0"), Path.Combine(_dev, "ttyUSB1")),
                (Path.Combine(_dev, "ttyUSB0"), Path.Combine(_dev, "ttyUSB0")),
                (Path.Combine(_dev, "ttyACM0"), Path.Combine(_dev, "ttyACM0")),
            ],
            PortList.FindBelow(_dev).Select(port => (port.Name, port.Device)));
    }

    [LinuxFact]
    public void Nothing_plugged_in_is_an_empty_list()
    {
        Assert.Empty(PortList.FindBelow(_dev));
        Assert.Empty(PortList.FindBelow(Path.Combine(_dev, "absent")));
    }
}
