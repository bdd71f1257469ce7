using System.Collections.Immutable;
using System.Reflection.Metadata;

namespace Looseloop.Firmware.Tests.Gate;

/// <summary>Decodes signatures only to see what is in them; each part decodes to the rule that it breaks, or to null.</summary>
internal sealed class SignatureProbe : ISignatureTypeProvider<string?, object?>
{
    public string? GetArrayType(string? elementType, ArrayShape shape) => Rule.MultiDimensionalArray;

    public string? GetSZArrayType(string? elementType) => elementType;

    public string? GetByReferenceType(string? elementType) => elementType;

    public string? GetFunctionPointerType(MethodSignature<string?> signature) => Rule.FunctionPointer;

    public string? GetGenericInstantiation(string? genericType, ImmutableArray<string?> typeArguments) => Rule.GenericUse;

    public string? GetGenericMethodParameter(object? genericContext, int index) => Rule.GenericUse;

    public string? GetGenericTypeParameter(object? genericContext, int index) => Rule.GenericUse;

    public string? GetModifiedType(string? modifier, string? unmodifiedType, bool isRequired) => modifier ?? unmodifiedType;

    public string? GetPinnedType(string? elementType) => Rule.Pinned;

    public string? GetPointerType(string? elementType) => Rule.Pointer;

    public string? GetPrimitiveType(PrimitiveTypeCode typeCode) =>
        typeCode == PrimitiveTypeCode.TypedReference ? Rule.TypedReference : null;

    public string? GetTypeFromDefinition(MetadataReader reader, TypeDefinitionHandle handle, byte rawTypeKind) => null;

    public string? GetTypeFromReference(MetadataReader reader, TypeReferenceHandle handle, byte rawTypeKind) =>
        reader.GetString(reader.GetTypeReference(handle).Name).Contains('`') ? Rule.GenericUse : null;

    public string? GetTypeFromSpecification(MetadataReader reader, object? genericContext, TypeSpecificationHandle handle, byte rawTypeKind) =>
        reader.GetTypeSpecification(handle).DecodeSignature(this, genericContext);
}
