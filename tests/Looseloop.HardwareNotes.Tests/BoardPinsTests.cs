using System.Globalization;
using System.Text.RegularExpressions;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>The pins in the table of boards are those that the firmware uses.</summary>
public sealed partial class BoardPinsTests
{
    /// <summary>GPIO of the classic part's first converter, channels 0 to 7 (data sheet, from memory, and the runtime's sources).</summary>
    private static readonly int[] _classicGpio = [36, 37, 38, 39, 32, 33, 34, 35];

    private readonly string _page = File.ReadAllText(NotesFolder.File("boards.md"));
    private readonly string _pinMap = File.ReadAllText(NotesFolder.File("../firmware/Board/PinMap.cs"));

    [Theory]
    [InlineData("DetectorAdc", "detector")]
    [InlineData("DirectAdc", "direct, if fitted")]
    [InlineData("ThermistorAdc", "thermistor, if fitted")]
    public void Inputs(string constant, string row)
    {
        int channel = Number(constant);

        // On the S3 channel n is GPIO n + 1.
        Assert.Contains(
            $"| {row} | converter channel {channel}, GPIO{channel + 1} | converter channel {channel}, GPIO{_classicGpio[channel]} |",
            _page,
            StringComparison.Ordinal);
    }

    [Fact]
    public void Drive_and_line()
    {
        int drive = Number("DrivePin");
        Assert.Contains($"| drive | PWM1 on GPIO{drive} | PWM1 on GPIO{drive} |", _page, StringComparison.Ordinal);
        Assert.Contains($"COM2 on GPIO{Number("TransmitPin")} (TX) and GPIO{Number("ReceivePin")} (RX)", _page, StringComparison.Ordinal);
    }

    private int Number(string name) =>
        int.Parse(
            Assignment().Matches(_pinMap).Single(match => match.Groups["name"].Value == name).Groups["value"].Value,
            CultureInfo.InvariantCulture);

    [GeneratedRegex(@"(?<name>\w+) = (?<value>\d+);")]
    private static partial Regex Assignment();
}
