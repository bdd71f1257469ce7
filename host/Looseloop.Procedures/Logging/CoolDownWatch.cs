using Looseloop.Drift;
using Looseloop.Procedures.Tracking;
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
        // A full reading stands off the tracked ones by what those have in common: in a fit over time that looks like a fast
        // term, which the extrapolation would blow up. It is only their basis here. For the same reason a point counts with
        // all of its repeatability, for the readings on the next curve stand off again.
        if (point.TimeS <= stopS || !TrackedReading.Is(reading))
        {
            return false;
        }

        double f0 = reading.Budget.F0Hz(absolute: false);
        double q = reading.Q * reading.Budget.QRelative(absolute: false);
        _history.Add(point with { F0Variance = f0 * f0, QVariance = q * q });
        _readings++;
        _f0Common = Math.Max(_f0Common, CommonF0(reading));
        _qCommon = Math.Max(_qCommon, CommonQ(reading));
        return _readings >= _nextCount;
    }

    /// <summary>Extrapolates from all readings so far.</summary>
    public FieldEnd? Extrapolate()
    {
        _nextCount = Math.Max(_nextCount, 2 * _readings);
        CoolDown? f0 = Determined(_history.F0());
        if (f0 is null)
        {
            return null;
        }

        CoolDown? q = Determined(_history.Q());
        Last = new FieldEnd(stopUtc, stopStandardS, _readings, f0, q, _f0Common, _qCommon);
        return Last;
    }

    /// <summary>
    /// Null where the extrapolation reaches back further than half of what was seen, or says less than that the value was
    /// somewhere near the readings.
    /// </summary>
    private CoolDown? Determined(DriftSeries series)
    {
        if (series.Count == 0 || series.TimeS[0] - stopS > series.DurationS / 2)
        {
            return null;
        }

        CoolDown? cool = CoolDown.Extrapolate(series, stopS, stopStandardS);
        double low = double.PositiveInfinity;
        double high = double.NegativeInfinity;
        double standard = 0;
        for (int i = 0; i < series.Count; i++)
        {
            low = Math.Min(low, series.Value[i]);
            high = Math.Max(high, series.Value[i]);
            standard = Math.Max(standard, series.Standard[i]);
        }

        return cool is not null && cool.AtStopStandard <= (high - low) + (2 * standard) ? cool : null;
    }

    private static double CommonF0(Reading reading) => ReadingTerms.CommonF0Hz(reading);

    private static double CommonQ(Reading reading) => reading.Q * ReadingTerms.CommonQRelative(reading);
}
