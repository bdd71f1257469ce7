namespace Looseloop.Protocol
{
    /// <summary>
    /// Takes one received line apart, field by field, without allocating. Whatever stands before the last mark of the
    /// line is noise from before the sender began, and is skipped; then the checksum decides.
    /// </summary>
    public sealed class LineReader
    {
        private const int ShortestLine = 8; // mark, digit, space, letter... and the checksum

        private byte[] _line;
        private int _end;
        private int _next;
        private int _wordStart;
        private int _wordCount;

        /// <summary>Opens a line without its newline. A trailing carriage return is allowed.</summary>
        /// <returns>True if the line has the mark and its checksum is right.</returns>
        public bool Open(byte[] line, int count, byte mark)
        {
            if (count > 0 && line[count - 1] == (byte)'\r')
            {
                count--;
            }

            int start = count - 1;
            while (start >= 0 && line[start] != mark)
            {
                start--;
            }

            if (start < 0 || count - start < ShortestLine || line[count - 5] != (byte)' ')
            {
                return false;
            }

            int expected = 0;
            for (int i = count - 4; i < count; i++)
            {
                int digit = HexDigit(line[i]);
                if (digit < 0)
                {
                    return false;
                }

                expected = (expected << 4) | digit;
            }

            _line = line;
            _end = count - 5;
            _next = start + 1;
            return Crc16.Of(line, start, _end - start) == expected;
        }

        /// <summary>True if fields are left.</summary>
        public bool More
        {
            get { return _next < _end; }
        }

        /// <summary>Takes the next field as a whole number within bounds.</summary>
        public bool TryNumber(long lowest, long highest, out long value)
        {
            value = 0;
            return TakeField()
                && AsciiNumber.TryRead(_line, _wordStart, _wordCount, out value)
                && value >= lowest
                && value <= highest;
        }

        /// <summary>Takes the next field as a word, to be compared with <see cref="WordIs"/>.</summary>
        public bool TryWord()
        {
            return TakeField();
        }

        /// <summary>True if the field just taken is this word.</summary>
        public bool WordIs(string word)
        {
            if (word.Length != _wordCount)
            {
                return false;
            }

            for (int i = 0; i < _wordCount; i++)
            {
                if (_line[_wordStart + i] != (byte)word[i])
                {
                    return false;
                }
            }

            return true;
        }

        /// <summary>The field just taken, as text. Allocates: for the host only.</summary>
        public string WordText()
        {
            var letters = new char[_wordCount];
            for (int i = 0; i < _wordCount; i++)
            {
                letters[i] = (char)_line[_wordStart + i];
            }

            return new string(letters);
        }

        private bool TakeField()
        {
            if (_next >= _end)
            {
                return false;
            }

            _wordStart = _next;
            while (_next < _end && _line[_next] != (byte)' ')
            {
                _next++;
            }

            _wordCount = _next - _wordStart;
            _next++; // the space
            return _wordCount > 0;
        }

        private static int HexDigit(byte c)
        {
            if (c >= (byte)'0' && c <= (byte)'9')
            {
                return c - '0';
            }

            return c >= (byte)'A' && c <= (byte)'F' ? c - 'A' + 10 : -1;
        }
    }
}
