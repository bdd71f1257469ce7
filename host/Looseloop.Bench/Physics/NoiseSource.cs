namespace Looseloop.Bench.Physics;

/// <summary>
/// Random numbers that are the same for the same seed on every machine and runtime: xoshiro256++ (D. Blackman, S. Vigna,
/// 2019), started by SplitMix64; normal deviates by the polar method (G. Marsaglia).
/// </summary>
internal sealed class NoiseSource
{
    private ulong _a;
    private ulong _b;
    private ulong _c;
    private ulong _d;
    private double _spare = double.NaN;

    public NoiseSource(ulong seed)
    {
        _a = Split(ref seed);
        _b = Split(ref seed);
        _c = Split(ref seed);
        _d = Split(ref seed);
    }

    /// <summary>Sixty-four random bits.</summary>
    public ulong Bits()
    {
        ulong result = ulong.RotateLeft(_a + _d, 23) + _a;
        ulong t = _b << 17;
        _c ^= _a;
        _d ^= _b;
        _b ^= _c;
        _a ^= _d;
        _c ^= t;
        _d = ulong.RotateLeft(_d, 45);
        return result;
    }

    /// <summary>Evenly distributed from 0 to below 1.</summary>
    public double Uniform() => (Bits() >> 11) * (1.0 / (1UL << 53));

    /// <summary>Normal deviate of mean 0 and standard deviation 1.</summary>
    public double Normal()
    {
        if (!double.IsNaN(_spare))
        {
            double kept = _spare;
            _spare = double.NaN;
            return kept;
        }

        double x;
        double y;
        double s;
        do
        {
            x = (2 * Uniform()) - 1;
            y = (2 * Uniform()) - 1;
            s = (x * x) + (y * y);
        }
        while (s >= 1 || s == 0);

        double scale = Math.Sqrt(-2 * Math.Log(s) / s);
        _spare = y * scale;
        return x * scale;
    }

    /// <summary>Exponentially distributed with mean 1.</summary>
    public double Exponential() => -Math.Log(1 - Uniform());

    private static ulong Split(ref ulong state)
    {
        state += 0x9E3779B97F4A7C15;
        ulong z = state;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }
}
