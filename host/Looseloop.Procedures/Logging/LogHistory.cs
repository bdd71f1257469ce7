using Looseloop.Drift;

namespace Looseloop.Procedures.Logging;

/// <summary>
/// The readings of a log as a bounded number of points: when the room is used up, neighbours are averaged in pairs, so that
/// the whole run stays in view in the same memory.
/// </summary>
public sealed class LogHistory
{
    private readonly List<LogPoint> _points;
    private readonly int _most;
    private LogPoint _sum;
    private int _inSum;
    private int _perPoint = 1;

    /// <param name="most">Points at most, an even number.</param>
    public LogHistory(int most = 2048)
    {
        _most = most;
        _points = new List<LogPoint>(most);
    }

    /// <summary>The points, in order of time.</summary>
    public IReadOnlyList<LogPoint> Points => _points;

    /// <summary>Readings averaged into each point.</summary>
    public int ReadingsPerPoint => _perPoint;

    public void Add(LogPoint point)
    {
        _sum = _inSum == 0 ? point : Sum(_sum, point);
        _inSum++;
        if (_inSum < _perPoint)
        {
            return;
        }

        _points.Add(Mean(_sum, _inSum));
        _inSum = 0;
        if (_points.Count < _most)
        {
            return;
        }

        for (int i = 0; i < _most / 2; i++)
        {
            _points[i] = Mean(Sum(_points[2 * i], _points[(2 * i) + 1]), 2);
        }

        _points.RemoveRange(_most / 2, _most - (_most / 2));
        _perPoint *= 2;
    }

    /// <summary>Forgets all points.</summary>
    public void Clear()
    {
        _points.Clear();
        _inSum = 0;
        _perPoint = 1;
    }

    /// <summary>f0 as a series.</summary>
    public DriftSeries F0() => DriftSeries.Of(_points.Select(p => new DriftPoint(p.TimeS, p.F0Hz, Math.Sqrt(p.F0Variance))));

    /// <summary>Q as a series.</summary>
    public DriftSeries Q() => DriftSeries.Of(_points.Select(p => new DriftPoint(p.TimeS, p.Q, Math.Sqrt(p.QVariance))));

    private static LogPoint Sum(LogPoint a, LogPoint b) => new(
        a.TimeS + b.TimeS, a.F0Hz + b.F0Hz, a.Q + b.Q, a.F0Variance + b.F0Variance, a.QVariance + b.QVariance);

    private static LogPoint Mean(LogPoint sum, int n) => new(
        sum.TimeS / n, sum.F0Hz / n, sum.Q / n, sum.F0Variance / n / n, sum.QVariance / n / n);
}

/// <summary>One point of a log.</summary>
/// <param name="TimeS">When, seconds of the log's monotonic clock.</param>
/// <param name="F0Hz">f0, hertz.</param>
/// <param name="Q">Q.</param>
/// <param name="F0Variance">Variance of f0 by what differs from reading to reading, hertz squared.</param>
/// <param name="QVariance">Variance of Q by it.</param>
public readonly record struct LogPoint(double TimeS, double F0Hz, double Q, double F0Variance, double QVariance);
