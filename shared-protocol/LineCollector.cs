namespace Looseloop.Protocol
{
    /// <summary>Gathers received bytes until a newline, in a buffer of its own, without allocating.</summary>
    public sealed class LineCollector
    {
        private readonly byte[] _line;
        private int _count;
        private bool _tooLong;

        public LineCollector(int longestLineBytes)
        {
            _line = new byte[longestLineBytes];
        }

        /// <summary>The line gathered, without its newline, valid until the next byte is added.</summary>
        public byte[] Line
        {
            get { return _line; }
        }

        public int Count { get; private set; }

        /// <summary>True if the line just ended was longer than the buffer: its contents are then worth nothing.</summary>
        public bool WasTooLong { get; private set; }

        /// <summary>Adds a byte.</summary>
        /// <returns>True if it ended a line; empty lines are passed over.</returns>
        public bool Add(byte value)
        {
            if (value != (byte)'\n')
            {
                if (_count < _line.Length)
                {
                    _line[_count++] = value;
                }
                else
                {
                    _tooLong = true;
                }

                return false;
            }

            Count = _count;
            WasTooLong = _tooLong;
            _count = 0;
            _tooLong = false;
            return Count > 0;
        }

        /// <summary>Forgets a half-gathered line, after a reconnect.</summary>
        public void Clear()
        {
            _count = 0;
            _tooLong = false;
        }
    }
}
