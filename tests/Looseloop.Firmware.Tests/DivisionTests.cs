using System.Reflection.Metadata;
using System.Reflection.PortableExecutable;
using Looseloop.Firmware.Tests.Gate;

namespace Looseloop.Firmware.Tests;

/// <summary>
/// On the boards any division by zero throws, that of doubles too. So every division in the firmware is on this list, with
/// the reason why its divisor is not zero.
/// </summary>
public class DivisionTests
{
    private static readonly Dictionary<string, string> _reviewed = new()
    {
        ["AsciiNumber.Digits"] = "by 10",
        ["AsciiNumber.Write"] = "by 10",
        ["BoxProfile..ctor"] = "by 20",
        ["FrequencyGrid.AskedDuty"] = "by a power of 2, and by 10000",
        ["FrequencyGrid.DutyBits"] = "by a request above 0 (IsRealisable looks first) and powers of 2",
        ["FrequencyGrid.Divider"] = "by a request above 0, shifted by at most 19 bits, and by 2",
        ["FrequencyGrid.RequestHz"] = "by a divider of 1 to 261888 (fields are bounded), shifted by at most 19 bits, and by 2",
        ["FrequencyGrid.FrequencyHz"] = "called by the host only",
        ["RingEngine.Follow"] = "by 2",
        ["RingEngine.Stop"] = "by 2",
        ["Sampler.get_MiddleUs"] = "by 2",
    };

    [Theory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void Every_division_has_been_looked_at(string board)
    {
        using var file = new PEReader(new MemoryStream(CheckBuild.Read(board, "Looseloop." + board)));
        MetadataReader reader = file.GetMetadataReader();
        var dividing = new SortedSet<string>(StringComparer.Ordinal);
        foreach (MethodDefinitionHandle handle in reader.MethodDefinitions)
        {
            MethodDefinition method = reader.GetMethodDefinition(handle);
            if (method.RelativeVirtualAddress == 0)
            {
                continue;
            }

            byte[] il = file.GetMethodBody(method.RelativeVirtualAddress).GetILBytes()!;
            if (IlReader.Read(il).Any(instruction => instruction.Code.Name is "div" or "div.un" or "rem" or "rem.un"))
            {
                string type = reader.GetString(reader.GetTypeDefinition(method.GetDeclaringType()).Name);
                dividing.Add(type + "." + reader.GetString(method.Name));
            }
        }

        Assert.Equal(_reviewed.Keys.Order(StringComparer.Ordinal), dividing);
    }

    // The longest way to a zero: a divider so large that the request rounds to 0 Hz.
    [Theory]
    [InlineData("run 19 261888 0 1 1")]
    [InlineData("run 1 1 0 1 1")]
    [InlineData("run 19 1 0 1 524287")]
    [InlineData("run 1 261888 0 1 1")]
    [InlineData("run 9 1 -1 4096 1")]
    public void No_field_makes_a_divisor_zero(string request)
    {
        Assert.Equal(4, new Board.TestHost().Fault(request));
    }
}
