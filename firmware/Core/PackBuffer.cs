using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Gathers the points of one `pack` line, as many as the line will hold.</summary>
    internal sealed class PackBuffer
    {
        // Mark, two counters of five digits, the word, an index and a sample count of five digits, checksum, newline.
        private const int FrameBytes = 1 + 5 + 6 + 5 + 6 + 6 + 5 + 1;

        private readonly long[] _sum = new long[WireLimits.PointsPerPack];
        private readonly int[] _smallest = new int[WireLimits.PointsPerPack];
        private readonly int[] _largest = new int[WireLimits.PointsPerPack];
        private int _firstIndex;
        private int _samples;
        private long _firstUs;
        private long _lastUs;
        private int _bytes;

        public int Count { get; private set; }

        /// <summary>True if the point in the sampler would still fit the line.</summary>
        public bool HasRoomFor(Sampler point)
        {
            int timeBytes = 2 * (1 + AsciiNumber.Digits(point.MiddleUs));
            return Count < WireLimits.PointsPerPack
                && FrameBytes + timeBytes + _bytes + BytesOf(point) <= WireLimits.BoxLineBytes;
        }

        public void Add(int index, Sampler point)
        {
            if (Count == 0)
            {
                _firstIndex = index;
                _samples = point.Samples;
                _firstUs = point.MiddleUs;
            }

            _sum[Count] = point.Sum;
            _smallest[Count] = point.Smallest;
            _largest[Count] = point.Largest;
            _lastUs = point.MiddleUs;
            _bytes += BytesOf(point);
            Count++;
        }

        public void Clear()
        {
            Count = 0;
            _bytes = 0;
        }

        public void Write(LineWriter writer)
        {
            writer.Number(_firstIndex);
            writer.Number(_samples);
            writer.Number(_firstUs);
            writer.Number(_lastUs);
            for (int i = 0; i < Count; i++)
            {
                writer.Number(_sum[i]);
                writer.Number(_smallest[i]);
                writer.Number(_largest[i]);
            }
        }

        private static int BytesOf(Sampler point)
        {
            return 3 + AsciiNumber.Digits(point.Sum) + AsciiNumber.Digits(point.Smallest) + AsciiNumber.Digits(point.Largest);
        }
    }
}
