using System;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Looseloop.Refused
{
    public static class Allowed
    {
        public static int Sum(int[] values, ref int more, out string text)
        {
            int sum = more;
            foreach (int value in values)
            {
                sum += value;
            }

            int[][] jagged = new int[2][];
            jagged[0] = values;
            Action done = () => sum++;
            done();
            text = sum > 3 ? "many" : "few";
            return sum + jagged[0].Length;
        }
    }

    public class GenericType<T>
    {
        public T Value;
    }

    public static class GenericMethod
    {
        public static T Same<T>(T value)
        {
            return value;
        }
    }

    public static class GenericCall
    {
        public static int Do()
        {
            return GenericMethod.Same(1);
        }
    }

    public static class GenericField
    {
        public static GenericType<int> Field;
    }

    public static class GenericLocal
    {
        public static bool Do()
        {
            var value = new GenericType<int>();
            return value.Value == 0;
        }
    }

    public static class TwoDimensions
    {
        public static int Do()
        {
            var table = new int[2, 2];
            return table[1, 1];
        }
    }

    public static class PointerParameter
    {
        public static unsafe int Do(int* value)
        {
            return *value;
        }
    }

    public static class PinnedLocal
    {
        public static unsafe int Do(byte[] bytes)
        {
            fixed (byte* first = bytes)
            {
                return *first;
            }
        }
    }

    public static class StackAllocation
    {
        public static unsafe int Do()
        {
            byte* bytes = stackalloc byte[8];
            return bytes[0];
        }
    }

    public static class FunctionPointer
    {
        public static unsafe int Do(delegate*<int> call)
        {
            return call();
        }
    }

    public static class CheckedAddition
    {
        public static int Do(int a, int b)
        {
            return checked(a + b);
        }
    }

    public static class CheckedConversion
    {
        public static byte Do(int a)
        {
            return checked((byte)a);
        }
    }

    public interface InterfaceBody
    {
        int Do()
        {
            return 1;
        }
    }

    public static class InternalCall
    {
        [MethodImpl(MethodImplOptions.InternalCall)]
        public static extern int Do();
    }

    public static class PlatformCall
    {
        [DllImport("library")]
        public static extern int Do();
    }
}

namespace System.Runtime.InteropServices
{
    // The boards' library has no such attribute; the compiler goes by its name.
    [AttributeUsage(AttributeTargets.Method)]
    public sealed class DllImportAttribute : Attribute
    {
        public DllImportAttribute(string dllName)
        {
        }
    }
}
