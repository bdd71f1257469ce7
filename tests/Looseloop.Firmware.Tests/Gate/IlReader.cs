using System.Reflection;
using System.Reflection.Emit;
using System.Reflection.Metadata;

namespace Looseloop.Firmware.Tests.Gate;

/// <summary>Walks through the instructions of a method body.</summary>
internal static class IlReader
{
    private static readonly Dictionary<int, OpCode> _known = typeof(OpCodes)
        .GetFields(BindingFlags.Public | BindingFlags.Static)
        .Select(field => (OpCode)field.GetValue(null)!)
        .ToDictionary(code => (int)(ushort)code.Value);

    /// <summary>Each instruction with its operand if that is a token, else 0.</summary>
    public static IEnumerable<(OpCode Code, int Token)> Read(byte[] il)
    {
        for (int i = 0; i < il.Length;)
        {
            int value = il[i++];
            if (value == 0xFE)
            {
                value = 0xFE00 | il[i++];
            }

            OpCode code = _known[value];
            int token = 0;
            switch (code.OperandType)
            {
                case OperandType.InlineNone:
                    break;
                case OperandType.ShortInlineBrTarget or OperandType.ShortInlineI or OperandType.ShortInlineVar:
                    i += 1;
                    break;
                case OperandType.InlineVar:
                    i += 2;
                    break;
                case OperandType.InlineI8 or OperandType.InlineR:
                    i += 8;
                    break;
                case OperandType.InlineSwitch:
                    i += 4 + (4 * BitConverter.ToInt32(il, i));
                    break;
                case OperandType.InlineField or OperandType.InlineMethod or OperandType.InlineSig
                    or OperandType.InlineTok or OperandType.InlineType:
                    token = BitConverter.ToInt32(il, i);
                    i += 4;
                    break;
                default:
                    i += 4;
                    break;
            }

            yield return (code, token);
        }
    }
}
