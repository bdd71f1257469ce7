using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>Where a log stands, for the live view.</summary>
public sealed class LogState
{
    /// <summary>What the readings so far look like; a bounded number of points.</summary>
    public LogHistory History { get; } = new();

    public long Readings { get; internal set; }

    /// <summary>Full readings among them.</summary>
    public long FullReadings { get; internal set; }

    /// <summary>Readings that were tried and gave none.</summary>
    public long Failures { get; internal set; }

    public long Gaps { get; internal set; }

    public long Resets { get; internal set; }

    public long Reconnects { get; internal set; }

    /// <summary>Times the log paused for a field.</summary>
    public long Pauses { get; internal set; }

    /// <summary>The last reading, or null.</summary>
    public Reading? Last { get; internal set; }

    /// <summary>What it is at now, a few words: "waiting", "paused: field present", "box lost"...</summary>
    public string Doing { get; internal set; } = "starting";

    /// <summary>Since the start, seconds.</summary>
    public double ElapsedS { get; internal set; }

    /// <summary>Until the end that was asked for, seconds; NaN where none was.</summary>
    public double RemainingS { get; internal set; } = double.NaN;

    /// <summary>Lines from all sessions so far: received, damaged, missing, repeated requests.</summary>
    public LineTotals Lines { get; internal set; }
}

/// <summary>Line counts over all sessions of a log.</summary>
/// <param name="Received">Lines received.</param>
/// <param name="Damaged">Lines that did not pass their checksum.</param>
/// <param name="Missing">Lines that never came, by the box's count.</param>
/// <param name="Late">Answers to requests that had been given up.</param>
/// <param name="Repeated">Requests sent again.</param>
public readonly record struct LineTotals(long Received, long Damaged, long Missing, long Late, long Repeated)
{
    internal LineTotals Plus(Box.BoxLineCounters counters) => new(
        Received + counters.Lines, Damaged + counters.Damaged, Missing + counters.Missing, Late + counters.Late,
        Repeated + counters.Repeated);
}
