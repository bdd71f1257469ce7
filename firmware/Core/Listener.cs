using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Takes bytes off the link and gives back one line at a time, so that a flood costs each step the same.</summary>
    internal sealed class Listener
    {
        // One line more than the longest may hold: the carriage return that is ignored before the newline.
        private readonly LineCollector _lines = new LineCollector(WireLimits.HostLineBytes);
        private readonly byte[] _received = new byte[256];
        private readonly ILink _link;
        private int _count;
        private int _next;

        public Listener(ILink link)
        {
            _link = link;
        }

        public byte[] Line
        {
            get { return _lines.Line; }
        }

        public int Count
        {
            get { return _lines.Count; }
        }

        public bool LineWasTooLong
        {
            get
            {
                return _lines.WasTooLong
                    || (_lines.Count == WireLimits.HostLineBytes && _lines.Line[_lines.Count - 1] != (byte)'\r');
            }
        }

        /// <returns>True if a line has ended; it stays valid until the next call.</returns>
        public bool Poll()
        {
            if (_next >= _count)
            {
                _next = 0;
                _count = 0;
                _count = _link.Receive(_received);
            }

            while (_next < _count)
            {
                if (_lines.Add(_received[_next++]))
                {
                    return true;
                }
            }

            return false;
        }
    }
}
