namespace Looseloop.Bench.Physics;

/// <summary>Volts to raw counts.</summary>
internal sealed class Converter
{
    public const int Full = 4095;

    private readonly ConverterParameters _parameters;
    private readonly NoiseSource _noise;
    private readonly double _countsPerVolt;

    public Converter(World world, NoiseSource noise)
    {
        _parameters = world.Converter;
        _noise = noise;
        _countsPerVolt = Full / _parameters.FullScaleVolts;
    }

    /// <summary>The level without noise or rounding, counts; NaN in the dead zone, which has no scatter.</summary>
    public double Level(double volts)
    {
        if (volts < _parameters.DeadZoneVolts)
        {
            return double.NaN;
        }

        double counts = volts * _countsPerVolt;
        if (_parameters.BowCounts != 0)
        {
            double x = Math.Clamp(counts / Full, 0, 1);
            counts += _parameters.BowCounts * 4 * x * (1 - x);
        }

        if (_parameters.RippleCounts != 0)
        {
            counts += _parameters.RippleCounts * Math.Sin(2 * Math.PI * counts / _parameters.RipplePeriodCounts);
        }

        return counts;
    }

    /// <summary>One conversion of a level.</summary>
    /// <param name="level">From <see cref="Level"/>.</param>
    /// <param name="abovePedestalCounts">How much of it is signal, for the noise that goes with it.</param>
    /// <param name="sourceNoiseCounts">Noise of what is converted, counts rms.</param>
    public int Convert(double level, double abovePedestalCounts, double sourceNoiseCounts = 0)
    {
        if (double.IsNaN(level))
        {
            return 0;
        }

        double noise = _parameters.NoiseCounts;
        if (_parameters.NoiseOfLevel != 0 || sourceNoiseCounts != 0)
        {
            double more = _parameters.NoiseOfLevel * abovePedestalCounts;
            noise = Math.Sqrt((noise * noise) + (more * more) + (sourceNoiseCounts * sourceNoiseCounts));
        }

        double counts = level + (noise * _noise.Normal());
        return (int)Math.Clamp(Math.Floor(counts + 0.5), 0, Full);
    }

    /// <summary>Counts for each volt.</summary>
    public double CountsPerVolt => _countsPerVolt;
}
