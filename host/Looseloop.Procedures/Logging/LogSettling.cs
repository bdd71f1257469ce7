using Looseloop.Drift;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>Whether f0 is settled, judged now and then from the log's history.</summary>
internal sealed class LogSettling(LogOptions options, LogState state)
{
    private const double JudgeEveryS = 30;

    private double _lastJudgedS = double.NegativeInfinity;

    /// <summary>The last judgement, or null.</summary>
    public Settling? Last { get; private set; }

    /// <summary>True if the log is to end when f0 is settled, and it is.</summary>
    public bool IsReached => options.UntilSettled && Last?.State == SettledState.Settled;

    /// <summary>A reading has come; judges where it is time to.</summary>
    public void Add(Reading reading)
    {
        if (options.UntilSettled && reading.MonotonicS - _lastJudgedS >= JudgeEveryS)
        {
            _lastJudgedS = reading.MonotonicS;
            Judge(reading);
        }
    }

    /// <summary>Judges now.</summary>
    public void Judge(Reading last)
    {
        DriftSeries series = state.History.F0();
        Last = Settling.Judge(
            series, series.Count >= Settling.FewestReadings ? WarmUpFit.Choose(series) : null, 2 * last.Budget.F0Hz(absolute: false),
            new DriftOptions().UseS);
    }
}
