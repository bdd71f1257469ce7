using Looseloop.Bench.Detectors;

namespace Looseloop.Bench.Physics;

/// <summary>
/// A world in time: the drive goes in, raw counts come out. All times are seconds of true time from the world's begin and
/// must not run backwards. One thread at a time.
/// </summary>
internal sealed class Scene
{
    private readonly World _world;
    private readonly CoilResponse _response;
    private readonly Detector _detector;
    private Ether _ether;
    private readonly Disturbance _disturbance;
    private readonly Converter _converter;
    private readonly NoiseSource _noise;
    private readonly double _pedestalCounts;
    private readonly double _outputNoiseCounts;
    private bool _plain;
    private readonly bool _drifts;
    private double _cachedLevel = double.NaN;
    private double _cachedSignal;
    private bool _cached;

    public Scene(World world, ulong seed)
    {
        _world = world;
        _noise = new NoiseSource(seed);
        _response = new CoilResponse(world);
        _detector = Detector.Of(world, _response);
        _ether = new Ether(world, _noise);
        _disturbance = new Disturbance(world, _noise);
        _converter = new Converter(world, _noise);
        _pedestalCounts = world.Detector.PedestalVolts * _converter.CountsPerVolt;
        _outputNoiseCounts = world.Detector.OutputNoiseMv * 1e-3 * _converter.CountsPerVolt;
        _plain = _ether.Silent && !_disturbance.Modulates;
        _drifts = Drift.Any(world.Room.WarmUp);
        _detector.Leave(0);
        _detector.Enter(0);
        _ether.Enter(_response);
    }

    /// <summary>The coil's and the direct path's part, for tests and for the direct input.</summary>
    public CoilResponse Response => _response;

    /// <summary>Sets the drive; the timer restarts, so that its phase begins at <paramref name="phase"/>.</summary>
    public void Drive(double timeS, double frequencyHz, double duty, double phase = 0)
    {
        _detector.Leave(timeS);
        _response.Set(timeS, frequencyHz, duty, phase);
        Entered(timeS);
    }

    public void Stop(double timeS)
    {
        _detector.Leave(timeS);
        _response.Stop(timeS);
        Entered(timeS);
    }

    /// <summary>Brings another source near the pickup from now on, or takes it away.</summary>
    public void Bring(double timeS, Carrier? source)
    {
        _detector.Leave(timeS);
        Room room = _world.Room;
        _ether = new Ether(
            source is null ? _world : _world with { Room = room with { Carriers = [.. room.Carriers, source with { FromS = timeS }] } }, _noise);
        _plain = _ether.Silent && !_disturbance.Modulates;
        Entered(timeS);
    }

    /// <summary>The detector's output with its pedestal at a time, volts, without noise, hum at the output or bursts.</summary>
    public double DetectorVolts(double timeS)
    {
        if (_drifts && _response.FollowDrift(timeS))
        {
            _detector.Leave(timeS);
            Entered(timeS);
        }

        double extra = _ether.Silent ? 0 : _ether.Power(timeS);
        double scale = _disturbance.Modulates ? _disturbance.Scale(timeS) : 1;
        return _world.Detector.PedestalVolts + _detector.Output(timeS, extra, scale);
    }

    /// <summary>One conversion of the detector.</summary>
    public int ReadDetector(double timeS)
    {
        if (!_cached)
        {
            double volts = DetectorVolts(timeS);
            if (IsSteady(timeS) && _detector.Settled(timeS))
            {
                _cached = true;
                _cachedSignal = volts;
                _cachedLevel = _converter.Level(Math.Min(volts, _world.Detector.CeilingVolts));
            }

            return Convert(volts, timeS);
        }

        if (_disturbance.HasHum || _disturbance.HasBursts)
        {
            return Convert(_cachedSignal, timeS);
        }

        return _converter.Convert(_cachedLevel, _cachedLevel - _pedestalCounts, _outputNoiseCounts);
    }

    /// <summary>One conversion of the buffered waveform, biased to the middle of the range.</summary>
    public int ReadDirect(double timeS)
    {
        if (_drifts && _response.FollowDrift(timeS))
        {
            _detector.Leave(timeS);
            Entered(timeS);
        }

        double scale = _disturbance.Modulates ? _disturbance.Scale(timeS) : 1;
        double floor = _world.Detector.FloorMv * 1e-3 * _noise.Normal();
        double volts = (scale * _response.Waveform(timeS)) + _ether.Waveform(timeS) + floor;
        double middle = _world.Converter.FullScaleVolts / 2;
        return _converter.Convert(_converter.Level(middle + volts), 0);
    }

    /// <summary>One conversion of the thermistor: 10 kilohm at 25 degrees, B 3950 K, under 10 kilohm to the supply.</summary>
    public int ReadThermistor()
    {
        const double ZeroCelsius = 273.15;
        double kelvin = _world.Room.TemperatureC + ZeroCelsius;
        double ratio = Math.Exp(3950 * ((1 / kelvin) - (1 / (25 + ZeroCelsius))));
        double volts = _world.Converter.FullScaleVolts * ratio / (1 + ratio);
        return _converter.Convert(_converter.Level(volts), 0);
    }

    // Without a drive a drift shows nowhere, and a carrier that has ended for good is as good as none.
    private bool IsSteady(double timeS) => (_plain || (!_disturbance.Modulates && _ether.IsOver(timeS))) && (!_drifts || !_response.Drives);

    private int Convert(double volts, double timeS)
    {
        if (_disturbance.HasHum || _disturbance.HasBursts)
        {
            volts += _disturbance.Volts(timeS);
        }

        double level = _converter.Level(Math.Min(volts, _world.Detector.CeilingVolts));
        return _converter.Convert(level, level - _pedestalCounts, _outputNoiseCounts);
    }

    private void Entered(double timeS)
    {
        _cached = false;
        _detector.Enter(timeS);
        _ether.Enter(_response);
    }
}
