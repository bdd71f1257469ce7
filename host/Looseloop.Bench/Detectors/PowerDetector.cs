using System.Numerics;
using Looseloop.Bench.Physics;

namespace Looseloop.Bench.Detectors;

/// <summary>
/// Mean power through a low-pass, then its root, its logarithm or itself. Over a stretch the power of steady harmonics and
/// free rings is a constant plus exponentials, the beats between a ring and the two harmonics next to it among them, so the
/// low-passed power u is one too: for a term c e^(l t) it is c/(1 + l T) e^(l t), plus what is left of the old u, e^(-t/T).
/// </summary>
internal sealed class PowerDetector : Detector
{
    // Of the steady power: below these a term is left out, or the stretch called settled (5e-8 of the amplitude).
    private const double Negligible = 1e-11;
    private const double SettledPart = 1e-7;

    private readonly Complex[] _term;
    private readonly Complex[] _rate;
    private readonly double _timeConstantS;
    private readonly double _floorPower;
    private readonly double _tinyPower;
    private int _terms;
    private double _fromS;
    private double _power;
    private double _steady;
    private double _rest;
    private double _settledS;

    public PowerDetector(World world, CoilResponse response)
        : base(world, response)
    {
        int poles = response.Pole.Length;
        _term = new Complex[(poles * (poles + 1) / 2) + (2 * poles)];
        _rate = new Complex[_term.Length];
        _timeConstantS = Parameters.TimeConstantUs * 1e-6;
        _floorPower = Parameters.FloorMv * Parameters.FloorMv * 1e-6;

        // A hundredth of a count of a linear output.
        double tiny = 0.01 * world.Converter.FullScaleVolts / 4095 / Math.Max(Parameters.Gain, 1e-6);
        _tinyPower = tiny * tiny;
    }

    public override void Leave(double timeS)
    {
        _power = PowerAt(timeS);
    }

    public override void Enter(double timeS)
    {
        _fromS = timeS;
        _terms = 0;
        _steady = 0;
        Complex[] steady = Response.Steady;
        for (int h = 1; h < steady.Length; h++)
        {
            _steady += 0.5 * Size(steady[h]);
        }

        double least = Negligible * (_steady + _tinyPower);
        Complex[] ring = Response.Ring;
        Complex[] pole = Response.Pole;
        for (int j = 0; j < ring.Length; j++)
        {
            if (Size(ring[j]) < least * Negligible)
            {
                continue;
            }

            Add(0.5 * Size(ring[j]), 2 * pole[j].Real, least);
            for (int k = j + 1; k < ring.Length; k++)
            {
                Add(ring[j] * Complex.Conjugate(ring[k]), pole[j] + Complex.Conjugate(pole[k]), least);
            }

            if (Response.Drives)
            {
                int below = (int)(pole[j].Imaginary / Response.Omega);
                for (int h = Math.Max(below, 1); h <= below + 1 && h < steady.Length; h++)
                {
                    Add(Complex.Conjugate(steady[h]) * ring[j], pole[j] - new Complex(0, h * Response.Omega), least);
                }
            }
        }

        double settle = SettledPart * (_steady + _tinyPower);
        _rest = _power - _steady;
        double latest = 0;
        for (int i = 0; i < _terms; i++)
        {
            _rest -= _term[i].Real;
            latest = Math.Max(latest, Math.Log(_term[i].Magnitude / settle) / -_rate[i].Real);
        }

        if (_timeConstantS > 0)
        {
            latest = Math.Max(latest, Math.Log(Math.Abs(_rest) / settle) * _timeConstantS);
        }

        _settledS = timeS + latest;
    }

    public override bool Settled(double timeS) => timeS >= _settledS;

    public override double Output(double timeS, double extraPower, double scale)
    {
        double power = timeS >= _settledS ? _steady : PowerAt(timeS);
        power = (Math.Max(power, 0) * scale * scale) + extraPower + _floorPower;
        return Parameters.Kind switch
        {
            DetectorKind.RmsLinear => Parameters.Gain * Math.Sqrt(power),
            DetectorKind.RmsLog => LogOutput(power),
            _ => Parameters.Gain * power,
        };
    }

    private double PowerAt(double timeS)
    {
        double t = timeS - _fromS;
        double sum = _steady;
        for (int i = 0; i < _terms; i++)
        {
            Complex decay = Exp(_rate[i] * t);
            sum += (_term[i].Real * decay.Real) - (_term[i].Imaginary * decay.Imaginary);
        }

        if (_timeConstantS > 0)
        {
            sum += _rest * Math.Exp(-t / _timeConstantS);
        }

        return sum;
    }

    private void Add(Complex term, Complex rate, double least)
    {
        Complex filter = 1 + (rate * _timeConstantS);

        // A ring that decays exactly as the low-pass would need t e^(-t/T); a hair beside it is as good.
        if (Size(filter) < 1e-12)
        {
            filter = 1e-6;
            rate = (filter - 1) / _timeConstantS;
        }

        term /= filter;
        if (Size(term) > least * least)
        {
            _term[_terms] = term;
            _rate[_terms++] = rate;
        }
    }

    private static double Size(Complex z) => (z.Real * z.Real) + (z.Imaginary * z.Imaginary);
}
