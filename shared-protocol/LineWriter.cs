namespace Looseloop.Protocol
{
    /// <summary>
    /// Builds one line in a buffer of its own, without allocating: mark, numbers, words, checksum, newline.
    /// A line that would not fit is not sent short: <see cref="End"/> returns 0.
    /// </summary>
    public sealed class LineWriter
    {
        public const byte HostMark = (byte)'>';
        public const byte BoxMark = (byte)'<';

        private const int TailBytes = 6; // space, four hex digits, newline

        private readonly byte[] _buffer;
        private int _length;
        private bool _tooLong;

        public LineWriter(int longestLineBytes)
        {
            _buffer = new byte[longestLineBytes];
        }

        /// <summary>The line, valid in its first <see cref="Length"/> bytes.</summary>
        public byte[] Buffer
        {
            get { return _buffer; }
        }

        public int Length
        {
            get { return _length; }
        }

        /// <summary>Bytes that may still be added before the checksum.</summary>
        public int Room
        {
            get { return _buffer.Length - TailBytes - _length; }
        }

        /// <summary>Starts a line from the host: its mark and the number of the request.</summary>
        public void BeginHost(int requestNumber)
        {
            Begin(HostMark, requestNumber);
        }

        /// <summary>Starts a line from the box: its mark, its own number and that of the request it answers (0: none).</summary>
        public void BeginBox(int lineNumber, int requestNumber)
        {
            Begin(BoxMark, lineNumber);
            Number(requestNumber);
        }

        /// <summary>Adds a space and a word of printable ASCII without spaces.</summary>
        public void Word(string word)
        {
            int count = word.Length;
            if (count + 1 > Room)
            {
                _tooLong = true;
                return;
            }

            _buffer[_length++] = (byte)' ';
            for (int i = 0; i < count; i++)
            {
                _buffer[_length++] = (byte)word[i];
            }
        }

        /// <summary>Adds a space and a decimal number.</summary>
        public void Number(long value)
        {
            int digits = AsciiNumber.Digits(value);
            if (digits + 1 > Room)
            {
                _tooLong = true;
                return;
            }

            _buffer[_length++] = (byte)' ';
            AsciiNumber.Write(value, _buffer, _length, digits);
            _length += digits;
        }

        /// <summary>Adds checksum and newline.</summary>
        /// <returns>The length of the line in bytes, or 0 if it did not fit.</returns>
        public int End()
        {
            if (_tooLong)
            {
                _length = 0;
                return 0;
            }

            int crc = Crc16.Of(_buffer, 0, _length);
            _buffer[_length++] = (byte)' ';
            for (int shift = 12; shift >= 0; shift -= 4)
            {
                int digit = (crc >> shift) & 0xF;
                _buffer[_length++] = (byte)(digit < 10 ? '0' + digit : 'A' + digit - 10);
            }

            _buffer[_length++] = (byte)'\n';
            return _length;
        }

        private void Begin(byte mark, int number)
        {
            _length = 0;
            _tooLong = false;
            _buffer[_length++] = mark;
            int digits = AsciiNumber.Digits(number);
            AsciiNumber.Write(number, _buffer, _length, digits);
            _length += digits;
        }
    }
}
