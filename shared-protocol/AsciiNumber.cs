namespace Looseloop.Protocol
{
    /// <summary>Integers to and from decimal ASCII digits, without allocating.</summary>
    public static class AsciiNumber
    {
        /// <summary>Digits that a value takes, its minus sign counted.</summary>
        public static int Digits(long value)
        {
            int digits = value < 0 ? 2 : 1;
            while (value >= 10 || value <= -10)
            {
                value /= 10;
                digits++;
            }

            return digits;
        }

        /// <summary>Writes a value into exactly the <paramref name="digits"/> bytes that <see cref="Digits"/> gave for it.</summary>
        public static void Write(long value, byte[] buffer, int offset, int digits)
        {
            bool negative = value < 0;
            for (int i = offset + digits - 1; i >= offset + (negative ? 1 : 0); i--)
            {
                int digit = (int)(value % 10);
                buffer[i] = (byte)('0' + (digit < 0 ? -digit : digit));
                value /= 10;
            }

            if (negative)
            {
                buffer[offset] = (byte)'-';
            }
        }

        /// <summary>
        /// Reads a whole field. Refused: an empty field, anything but digits after an optional minus sign,
        /// a leading zero before another digit, and what does not fit 18 digits.
        /// </summary>
        public static bool TryRead(byte[] buffer, int offset, int count, out long value)
        {
            value = 0;
            bool negative = count > 0 && buffer[offset] == (byte)'-';
            int first = negative ? offset + 1 : offset;
            int digits = offset + count - first;
            if (digits < 1 || digits > 18 || (buffer[first] == (byte)'0' && (digits > 1 || negative)))
            {
                return false;
            }

            for (int i = first; i < first + digits; i++)
            {
                int digit = buffer[i] - '0';
                if (digit < 0 || digit > 9)
                {
                    return false;
                }

                value = value * 10 + digit;
            }

            if (negative)
            {
                value = -value;
            }

            return true;
        }
    }
}
