namespace Looseloop.Record;

/// <summary>
/// Times of a series from two clocks: the monotonic one measures intervals, and UTC bridges where it begins anew (another
/// start of the computer) or is missing. A step of the UTC clock between two readings then does no harm.
/// </summary>
internal struct TrackClock
{
    private bool _started;
    private double _timeS;
    private long _utcUs;
    private double _monotonicS;

    /// <summary>Seconds since the first call.</summary>
    public double Next(long utcUs, double monotonicS)
    {
        if (_started)
        {
            double byMonotonic = monotonicS - _monotonicS;
            _timeS += double.IsFinite(byMonotonic) && byMonotonic >= 0 ? byMonotonic : (utcUs - _utcUs) / 1e6;
        }

        _started = true;
        _utcUs = utcUs;
        _monotonicS = monotonicS;
        return _timeS;
    }
}
