using System.Globalization;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Rendering;
using Looseloop.Terminal;

namespace Looseloop.Records;

/// <summary>Documents of the record in a few words.</summary>
internal static class RecordWords
{
    /// <summary>A time by the clock on the wall.</summary>
    public static string Time(Shell shell, DateTimeOffset utc) =>
        TimeZoneInfo.ConvertTime(utc, shell.Time.LocalTimeZone).ToString("yyyy-MM-dd HH:mm:ss", CultureInfo.InvariantCulture);

    /// <summary>The same without seconds, for tables.</summary>
    public static string Minute(Shell shell, DateTimeOffset utc) => Time(shell, utc)[..16];

    /// <summary>f0 with its 95 % interval between readings.</summary>
    public static string F0(ReadingSummary? reading) => reading is null || !double.IsFinite(reading.F0Hz)
        ? "-"
        : $"{Figures.Value(reading.F0Hz, 2 * reading.F0RepeatabilityHz)} ± {Figures.Uncertainty(2 * reading.F0RepeatabilityHz)}";

    /// <summary>Q with its 95 % interval between readings.</summary>
    public static string Q(ReadingSummary? reading) => reading is null || !double.IsFinite(reading.Q)
        ? "-"
        : $"{Figures.Value(reading.Q, 2 * reading.QRepeatability)} ± {Figures.Uncertainty(2 * reading.QRepeatability)}";

    /// <summary>How a run ended.</summary>
    public static string Status(RunStop? stop) => stop?.Status switch
    {
        null => "open",
        RunStatus.Completed => "completed",
        RunStatus.Interrupted => "interrupted",
        RunStatus.LinkLost => "link lost",
        _ => "fault",
    };

    /// <summary>What happened, in lower-case words.</summary>
    public static string Kind(RunEventKind kind) =>
        string.Concat(kind.ToString().Select((c, i) => char.IsUpper(c) && i > 0 ? " " + char.ToLowerInvariant(c) : char.ToLowerInvariant(c).ToString()));
}
