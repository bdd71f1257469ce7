using System.Numerics;

namespace Looseloop.Bench.Physics;

/// <summary>
/// What the coil and the direct path put on the detector's input, in closed form. Between two changes of the drive it is
/// y(t) = Re( sum_h Y_h e^(j h w t) + sum_j F_j e^(p_j t) ): steady harmonics, and one free ring for each oscillating pole.
/// Each pole's state z' = p z + v(t) runs on through every change, which fixes its free ring: exact for steps of any size.
/// </summary>
internal sealed class CoilResponse
{
    private readonly World _world;
    private readonly Poles _poles;
    private readonly DirectPath _direct;
    private readonly Complex[] _drive;
    private readonly Complex[] _steady;
    private readonly Complex[] _free;
    private readonly Complex[] _ring;
    private readonly bool _drifts;
    private double _f0Scale;
    private double _qScale;
    private double _fromS;
    private double _omega;
    private double _phase;

    public CoilResponse(World world)
    {
        _world = world;
        _drifts = Drift.Any(world.Room.WarmUp);
        Drift.At(world.Room.WarmUp, 0, out _f0Scale, out _qScale);
        _poles = Poles.Of(Meshes.Loaded(world, _f0Scale, _qScale), world.Pickup.Senses);
        Complex coil = _poles.Pole[_poles.Coil()];
        double f0Hz = coil.Magnitude / (2 * Math.PI);
        _direct = new DirectPath(world.FeedThrough, f0Hz, _poles.At(coil.Magnitude));
        _drive = new Complex[world.Drive.Harmonics + 1];
        _steady = new Complex[world.Drive.Harmonics + 1];
        _free = new Complex[_poles.Pole.Length];
        _ring = new Complex[_poles.Pole.Length];
    }

    /// <summary>The begin of this stretch of time, in seconds.</summary>
    public double FromS => _fromS;

    /// <summary>Angular frequency of the drive; of a drive that is off, the last one.</summary>
    public double Omega => _omega;

    /// <summary>True while the drive is on.</summary>
    public bool Drives { get; private set; }

    /// <summary>Phasor h of the steady state at the detector, referred to <see cref="FromS"/>; index 0 is unused (the buffer passes no DC).</summary>
    public Complex[] Steady => _steady;

    /// <summary>The oscillating poles.</summary>
    public Complex[] Pole => _poles.Pole;

    /// <summary>The complex amplitude of each pole's free ring at the detector at <see cref="FromS"/>.</summary>
    public Complex[] Ring => _ring;

    /// <summary>The direct path and the coil together, detector volts for each volt of the drive.</summary>
    public Complex Transfer(double omega) => _poles.At(omega) + _direct.At(omega);

    /// <summary>The coil alone.</summary>
    public Complex CoilTransfer(double omega) => _poles.At(omega);

    /// <summary>The coil's lowest mode as it stands now: f0 in hertz.</summary>
    public double F0Hz => _poles.Pole[_poles.Coil()].Magnitude / (2 * Math.PI);

    /// <summary>Sets the drive at a time.</summary>
    /// <param name="timeS">When, not before <see cref="FromS"/>.</param>
    /// <param name="frequencyHz">The true frequency.</param>
    /// <param name="duty">The timer's duty.</param>
    /// <param name="phase">Where in its period the drive then is, radians from the rising edge; 0 where the timer restarts.</param>
    public void Set(double timeS, double frequencyHz, double duty, double phase)
    {
        Leave(timeS);
        _omega = 2 * Math.PI * frequencyHz;
        SquareWave.Fill(_world.Drive, frequencyHz, duty, _drive);
        Drives = true;
        Turn(phase);
        Enter(timeS, phase);
    }

    /// <summary>Stops the drive at a time; what rings rings on.</summary>
    public void Stop(double timeS)
    {
        Leave(timeS);
        Array.Clear(_drive);
        Drives = false;
        Enter(timeS, 0);
    }

    /// <summary>The drive's phase at a time, radians.</summary>
    public double PhaseAt(double timeS) => Math.IEEERemainder(_phase + (_omega * (timeS - _fromS)), 2 * Math.PI);

    /// <summary>Follows the coil's drift to a time, if it has moved by a noticeable part of its bandwidth.</summary>
    /// <returns>True if it has: a new stretch begins.</returns>
    public bool FollowDrift(double timeS)
    {
        if (!_drifts)
        {
            return false;
        }

        Drift.At(_world.Room.WarmUp, timeS, out double f0Scale, out double qScale);
        double q = _world.Coil.Modes[0].Q;
        if (Math.Abs(f0Scale - _f0Scale) * q < 1e-4 && Math.Abs(qScale - _qScale) < 2e-5)
        {
            return false;
        }

        double phase = PhaseAt(timeS);
        Leave(timeS);
        Turn(_omega * (timeS - _fromS));
        Enter(timeS, phase);
        return true;
    }

    /// <summary>The waveform itself at a time, volts at the detector's input.</summary>
    public double Waveform(double timeS)
    {
        double t = timeS - _fromS;
        (double sin, double cos) = Math.SinCos(Math.IEEERemainder(_omega * t, 2 * Math.PI));
        var turn = new Complex(cos, sin);
        Complex power = 1;
        double sum = 0;
        for (int h = 1; h < _steady.Length; h++)
        {
            power *= turn;
            sum += (_steady[h] * power).Real;
        }

        for (int j = 0; j < _ring.Length; j++)
        {
            sum += (_ring[j] * Complex.Exp(Pole[j] * t)).Real;
        }

        return sum;
    }

    // Carries each pole's state to the end of the stretch.
    private void Leave(double timeS)
    {
        double t = timeS - _fromS;
        (double sin, double cos) = Math.SinCos(Math.IEEERemainder(_omega * t, 2 * Math.PI));
        for (int j = 0; j < _free.Length; j++)
        {
            Complex p = Pole[j];
            Complex state = p.Real * t < -700 ? Complex.Zero : _free[j] * Complex.Exp(p * t);
            _free[j] = state + Forced(p, new Complex(cos, sin));
        }
    }

    private void Enter(double timeS, double phase)
    {
        if (_drifts)
        {
            Drift.At(_world.Room.WarmUp, timeS, out double f0Scale, out double qScale);
            if (f0Scale != _f0Scale || qScale != _qScale)
            {
                _f0Scale = f0Scale;
                _qScale = qScale;
                _poles.Follow(Meshes.Loaded(_world, f0Scale, qScale));
            }
        }

        _fromS = timeS;
        _phase = phase;
        for (int h = 1; h < _steady.Length; h++)
        {
            _steady[h] = Drives ? _drive[h] * Transfer(h * _omega) : Complex.Zero;
        }

        for (int j = 0; j < _free.Length; j++)
        {
            _free[j] -= Forced(Pole[j], 1);
            _ring[j] = 2 * _poles.Residue[j] * _free[j];
        }
    }

    // Refers the drive's phasors to a later time.
    private void Turn(double angle)
    {
        if (angle == 0)
        {
            return;
        }

        (double sin, double cos) = Math.SinCos(Math.IEEERemainder(angle, 2 * Math.PI));
        var turn = new Complex(cos, sin);
        Complex power = 1;
        for (int h = 1; h < _drive.Length; h++)
        {
            power *= turn;
            _drive[h] *= power;
        }
    }

    // The steady state of z' = p z + v: each harmonic is real, so it has a part at +h w and one at -h w.
    private Complex Forced(Complex p, Complex turn)
    {
        if (!Drives)
        {
            return 0;
        }

        Complex sum = -_drive[0] / p;
        Complex power = 1;
        for (int h = 1; h < _drive.Length; h++)
        {
            power *= turn;
            Complex v = 0.5 * _drive[h] * power;
            double w = h * _omega;
            sum += Divide(v, -p.Real, w - p.Imaginary) + Divide(Complex.Conjugate(v), -p.Real, -w - p.Imaginary);
        }

        return sum;
    }

    private static Complex Divide(Complex a, double re, double im)
    {
        double scale = 1 / ((re * re) + (im * im));
        return new Complex(
            ((a.Real * re) + (a.Imaginary * im)) * scale,
            ((a.Imaginary * re) - (a.Real * im)) * scale);
    }
}
