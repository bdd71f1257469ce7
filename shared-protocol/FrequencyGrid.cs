namespace Looseloop.Protocol
{
    /// <summary>
    /// The settings that the LEDC timers of ESP32, S2, S3 and C3 can really make, in whole-number arithmetic.
    /// A timer counts an 80 MHz clock through a divider held in 1/256 and makes 2^dutyBits counts a period:
    /// frequency = 80e6 * 256 / (divider * 2^dutyBits). The runtime chooses dutyBits and divider from a request in
    /// whole hertz; the functions below are that choice (nf-interpreter, LEDC code of the ESP32 target) and its inverse.
    /// </summary>
    public static class FrequencyGrid
    {
        public const long ClockHz = 80000000;
        public const int DividerScale = 256;

        /// <summary>Duty bits of the classic ESP32's timers.</summary>
        public const int Esp32DutyBits = 19;

        /// <summary>Duty bits of the timers of S2, S3 and C3.</summary>
        public const int S3DutyBits = 13;

        /// <summary>The runtime takes the most duty bits that keep the divider above this.</summary>
        private const long SmallestDivider = 256;

        private const long ScaledClock = ClockHz * DividerScale;

        /// <summary>Duty is handed over in parts of this, cut off, before it becomes a count.</summary>
        private const int DutyParts = 10000;

        /// <summary>The duty bits chosen for a request of whole hertz, 1 or more.</summary>
        public static int DutyBits(long requestHz, int mostDutyBits)
        {
            int bits = mostDutyBits;
            while (bits > 1 && ScaledClock / requestHz / (1L << bits) <= SmallestDivider)
            {
                bits--;
            }

            return bits;
        }

        /// <summary>The divider, in 1/256, chosen for a request of whole hertz.</summary>
        public static int Divider(long requestHz, int dutyBits)
        {
            long product = requestHz << dutyBits;
            return (int)((ScaledClock + product / 2) / product);
        }

        /// <summary>The whole hertz to request for a setting: its frequency, rounded to nearest.</summary>
        public static int RequestHz(int dutyBits, int divider)
        {
            long product = (long)divider << dutyBits;
            return (int)((ScaledClock + product / 2) / product);
        }

        /// <summary>The frequency of a setting in hertz, correctly rounded from the exact rational.</summary>
        public static double FrequencyHz(int dutyBits, int divider)
        {
            return (double)ScaledClock / (double)((long)divider << dutyBits);
        }

        /// <summary>True if requesting <see cref="RequestHz"/> makes exactly this setting.</summary>
        public static bool IsRealisable(int dutyBits, int divider, int mostDutyBits)
        {
            if (dutyBits < 1 || dutyBits > mostDutyBits || divider < 1 || divider > 1023 * DividerScale)
            {
                return false;
            }

            long request = RequestHz(dutyBits, divider);
            return request > 0
                && DutyBits(request, mostDutyBits) == dutyBits
                && Divider(request, dutyBits) == divider;
        }

        /// <summary>
        /// Steps to the next setting above in frequency. Where two settings share a frequency (an octave boundary)
        /// the one that <see cref="RequestHz"/> reaches is taken.
        /// </summary>
        public static void StepUp(ref int dutyBits, ref int divider, int mostDutyBits)
        {
            Step(ref dutyBits, ref divider, mostDutyBits, -1);
        }

        /// <summary>Steps to the next setting below in frequency.</summary>
        public static void StepDown(ref int dutyBits, ref int divider, int mostDutyBits)
        {
            Step(ref dutyBits, ref divider, mostDutyBits, 1);
        }

        /// <summary>The realisable setting nearest to a frequency in hertz.</summary>
        public static void Nearest(double frequencyHz, int mostDutyBits, out int dutyBits, out int divider)
        {
            long request = (long)(frequencyHz + 0.5);
            int bits = DutyBits(request, mostDutyBits);
            int at = Divider(request, bits);
            Settle(ref bits, ref at, mostDutyBits);
            dutyBits = bits;
            divider = at;
            double best = Distance(bits, at, frequencyHz);
            for (int direction = -1; direction <= 1; direction += 2)
            {
                int otherBits = bits;
                int other = at;
                Step(ref otherBits, ref other, mostDutyBits, direction);
                double distance = Distance(otherBits, other, frequencyHz);
                if (distance < best)
                {
                    best = distance;
                    dutyBits = otherBits;
                    divider = other;
                }
            }
        }

        /// <summary>
        /// The duty to ask for, 0..1, so that <paramref name="count"/> of 2^dutyBits comes out of the runtime's two
        /// truncations (to 1/10000, then to a count). Exact for every count up to 13 duty bits.
        /// </summary>
        public static double AskedDuty(int count, int dutyBits)
        {
            int steps = 1 << dutyBits;
            long parts = ((long)count * DutyParts + steps - 1) / steps;
            return (parts + 0.5) / DutyParts;
        }

        /// <summary>The duty count nearest to a wanted duty, at least 1 and below a whole period.</summary>
        public static int DutyCount(double duty, int dutyBits)
        {
            int steps = 1 << dutyBits;
            int count = (int)(duty * steps + 0.5);
            if (count < 1)
            {
                return 1;
            }

            return count >= steps ? steps - 1 : count;
        }

        private static void Step(ref int dutyBits, ref int divider, int mostDutyBits, int direction)
        {
            double from = FrequencyHz(dutyBits, divider);
            do
            {
                divider += direction;
                if (divider <= SmallestDivider)
                {
                    // One octave up, in the finer half of the next smaller number of duty bits.
                    dutyBits--;
                    divider = 2 * (divider + 1) - 1;
                }

                Settle(ref dutyBits, ref divider, mostDutyBits);
            }
            while (FrequencyHz(dutyBits, divider) == from);
        }

        private static void Settle(ref int dutyBits, ref int divider, int mostDutyBits)
        {
            long request = RequestHz(dutyBits, divider);
            dutyBits = DutyBits(request, mostDutyBits);
            divider = Divider(request, dutyBits);
        }

        private static double Distance(int dutyBits, int divider, double frequencyHz)
        {
            double distance = FrequencyHz(dutyBits, divider) - frequencyHz;
            return distance < 0 ? -distance : distance;
        }
    }
}
