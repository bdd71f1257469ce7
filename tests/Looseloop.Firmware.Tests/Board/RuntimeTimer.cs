namespace Looseloop.Firmware.Tests.Board;

/// <summary>
/// What the runtime makes of a request on the ESP32 family: whole hertz, which read back as they were asked, become the duty
/// bits and divider that its timer can do, and the duty is cut off twice (nf-interpreter, ESP32 PWM).
/// </summary>
internal readonly record struct RuntimeTimer(int DutyBits, long Divider, long DutyCount)
{
    private const long ClockParts = 80_000_000L * 256;

    public static RuntimeTimer Of(int requestHz, double duty, int mostBits)
    {
        int bits = mostBits;
        while (ClockParts / requestHz / (1L << bits) <= 256)
        {
            bits--;
        }

        long counts = requestHz * (1L << bits);
        return new RuntimeTimer(bits, (ClockParts + (counts / 2)) / counts, (1L << bits) * (uint)(duty * 10000) / 10000);
    }
}
