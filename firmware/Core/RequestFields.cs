using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>The fields of the host line being handled.</summary>
    internal sealed class RequestFields
    {
        private const int LargestDivider = 1023 * FrequencyGrid.DividerScale;

        private readonly LineReader _reader = new LineReader();

        /// <summary>True if fields are left.</summary>
        public bool More
        {
            get { return _reader.More; }
        }

        public bool Open(byte[] line, int count)
        {
            return _reader.Open(line, count, LineWriter.HostMark);
        }

        public bool TakeWord()
        {
            return _reader.TryWord();
        }

        /// <summary>True if the word just taken is this one.</summary>
        public bool Is(string word)
        {
            return _reader.WordIs(word);
        }

        /// <summary>Takes a number within bounds.</summary>
        public bool Take(int lowest, int highest, out int value)
        {
            bool good = _reader.TryNumber(lowest, highest, out long wide);
            value = (int)wide;
            return good;
        }

        public bool TakeDutyBits(out int value)
        {
            return Take(1, FrequencyGrid.Esp32DutyBits, out value);
        }

        public bool TakeDivider(out int value)
        {
            return Take(1, LargestDivider, out value);
        }

        public bool TakeStride(out int value)
        {
            return Take(-LargestDivider, LargestDivider, out value);
        }

        public bool TakeDutyCount(out int value)
        {
            return Take(1, (1 << FrequencyGrid.Esp32DutyBits) - 1, out value);
        }
    }
}
