using nanoFramework.Hardware.Esp32;

namespace Looseloop.Firmware
{
    /// <summary>Which pins, port and converter channels a board uses. firmware/README.md shows them as a table.</summary>
    public sealed class PinMap
    {
        /// <summary>In place of a converter channel: the input is not fitted.</summary>
        public const int NotFitted = -1;

        private const int DetectorAdc = 6;
        private const int DirectAdc = 7;
        private const int ThermistorAdc = 4;

        private PinMap(string board, int mostDutyBits, string portName, bool hasDirect, bool hasThermistor)
        {
            Board = board;
            MostDutyBits = mostDutyBits;
            PortName = portName;
            DrivePin = 18;
            DetectorChannel = DetectorAdc;
            DirectChannel = hasDirect ? DirectAdc : NotFitted;
            ThermistorChannel = hasThermistor ? ThermistorAdc : NotFitted;
        }

        public string Board { get; }

        public int MostDutyBits { get; }

        public string PortName { get; }

        /// <summary>True if the port's pins have to be assigned; otherwise they are the board's own.</summary>
        public bool AssignsPort { get; private set; }

        public int TransmitPin { get; private set; }

        public int ReceivePin { get; private set; }

        public DeviceFunction TransmitFunction { get; private set; }

        public DeviceFunction ReceiveFunction { get; private set; }

        /// <summary>The drive pin, on PWM1.</summary>
        public int DrivePin { get; }

        public int DetectorChannel { get; }

        public int DirectChannel { get; }

        public int ThermistorChannel { get; }

        /// <summary>Classic ESP32: COM2 through a USB-TTL adapter, because the debugger has COM1.</summary>
        public static PinMap Esp32(bool hasDirect, bool hasThermistor)
        {
            var map = new PinMap("esp32", 19, "COM2", hasDirect, hasThermistor);
            map.AssignsPort = true;
            map.TransmitPin = 17;
            map.TransmitFunction = DeviceFunction.COM2_TX;
            map.ReceivePin = 16;
            map.ReceiveFunction = DeviceFunction.COM2_RX;
            return map;
        }

        /// <summary>ESP32-S3 board with two USB sockets: COM1 on its USB-UART bridge, the debugger on the other socket.</summary>
        public static PinMap Esp32S3(bool hasDirect, bool hasThermistor)
        {
            return new PinMap("esp32-s3", 13, "COM1", hasDirect, hasThermistor);
        }
    }
}
