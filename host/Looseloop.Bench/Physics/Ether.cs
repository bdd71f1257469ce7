namespace Looseloop.Bench.Physics;

/// <summary>The fields of a room that do not come from the drive, as power on the detector's input behind its low-pass.</summary>
internal sealed class Ether
{
    private readonly Carrier[] _carriers;
    private readonly double[] _phase;
    private readonly double[] _offset;
    private readonly double[] _beatPower;
    private readonly double[] _beatRate;
    private readonly double _timeConstantS;

    public Ether(World world, NoiseSource noise)
    {
        _carriers = [.. world.Room.Carriers];
        _phase = new double[_carriers.Length];
        _offset = new double[_carriers.Length];
        _beatPower = new double[_carriers.Length];
        _beatRate = new double[_carriers.Length];
        _timeConstantS = world.Detector.TimeConstantUs * 1e-6;
        for (int i = 0; i < _carriers.Length; i++)
        {
            _phase[i] = 2 * Math.PI * noise.Uniform();
            _offset[i] = noise.Uniform() * _carriers[i].PeriodS;
        }
    }

    public bool Silent => _carriers.Length == 0;

    /// <summary>True if every carrier has ended for good, and its trace in the low-pass too.</summary>
    public bool IsOver(double timeS)
    {
        foreach (Carrier carrier in _carriers)
        {
            if (!(timeS > carrier.ToS + (40 * _timeConstantS)))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>Must be called after the drive has changed: finds which carriers beat slowly with a harmonic.</summary>
    public void Enter(CoilResponse response)
    {
        for (int i = 0; i < _carriers.Length; i++)
        {
            _beatPower[i] = 0;
            if (!response.Drives)
            {
                continue;
            }

            double omega = 2 * Math.PI * _carriers[i].FrequencyHz;
            int h = Math.Max(1, (int)Math.Round(omega / response.Omega));
            if (h >= response.Steady.Length)
            {
                continue;
            }

            _beatRate[i] = omega - (h * response.Omega);
            double lag = _beatRate[i] * _timeConstantS;
            _beatPower[i] = _carriers[i].Volts * response.Steady[h].Magnitude / Math.Sqrt(1 + (lag * lag));
        }
    }

    /// <summary>Mean power at a time, volts squared, beats with the drive included (so that it may be negative).</summary>
    public double Power(double timeS)
    {
        double sum = 0;
        for (int i = 0; i < _carriers.Length; i++)
        {
            Carrier carrier = _carriers[i];
            double on = Gate(i, timeS);
            sum += 0.5 * carrier.Volts * carrier.Volts * on;
            if (_beatPower[i] != 0)
            {
                sum += _beatPower[i] * on * Math.Cos((_beatRate[i] * timeS) + _phase[i]);
            }
        }

        return sum;
    }

    /// <summary>The carriers' waveform at a time, volts.</summary>
    public double Waveform(double timeS)
    {
        double sum = 0;
        for (int i = 0; i < _carriers.Length; i++)
        {
            double angle = Math.IEEERemainder(2 * Math.PI * _carriers[i].FrequencyHz * timeS, 2 * Math.PI) + _phase[i];
            sum += _carriers[i].Volts * Math.Sqrt(Gate(i, timeS)) * Math.Cos(angle);
        }

        return sum;
    }

    // What of a carrier's power stands behind the low-pass: both times are long against its time constant.
    private double Gate(int i, double timeS)
    {
        Carrier carrier = _carriers[i];
        if (timeS < carrier.FromS || timeS >= carrier.ToS)
        {
            return timeS < carrier.FromS || _timeConstantS <= 0 ? 0 : Math.Exp((carrier.ToS - timeS) / _timeConstantS);
        }

        if (carrier.PeriodS <= 0)
        {
            return 1;
        }

        double into = (timeS + _offset[i]) % carrier.PeriodS;
        double since = into < carrier.OnS ? into : into - carrier.OnS;
        double left = _timeConstantS > 0 ? Math.Exp(-since / _timeConstantS) : 0;
        return into < carrier.OnS ? 1 - left : left;
    }
}
