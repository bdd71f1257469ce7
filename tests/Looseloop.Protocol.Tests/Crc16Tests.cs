using System.Text;
using Looseloop.Protocol;

namespace Looseloop.Protocol.Tests;

public class Crc16Tests
{
    // Catalogue check value of CRC-16/CCITT-FALSE (also listed as CRC-16/IBM-3740).
    [Fact]
    public void Check_value_is_29B1()
    {
        byte[] text = Encoding.ASCII.GetBytes("123456789");
        Assert.Equal(0x29B1, Crc16.Of(text, 0, text.Length));
    }

    [Fact]
    public void Every_single_bit_error_in_a_line_is_seen()
    {
        byte[] text = Encoding.ASCII.GetBytes("<17 12 point 3 9 267 256 64 91234 130061234 1411 1440 123456789");
        int good = Crc16.Of(text, 0, text.Length);
        for (int bit = 0; bit < text.Length * 8; bit++)
        {
            text[bit / 8] ^= (byte)(1 << (bit % 8));
            Assert.NotEqual(good, Crc16.Of(text, 0, text.Length));
            text[bit / 8] ^= (byte)(1 << (bit % 8));
        }
    }
}
