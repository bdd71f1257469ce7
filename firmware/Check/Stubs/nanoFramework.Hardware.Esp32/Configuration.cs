using System;
using System.Reflection;

[assembly: AssemblyVersion("1.6.40.0")]

namespace nanoFramework.Hardware.Esp32
{
    /// <summary>The shape of the library's class, for the check build. The board has the real one.</summary>
    public class Configuration
    {
        public static void SetPinFunction(int pin, DeviceFunction value)
        {
        }

        public static int GetFunctionPin(DeviceFunction function)
        {
            return 0;
        }
    }

    /// <summary>The functions that the firmware gives to pins.</summary>
    public enum DeviceFunction
    {
        COM1_TX = 0x30100,
        COM1_RX = 0x30101,
        COM2_TX = 0x30200,
        COM2_RX = 0x30201,
        PWM1 = 0x40100,
    }

    public class HighResTimer : IDisposable
    {
        public static ulong GetCurrent()
        {
            return 0;
        }

        public void Dispose()
        {
        }
    }
}
