namespace Looseloop.Bench.Physics;

/// <summary>Hum and bursts at the detector's output.</summary>
internal sealed class Disturbance
{
    private readonly MainsHum _hum;
    private readonly Bursts _bursts;
    private readonly NoiseSource _noise;
    private readonly double _phase;
    private double _burstFromS = double.PositiveInfinity;
    private double _burstVolts;

    public Disturbance(World world, NoiseSource noise)
    {
        _hum = world.Room.Hum;
        _bursts = world.Room.Bursts;
        _noise = noise;
        _phase = 2 * Math.PI * noise.Uniform();
        HasHum = _hum.OutputMv != 0;
        Modulates = _hum.Modulation != 0;
        HasBursts = _bursts.PerSecond > 0;
        if (HasBursts)
        {
            Next(0);
        }
    }

    public bool HasHum { get; }

    /// <summary>True if hum modulates what the pickup receives.</summary>
    public bool Modulates { get; }

    public bool HasBursts { get; }

    /// <summary>What the received signal is multiplied by.</summary>
    public double Scale(double timeS) => 1 + (_hum.Modulation * Math.Sin(Angle(timeS)));

    /// <summary>Volts added at the output. Times must not run backwards.</summary>
    public double Volts(double timeS)
    {
        double volts = 0;
        if (HasHum)
        {
            double angle = Angle(timeS);
            double second = _hum.SecondShare;
            volts = _hum.OutputMv * 1e-3 * (((1 - second) * Math.Sin(angle)) + (second * Math.Sin((2 * angle) + 1)));
        }

        if (HasBursts)
        {
            double lengthS = _bursts.LengthUs * 1e-6;
            while (timeS > _burstFromS + lengthS)
            {
                Next(_burstFromS + lengthS);
            }

            if (timeS >= _burstFromS)
            {
                volts += _burstVolts;
            }
        }

        return volts;
    }

    private double Angle(double timeS) => Math.IEEERemainder(2 * Math.PI * _hum.FrequencyHz * timeS, 2 * Math.PI) + _phase;

    private void Next(double fromS)
    {
        _burstFromS = fromS + (_noise.Exponential() / _bursts.PerSecond);
        _burstVolts = _bursts.OutputMv * 1e-3 * _noise.Exponential();
    }
}
