using System.Reflection;
using System.Reflection.Metadata;
using System.Reflection.Metadata.Ecma335;
using System.Reflection.PortableExecutable;

namespace Looseloop.Firmware.Tests.Gate;

/// <summary>
/// Looks through a compiled assembly for what the boards' runtime (nanoFramework 1.x) does not do although the compiler does:
/// generics, multi-dimensional arrays, pointers, interface bodies, natives, some opcodes, references of another version.
/// </summary>
internal sealed class MetadataGate
{
    private static readonly string[] _refusedOpCodes =
    [
        "arglist", "calli", "ckfinite", "cpblk", "initblk", "jmp", "localloc", "mkrefany", "refanytype", "refanyval", "readonly.",
    ];

    private readonly SignatureProbe _probe = new();
    private readonly List<Finding> _findings = [];
    private readonly PEReader _file;
    private readonly MetadataReader _reader;

    private MetadataGate(PEReader file)
    {
        _file = file;
        _reader = file.GetMetadataReader();
    }

    /// <summary>Everything that is wrong with an assembly.</summary>
    /// <param name="assembly">The file's contents.</param>
    /// <param name="allowed">Names and versions that it may refer to; the loader wants their major and minor exactly.</param>
    public static IReadOnlyList<Finding> Check(byte[] assembly, IReadOnlyDictionary<string, Version> allowed)
    {
        using var file = new PEReader(new MemoryStream(assembly));
        var gate = new MetadataGate(file);
        gate.CheckReferences(allowed);
        gate.CheckTables();
        foreach (TypeDefinitionHandle type in gate._reader.TypeDefinitions)
        {
            gate.CheckType(type);
        }

        return gate._findings;
    }

    private void CheckReferences(IReadOnlyDictionary<string, Version> allowed)
    {
        foreach (AssemblyReferenceHandle handle in _reader.AssemblyReferences)
        {
            AssemblyReference reference = _reader.GetAssemblyReference(handle);
            string name = _reader.GetString(reference.Name);
            if (!allowed.TryGetValue(name, out Version? version)
                || version.Major != reference.Version.Major
                || version.Minor != reference.Version.Minor)
            {
                Add(Rule.AssemblyReference, "references", $"{name} {reference.Version}");
            }
        }
    }

    // What no method or field leads to is refused too.
    private void CheckTables()
    {
        if (_reader.GetTableRowCount(TableIndex.GenericParam) > 0)
        {
            Add(Rule.GenericDefinition, "tables", "GenericParam is not empty");
        }

        if (_reader.GetTableRowCount(TableIndex.MethodSpec) > 0)
        {
            Add(Rule.GenericUse, "tables", "MethodSpec is not empty");
        }

        foreach (TypeReferenceHandle handle in _reader.TypeReferences)
        {
            CheckHandle(handle, "tables");
        }

        for (int row = 1; row <= _reader.GetTableRowCount(TableIndex.TypeSpec); row++)
        {
            CheckHandle(MetadataTokens.TypeSpecificationHandle(row), "tables");
        }

        foreach (MemberReferenceHandle handle in _reader.MemberReferences)
        {
            CheckHandle(handle, "tables");
        }
    }

    private void CheckType(TypeDefinitionHandle handle)
    {
        TypeDefinition type = _reader.GetTypeDefinition(handle);
        string place = _reader.GetString(type.Name);
        if (type.GetGenericParameters().Count > 0)
        {
            Add(Rule.GenericDefinition, place, "type");
        }

        CheckHandle(type.BaseType, place);
        foreach (InterfaceImplementationHandle implementation in type.GetInterfaceImplementations())
        {
            CheckHandle(_reader.GetInterfaceImplementation(implementation).Interface, place);
        }

        foreach (FieldDefinitionHandle fieldHandle in type.GetFields())
        {
            FieldDefinition field = _reader.GetFieldDefinition(fieldHandle);
            AddIfBroken(field.DecodeSignature(_probe, null), place, _reader.GetString(field.Name));
        }

        bool isInterface = (type.Attributes & TypeAttributes.Interface) != 0;
        foreach (MethodDefinitionHandle method in type.GetMethods())
        {
            CheckMethod(_reader.GetMethodDefinition(method), place, isInterface);
        }
    }

    private void CheckMethod(MethodDefinition method, string type, bool isInterface)
    {
        string place = type + "." + _reader.GetString(method.Name);
        if (method.GetGenericParameters().Count > 0)
        {
            Add(Rule.GenericDefinition, place, "method");
        }

        CheckSignature(method.DecodeSignature(_probe, null), place);
        bool isNative = (method.Attributes & MethodAttributes.PinvokeImpl) != 0
            || (method.ImplAttributes & (MethodImplAttributes.InternalCall | MethodImplAttributes.Native)) != 0;
        if (isNative)
        {
            Add(Rule.NativeMethod, place, method.ImplAttributes.ToString());
        }

        if (method.RelativeVirtualAddress == 0)
        {
            return;
        }

        if (isInterface)
        {
            Add(Rule.InterfaceBody, place, "has a body");
        }

        CheckBody(_file.GetMethodBody(method.RelativeVirtualAddress), place);
    }

    private void CheckBody(MethodBodyBlock body, string place)
    {
        if (!body.LocalSignature.IsNil)
        {
            StandaloneSignature locals = _reader.GetStandaloneSignature(body.LocalSignature);
            foreach (string? rule in locals.DecodeLocalSignature(_probe, null))
            {
                AddIfBroken(rule, place, "local variable");
            }
        }

        foreach ((System.Reflection.Emit.OpCode code, int token) in IlReader.Read(body.GetILBytes()!))
        {
            string name = code.Name!;
            if (_refusedOpCodes.Contains(name) || name.Contains(".ovf", StringComparison.Ordinal))
            {
                Add(Rule.OpCode, place, name);
            }

            if (token != 0)
            {
                CheckToken(token, place);
            }
        }
    }

    private void CheckToken(int token, string place)
    {
        const int UserString = 0x70;
        if (token >>> 24 != UserString)
        {
            CheckHandle(MetadataTokens.EntityHandle(token), place);
        }
    }

    private void CheckHandle(EntityHandle handle, string place)
    {
        if (handle.IsNil)
        {
            return;
        }

        switch (handle.Kind)
        {
            case HandleKind.TypeReference:
                AddIfBroken(_probe.GetTypeFromReference(_reader, (TypeReferenceHandle)handle, 0), place, Name(handle));
                break;
            case HandleKind.TypeSpecification:
                AddIfBroken(_probe.GetTypeFromSpecification(_reader, null, (TypeSpecificationHandle)handle, 0), place, "type");
                break;
            case HandleKind.MethodSpecification:
                Add(Rule.GenericUse, place, "call of a generic method");
                break;
            case HandleKind.MemberReference:
                CheckMember(_reader.GetMemberReference((MemberReferenceHandle)handle), place);
                break;
            default:
                break;
        }
    }

    private void CheckMember(MemberReference member, string place)
    {
        CheckHandle(member.Parent, place);
        if (member.GetKind() == MemberReferenceKind.Method)
        {
            CheckSignature(member.DecodeMethodSignature(_probe, null), place);
        }
        else
        {
            AddIfBroken(member.DecodeFieldSignature(_probe, null), place, _reader.GetString(member.Name));
        }
    }

    private void CheckSignature(MethodSignature<string?> signature, string place)
    {
        AddIfBroken(signature.ReturnType, place, "return type");
        foreach (string? parameter in signature.ParameterTypes)
        {
            AddIfBroken(parameter, place, "parameter");
        }
    }

    private string Name(EntityHandle handle) =>
        _reader.GetString(_reader.GetTypeReference((TypeReferenceHandle)handle).Name);

    private void AddIfBroken(string? rule, string place, string detail)
    {
        if (rule is not null)
        {
            Add(rule, place, detail);
        }
    }

    private void Add(string rule, string place, string detail)
    {
        var finding = new Finding(rule, place, detail);
        if (!_findings.Contains(finding))
        {
            _findings.Add(finding);
        }
    }
}
