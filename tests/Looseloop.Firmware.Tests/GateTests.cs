using System.Reflection;
using System.Reflection.Emit;
using Looseloop.Firmware.Tests.Gate;

namespace Looseloop.Firmware.Tests;

/// <summary>The firmware passes the metadata gate, and the gate refuses what it must.</summary>
public class GateTests
{
    private static readonly Lazy<IReadOnlyList<Finding>> _refused =
        new(() => MetadataGate.Check(CheckBuild.Read("Refused", "Looseloop.Refused"), CheckBuild.AllowedReferences));

    [Theory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void The_firmware_passes(string board)
    {
        byte[] assembly = CheckBuild.Read(board, "Looseloop." + board);
        Assert.Empty(MetadataGate.Check(assembly, CheckBuild.AllowedReferences));
    }

    [Theory]
    [InlineData("GenericType`1", Rule.GenericDefinition)]
    [InlineData("GenericMethod.Same", Rule.GenericDefinition)]
    [InlineData("GenericCall.Do", Rule.GenericUse)]
    [InlineData("GenericField", Rule.GenericUse)]
    [InlineData("GenericLocal.Do", Rule.GenericUse)]
    [InlineData("TwoDimensions.Do", Rule.MultiDimensionalArray)]
    [InlineData("PointerParameter.Do", Rule.Pointer)]
    [InlineData("PinnedLocal.Do", Rule.Pinned)]
    [InlineData("StackAllocation.Do", Rule.OpCode)]
    [InlineData("FunctionPointer.Do", Rule.FunctionPointer)]
    [InlineData("FunctionPointer.Do", Rule.OpCode)]
    [InlineData("CheckedAddition.Do", Rule.OpCode)]
    [InlineData("CheckedConversion.Do", Rule.OpCode)]
    [InlineData("InterfaceBody.Do", Rule.InterfaceBody)]
    [InlineData("InternalCall.Do", Rule.NativeMethod)]
    [InlineData("PlatformCall.Do", Rule.NativeMethod)]
    [InlineData("tables", Rule.GenericDefinition)]
    [InlineData("tables", Rule.GenericUse)]
    public void What_compiles_and_would_fail_on_the_board_is_refused(string place, string rule)
    {
        Assert.Contains(_refused.Value, finding => finding.Place == place && finding.Rule == rule);
    }

    [Fact]
    public void What_is_allowed_is_let_through()
    {
        Assert.DoesNotContain(_refused.Value, finding => finding.Place.StartsWith("Allowed", StringComparison.Ordinal));
    }

    [Fact]
    public void A_reference_of_another_version_or_name_is_refused()
    {
        byte[] firmware = CheckBuild.Read("Esp32", "Looseloop.Esp32");
        foreach (string name in CheckBuild.AllowedReferences.Keys)
        {
            var others = new Dictionary<string, Version>(CheckBuild.AllowedReferences);
            others[name] = new Version(others[name].Major, others[name].Minor + 1);
            Finding finding = Assert.Single(MetadataGate.Check(firmware, others));
            Assert.Equal(Rule.AssemblyReference, finding.Rule);
            Assert.StartsWith(name + " ", finding.Detail);
            others.Remove(name);
            Assert.Single(MetadataGate.Check(firmware, others));
        }
    }

    // Instructions that C# does not make, or not against this library.
    [Theory]
    [InlineData("arglist")]
    [InlineData("ckfinite")]
    [InlineData("cpblk")]
    [InlineData("initblk")]
    [InlineData("jmp")]
    [InlineData("localloc")]
    [InlineData("mkrefany")]
    [InlineData("refanytype")]
    [InlineData("refanyval")]
    [InlineData("readonly.")]
    [InlineData("add.ovf")]
    [InlineData("mul.ovf.un")]
    [InlineData("conv.ovf.i1.un")]
    public void An_instruction_that_the_board_lacks_is_refused(string name)
    {
        OpCode code = typeof(OpCodes).GetFields().Select(field => (OpCode)field.GetValue(null)!).Single(c => c.Name == name);
        var assembly = new PersistedAssemblyBuilder(new AssemblyName("Sample"), typeof(object).Assembly);
        TypeBuilder type = assembly.DefineDynamicModule("Sample").DefineType("Sample", TypeAttributes.Public | TypeAttributes.Class);
        MethodBuilder method = type.DefineMethod("Do", MethodAttributes.Public | MethodAttributes.Static);
        ILGenerator il = method.GetILGenerator();
        switch (code.OperandType)
        {
            case OperandType.InlineMethod:
                il.Emit(code, method);
                break;
            case OperandType.InlineType:
                il.Emit(code, typeof(object));
                break;
            default:
                il.Emit(code);
                break;
        }

        il.Emit(OpCodes.Ret);
        type.CreateType();
        using var file = new MemoryStream();
        assembly.Save(file);
        Assert.Contains(
            MetadataGate.Check(file.ToArray(), CheckBuild.AllowedReferences),
            finding => finding is { Place: "Sample.Do", Rule: Rule.OpCode } && finding.Detail == name);
    }

    [Fact]
    public void Typed_references_are_refused()
    {
        var assembly = new PersistedAssemblyBuilder(new AssemblyName("Sample"), typeof(object).Assembly);
        TypeBuilder type = assembly.DefineDynamicModule("Sample").DefineType("Sample", TypeAttributes.Public | TypeAttributes.Class);
        ILGenerator il = type.DefineMethod("Do", MethodAttributes.Public | MethodAttributes.Static).GetILGenerator();
        il.DeclareLocal(typeof(TypedReference));
        il.Emit(OpCodes.Ret);
        type.CreateType();
        using var file = new MemoryStream();
        assembly.Save(file);
        Assert.Contains(
            MetadataGate.Check(file.ToArray(), CheckBuild.AllowedReferences), finding => finding.Rule == Rule.TypedReference);
    }

    [Fact]
    public void The_tests_themselves_would_be_refused()
    {
        IReadOnlyList<Finding> findings = MetadataGate.Check(
            File.ReadAllBytes(typeof(GateTests).Assembly.Location), CheckBuild.AllowedReferences);
        Assert.Contains(findings, finding => finding.Rule == Rule.AssemblyReference);
        Assert.Contains(findings, finding => finding.Rule == Rule.GenericUse);
    }
}
