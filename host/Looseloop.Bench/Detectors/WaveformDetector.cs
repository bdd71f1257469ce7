using System.Numerics;
using Looseloop.Bench.Physics;

namespace Looseloop.Bench.Detectors;

/// <summary>
/// The detectors that are not a power: they act on the waveform of one period, whose harmonic phasors change slowly while
/// a ring dies (a ring counts to the harmonic that is next to it). Their level is scaled so that a sine gives its rms,
/// except the diode's, which is its own voltage.
/// </summary>
internal sealed class WaveformDetector : Detector
{
    // Of all that is there: a free ring below this changes no count any more.
    private const double Negligible = 1e-5;

    // Of all that is there: rings below this move the level in proportion, to a hundredth of their effect.
    private const double Small = 0.02;

    private readonly Waveform _waveform = new();
    private readonly Complex[] _phasors;
    private readonly Complex[] _rate;
    private readonly int[] _harmonic;
    private readonly Complex[] _slope;
    private readonly double _attackS;
    private readonly double _decayS;
    private readonly double _diodeVolts;
    private readonly double _floorPower;
    private readonly bool _peak;
    private double _fromS;
    private double _atS;
    private double _level;
    private double _steadyLevel;
    private double _scale;
    private double _ringsUntilS;
    private double _settledS;
    private bool _hasSlopes;

    public WaveformDetector(World world, CoilResponse response)
        : base(world, response)
    {
        _phasors = new Complex[response.Steady.Length];
        _rate = new Complex[response.Pole.Length];
        _harmonic = new int[response.Pole.Length];
        _slope = new Complex[response.Pole.Length];
        _diodeVolts = Parameters.DiodeMv * 1e-3;
        _floorPower = Parameters.FloorMv * Parameters.FloorMv * 1e-6;
        _peak = Parameters.Kind is DetectorKind.Peak or DetectorKind.PeakToPeak;
        _attackS = Parameters.TimeConstantUs * 1e-6;
        _decayS = _peak ? Parameters.DecayUs * 1e-6 : _attackS;
        Array.Clear(_phasors);
        _level = Functional();
    }

    public override void Leave(double timeS) => Advance(timeS);

    public override void Enter(double timeS)
    {
        _fromS = timeS;
        _atS = timeS;
        Array.Copy(Response.Steady, _phasors, _phasors.Length);
        _steadyLevel = Functional();
        _scale = 1e-7;
        foreach (Complex phasor in _phasors)
        {
            _scale += phasor.Magnitude;
        }

        double baseOmega = BaseOmega();
        double latest = 0;
        for (int j = 0; j < _rate.Length; j++)
        {
            double size = Response.Ring[j].Magnitude;
            int h = Math.Max(1, (int)Math.Round(Response.Pole[j].Imaginary / baseOmega));
            _harmonic[j] = h < _phasors.Length && size > Negligible * _scale ? h : 0;
            _rate[j] = Response.Pole[j] - new Complex(0, Response.Drives ? h * baseOmega : Response.Pole[j].Imaginary);
            if (_harmonic[j] != 0)
            {
                latest = Math.Max(latest, Math.Log(size / (Negligible * _scale)) / -_rate[j].Real);
            }
        }

        _hasSlopes = false;
        _ringsUntilS = timeS + latest;
        _settledS = _ringsUntilS + (14 * Math.Max(_attackS, _decayS));
    }

    public override bool Settled(double timeS) => timeS >= _settledS;

    public override double Output(double timeS, double extraPower, double scale)
    {
        double level = _steadyLevel;
        if (timeS < _settledS)
        {
            Advance(timeS);
            level = _level;
        }

        switch (Parameters.Kind)
        {
            case DetectorKind.Logarithm:
                return LogOutput(Math.Max((Math.Pow(10, level / 10) * scale * scale) + extraPower, 0));
            case DetectorKind.Diode:
                if (scale != 1)
                {
                    // From square law to peak, the exponent falls from 2 to 1.
                    double over = level / _diodeVolts;
                    level *= Math.Pow(scale, (2 + over) / (1 + over));
                }

                return Parameters.Gain * Math.Max(level + Added(extraPower), 0);
            default:
                double power = (level * level * scale * scale) + extraPower + _floorPower;
                return Parameters.Gain * Math.Sqrt(Math.Max(power, 0));
        }
    }

    // The sine that stands for a power adds ln I0 to the diode's logarithm; a power below zero is a beat that subtracts.
    private double Added(double extraPower)
    {
        double x = Math.Sqrt(2 * Math.Abs(extraPower)) / _diodeVolts;
        double logI0 = x < 1 ? x * x / 4 * (1 - (x * x / 16)) : x - (0.5 * Math.Log((2 * Math.PI * x) + 0.6));
        return (_diodeVolts * Math.Sign(extraPower) * logI0) + (_floorPower / (2 * _diodeVolts));
    }

    // Carries the low-pass to a time. Only its last few time constants matter, and fewer the smaller the rings are.
    private void Advance(double timeS)
    {
        if (_attackS <= 0 && _decayS <= 0)
        {
            _level = timeS < _ringsUntilS ? LevelAt(timeS) : _steadyLevel;
            _atS = timeS;
            return;
        }

        double ringsUntilS = Math.Min(timeS, _ringsUntilS);
        if (_atS < ringsUntilS)
        {
            double memoryS = 12 * Math.Max(_attackS, _decayS);
            if (ringsUntilS - _atS > memoryS)
            {
                _atS = ringsUntilS - memoryS;
                _level = LevelAt(_atS);
            }

            Follow(ringsUntilS);
        }

        if (_atS < timeS)
        {
            double constantS = _steadyLevel > _level ? _attackS : _decayS;
            _level = _steadyLevel + ((_level - _steadyLevel) * Math.Exp(-(timeS - _atS) / constantS));
            _atS = timeS;
        }
    }

    private void Follow(double untilS)
    {
        double first = LevelAt(_atS);
        while (_atS < untilS)
        {
            double stepS = Math.Min(StepS(_atS), untilS - _atS);
            double middle = LevelAt(_atS + (stepS / 2));
            double last = LevelAt(_atS + stepS);
            double constantS = middle > _level ? _attackS : _decayS;
            _level = constantS > 0 ? LowPass.Step(_level, first, middle, last, stepS / constantS) : last;
            _atS = untilS - _atS - stepS < 1e-12 ? untilS : _atS + stepS;
            first = last;
        }
    }

    // As fine as the fastest change that still matters, but no finer than the low-pass can show.
    private double StepS(double timeS)
    {
        double fastest = 0;
        double t = timeS - _fromS;
        for (int j = 0; j < _rate.Length; j++)
        {
            if (_harmonic[j] != 0 && Response.Ring[j].Magnitude * Math.Exp(_rate[j].Real * t) > Negligible * _scale)
            {
                fastest = Math.Max(fastest, _rate[j].Magnitude);
            }
        }

        double constantS = _peak ? Math.Max(_attackS, 0.1 * _decayS) : _attackS;
        return Math.Max(fastest > 0 ? 0.7 / fastest : double.PositiveInfinity, constantS / 8);
    }

    private double LevelAt(double timeS)
    {
        double t = timeS - _fromS;
        double rings = 0;
        for (int j = 0; j < _rate.Length; j++)
        {
            rings += _harmonic[j] != 0 ? Response.Ring[j].Magnitude * Math.Exp(_rate[j].Real * t) : 0;
        }

        return rings < Small * _scale && Response.Drives ? LevelBySlope(t) : LevelByWaveform(t);
    }

    private double LevelByWaveform(double t)
    {
        Array.Copy(Response.Steady, _phasors, _phasors.Length);
        for (int j = 0; j < _rate.Length; j++)
        {
            if (_harmonic[j] != 0)
            {
                _phasors[_harmonic[j]] += Response.Ring[j] * Exp(_rate[j] * t);
            }
        }

        return Functional();
    }

    private double LevelBySlope(double t)
    {
        if (!_hasSlopes)
        {
            FindSlopes();
        }

        double level = _steadyLevel;
        for (int j = 0; j < _rate.Length; j++)
        {
            if (_harmonic[j] != 0)
            {
                Complex ring = Response.Ring[j] * Exp(_rate[j] * t);
                level += (_slope[j].Real * ring.Real) + (_slope[j].Imaginary * ring.Imaginary);
            }
        }

        return level;
    }

    // How the steady level answers to a small addition to the harmonic that each ring counts to.
    private void FindSlopes()
    {
        double step = Small / 2 * _scale;
        for (int j = 0; j < _rate.Length; j++)
        {
            if (_harmonic[j] != 0)
            {
                _slope[j] = new Complex(Slope(_harmonic[j], step), Slope(_harmonic[j], new Complex(0, step)));
            }
        }

        _hasSlopes = true;
    }

    private double Slope(int harmonic, Complex step)
    {
        Array.Copy(Response.Steady, _phasors, _phasors.Length);
        _phasors[harmonic] = Response.Steady[harmonic] + step;
        double up = Functional();
        _phasors[harmonic] = Response.Steady[harmonic] - step;
        return (up - Functional()) / (2 * step.Magnitude);
    }

    private double Functional()
    {
        _waveform.Fill(_phasors);
        return Parameters.Kind switch
        {
            DetectorKind.MeanAbsolute => _waveform.MeanAbsolute() * (Math.PI / (2 * Math.Sqrt(2))),
            DetectorKind.Logarithm => Decibels(),
            DetectorKind.Diode => _waveform.LogMeanExponential(_diodeVolts),
            DetectorKind.Peak => _waveform.Peak(1) / Math.Sqrt(2),
            DetectorKind.PeakToPeak => (_waveform.Peak(1) + _waveform.Peak(-1)) / (2 * Math.Sqrt(2)),
            _ => throw new InvalidOperationException(),
        };
    }

    // Of a sine A the mean logarithm is ln(A/2): its mean square is 2 e^(2 mean). The floor keeps silence finite.
    private double Decibels()
    {
        double mean = _waveform.MeanLogarithm();
        double power = double.IsNegativeInfinity(mean) || double.IsNaN(mean) ? 0 : 2 * Math.Exp(2 * mean);
        return 10 * Math.Log10(power + _floorPower + 1e-18);
    }

    private double BaseOmega()
    {
        if (Response.Drives)
        {
            return Response.Omega;
        }

        // Of a ring alone the largest is the fundamental.
        int largest = 0;
        for (int j = 1; j < Response.Ring.Length; j++)
        {
            if (Response.Ring[j].Magnitude > Response.Ring[largest].Magnitude)
            {
                largest = j;
            }
        }

        return Response.Pole[largest].Imaginary;
    }
}
