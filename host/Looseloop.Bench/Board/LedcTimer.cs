namespace Looseloop.Bench.Board;

/// <summary>
/// The timer of the ESP32 family as its runtime sets it from a request, in the bench's own words: it counts ticks of an
/// 80 MHz clock, each divided into 256 parts, and cuts the duty off twice on its way (nf-interpreter, ESP32 target).
/// </summary>
internal readonly struct LedcTimer
{
    private const long ClockHz = 80_000_000;
    private const long PartsPerTick = 256;

    private LedcTimer(int bits, long partsPerCount, long highCounts)
    {
        Bits = bits;
        PartsPerCount = partsPerCount;
        HighCounts = highCounts;
    }

    /// <summary>The period is 2^Bits counts.</summary>
    public int Bits { get; }

    /// <summary>The length of a count, in 1/256 of a clock tick.</summary>
    public long PartsPerCount { get; }

    /// <summary>For how many counts the output is high.</summary>
    public long HighCounts { get; }

    /// <summary>The frequency if the clock is right, hertz.</summary>
    public double NominalHz => ClockHz / (PartsPerCount * (double)(1L << Bits) / PartsPerTick);

    /// <summary>The duty, 0..1.</summary>
    public double Duty => HighCounts / (double)(1L << Bits);

    /// <summary>What comes of a request.</summary>
    /// <exception cref="ArgumentException">As the runtime throws it: frequency not positive or too high, duty outside 0..1.</exception>
    public static LedcTimer Request(int hertz, double duty, int mostBits)
    {
        if (hertz <= 0 || !(duty >= 0 && duty <= 1))
        {
            throw new ArgumentException("The timer cannot do this frequency or duty.");
        }

        long partsPerPeriod = ClockHz * PartsPerTick / hertz;
        int bits = mostBits;
        while (bits > 0 && partsPerPeriod >> bits <= PartsPerTick)
        {
            bits--;
        }

        if (bits == 0)
        {
            throw new ArgumentException("The timer cannot do this frequency.");
        }

        long product = (long)hertz * (1L << bits);
        long partsPerCount = ((ClockHz * PartsPerTick) + (product / 2)) / product;
        if (partsPerCount > 1023 * PartsPerTick)
        {
            throw new ArgumentException("The timer cannot go as low as this frequency.");
        }

        uint tenThousandths = (uint)(duty * 10_000);
        long high = (1L << bits) * tenThousandths / 10_000;
        return new LedcTimer(bits, partsPerCount, high);
    }
}
