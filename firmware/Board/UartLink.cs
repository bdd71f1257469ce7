using System;
using System.IO.Ports;
using nanoFramework.Hardware.Esp32;

namespace Looseloop.Firmware
{
    /// <summary>The serial line to the host. The pitfalls of the runtime's port that this class avoids are in firmware/README.md.</summary>
    public sealed class UartLink : ILink
    {
        private const int Baud = 115200;
        private const int BytesPerPiece = 128;
        private const int Pieces = 4;
        private const int UsPerByte = 87; // ten bits, rounded up

        private readonly SerialPort _port;
        private readonly BoardClock _clock;

        // The port may read a buffer after Write has returned: a line is copied into pieces, and a piece is written again
        // only when the wire must have had its last byte.
        private readonly byte[][] _pieces = new byte[Pieces][];
        private readonly long[] _drainedUs = new long[Pieces];
        private int _next;
        private long _wireFreeUs;

        public UartLink(PinMap pins, BoardClock clock)
        {
            _clock = clock;
            for (int i = 0; i < Pieces; i++)
            {
                _pieces[i] = new byte[BytesPerPiece];
            }

            if (pins.AssignsPort)
            {
                Configuration.SetPinFunction(pins.TransmitPin, pins.TransmitFunction);
                Configuration.SetPinFunction(pins.ReceivePin, pins.ReceiveFunction);
            }

            _port = new SerialPort(pins.PortName, Baud);
            _port.ReadTimeout = 20;
            _port.WriteTimeout = 200;
            _port.Open();
        }

        public int Receive(byte[] buffer)
        {
            int count = _port.BytesToRead;
            if (count <= 0)
            {
                return 0;
            }

            // Never more than is there: Read would wait for the rest.
            return _port.Read(buffer, 0, count < buffer.Length ? count : buffer.Length);
        }

        public void Send(byte[] buffer, int count)
        {
            for (int sent = 0; sent < count;)
            {
                int size = count - sent < BytesPerPiece ? count - sent : BytesPerPiece;
                SendPiece(buffer, sent, size);
                sent += size;
            }
        }

        public void Close()
        {
            _port.Close();
            _port.Dispose();
        }

        private void SendPiece(byte[] buffer, int offset, int size)
        {
            byte[] piece = _pieces[_next];
            _clock.WaitUntilUs(_drainedUs[_next]);
            Array.Copy(buffer, offset, piece, 0, size);
            _port.Write(piece, 0, size);
            long nowUs = _clock.NowUs();
            _wireFreeUs = (_wireFreeUs > nowUs ? _wireFreeUs : nowUs) + size * UsPerByte;
            _drainedUs[_next] = _wireFreeUs;
            _next = _next + 1 == Pieces ? 0 : _next + 1;
        }
    }
}
