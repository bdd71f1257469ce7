using System.Reflection;

[assembly: AssemblyVersion("1.1.139.0")]

namespace System.IO.Ports
{
    /// <summary>
    /// The shape of the library's class as far as the firmware may use it, for the check build. What the firmware must not
    /// use (ReadLine, WriteLine, ReadExisting, BaseStream, the events) is not here.
    /// </summary>
    public sealed class SerialPort : IDisposable
    {
        public SerialPort(
            string portName, int baudRate = 9600, Parity parity = Parity.None, int dataBits = 8, StopBits stopBits = StopBits.One)
        {
        }

        public int BaudRate { get; set; }

        public int DataBits { get; set; }

        public Handshake Handshake { get; set; }

        public Parity Parity { get; set; }

        public StopBits StopBits { get; set; }

        public int ReadTimeout { get; set; }

        public int WriteTimeout { get; set; }

        public int ReadBufferSize { get; set; }

        public int WriteBufferSize { get; set; }

        public int BytesToRead
        {
            get { return 0; }
        }

        public bool IsOpen
        {
            get { return false; }
        }

        public void Open()
        {
        }

        public void Close()
        {
        }

        public void Dispose()
        {
        }

        public int Read(byte[] buffer, int offset, int count)
        {
            return 0;
        }

        public void Write(byte[] buffer, int offset, int count)
        {
        }
    }

    public enum Handshake
    {
        None,
        XOnXOff,
        RequestToSend,
        RequestToSendXOnXOff,
    }

    public enum Parity
    {
        None = 0,
        Odd = 1,
        Even = 2,
    }

    public enum StopBits
    {
        One = 1,
        Two = 2,
        OnePointFive = 3,
    }
}
