namespace Looseloop.Firmware.Tests.Gate;

/// <summary>What the gate refuses. None of it is caught by compiling against the boards' mscorlib.</summary>
internal static class Rule
{
    public const string GenericDefinition = "generic definition";
    public const string GenericUse = "generic use";
    public const string MultiDimensionalArray = "multi-dimensional array";
    public const string Pointer = "pointer";
    public const string Pinned = "pinned local";
    public const string FunctionPointer = "function pointer";
    public const string TypedReference = "typed reference";
    public const string InterfaceBody = "interface method with a body";
    public const string NativeMethod = "native method";
    public const string OpCode = "opcode";
    public const string AssemblyReference = "assembly reference";
}
