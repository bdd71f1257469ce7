using Looseloop.Drift;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>Collects the readings after the end of a field and extrapolates f0 and Q back to it.</summary>
internal sealed class CoolDownWatch(DateTimeOffset stopUtc, double stopS, double stopStandardS)
{
    private readonly LogHistory _history = new(512);
    private int _readings;
    private int _nextCount = CoolDown.FewestReadings;
    private double _f0Common;
    private double _qCommon;

    /// <summary>The last extrapolation, or null.</summary>
    public FieldEnd? Last { get; private set; }

    /// <summary>True if there are readings that the last extrapolation did not have.</summary>
    public bool HasMore => _readings >= CoolDown.FewestReadings && Last?.Readings != _readings;

    /// <summary>Takes a reading in.</summary>
    /// <returns>True if it is worth extrapolating anew: at twice as many readings as the last time.</returns>
    public bool Add(Reading reading, LogPoint point)
    {
        if (point.TimeS <= stopS)
        {
            return false;
        }

        _history.Add(point);
        _readings++;
        _f0Common = Math.Max(_f0Common, CommonF0(reading));
        _qCommon = Math.Max(_qCommon, CommonQ(reading));
        return _readings >= _nextCount;
    }

    /// <summary>Extrapolates from all readings so far.</summary>
    public FieldEnd? Extrapolate()
    {
        _nextCount = Math.Max(_nextCount, 2 * _readings);
        CoolDown? f0 = CoolDown.Extrapolate(_history.F0(), stopS, stopStandardS);
        if (f0 is null)
        {
            return null;
        }

        CoolDown? q = CoolDown.Extrapolate(_history.Q(), stopS, stopStandardS);
        Last = new FieldEnd(stopUtc, stopStandardS, _readings, f0, q, _f0Common, _qCommon);
        return Last;
    }

    private static double CommonF0(Reading reading) => ReadingTerms.CommonF0Hz(reading);

    private static double CommonQ(Reading reading) => reading.Q * ReadingTerms.CommonQRelative(reading);
}
