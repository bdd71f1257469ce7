namespace Looseloop.Protocol
{
    /// <summary>
    /// CRC-16/CCITT-FALSE: polynomial 0x1021, start 0xFFFF, no reflection, no final inversion.
    /// Check value 0x29B1 for the ASCII text "123456789".
    /// </summary>
    public static class Crc16
    {
        public const int Start = 0xFFFF;

        private static readonly ushort[] Table = MakeTable();

        /// <summary>The checksum of <paramref name="count"/> bytes from <paramref name="offset"/>, 0..65535.</summary>
        public static int Of(byte[] bytes, int offset, int count)
        {
            int crc = Start;
            for (int i = offset; i < offset + count; i++)
            {
                crc = ((crc << 8) ^ Table[((crc >> 8) ^ bytes[i]) & 0xFF]) & 0xFFFF;
            }

            return crc;
        }

        private static ushort[] MakeTable()
        {
            var table = new ushort[256];
            for (int high = 0; high < 256; high++)
            {
                int crc = high << 8;
                for (int bit = 0; bit < 8; bit++)
                {
                    crc = (crc & 0x8000) != 0 ? (crc << 1) ^ 0x1021 : crc << 1;
                }

                table[high] = (ushort)crc;
            }

            return table;
        }
    }
}
