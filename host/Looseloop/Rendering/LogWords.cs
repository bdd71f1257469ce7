using System.Globalization;
using Looseloop.Drift;
using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>What happens in a log, in words.</summary>
internal static class LogWords
{
    /// <summary>A time by the clock on the wall.</summary>
    public static string Time(Shell shell, DateTimeOffset utc) =>
        TimeZoneInfo.ConvertTime(utc, shell.Time.LocalTimeZone).ToString("yyyy-MM-dd HH:mm:ss", CultureInfo.InvariantCulture);

    /// <summary>A span in the two largest units that it has.</summary>
    public static string Span(double seconds)
    {
        if (!double.IsFinite(seconds))
        {
            return "-";
        }

        var span = TimeSpan.FromSeconds(Math.Round(seconds));
        return span.TotalHours >= 1
            ? string.Create(CultureInfo.InvariantCulture, $"{(int)span.TotalHours} h {span.Minutes:00} min")
            : span.TotalMinutes >= 1
                ? string.Create(CultureInfo.InvariantCulture, $"{span.Minutes} min {span.Seconds:00} s")
                : string.Create(CultureInfo.InvariantCulture, $"{span.Seconds} s");
    }

    /// <summary>f0 and Q with their 95 % intervals between readings, the verdict, and whether it was a full reading.</summary>
    public static string Figures(Reading reading)
    {
        double f0 = Intervals.F0Hz(reading, absolute: false);
        double q = Intervals.Q(reading, absolute: false);
        string kind = TrackedReading.Is(reading) ? "" : ", full reading";
        return $"f0 {Rendering.Figures.Value(reading.F0Hz, f0)} ± {Rendering.Figures.Uncertainty(f0)} Hz   Q {Rendering.Figures.Value(reading.Q, q)} ± {Rendering.Figures.Uncertainty(q)}   "
            + $"{reading.Verdict.ToString().ToLowerInvariant()}{kind}";
    }

    /// <summary>f0 and Q at the end of a field.</summary>
    public static string FieldEnd(Shell shell, FieldEnd end)
    {
        double f0 = 2 * end.F0StandardHz;
        double q = 2 * end.QStandard;
        string quality = end.Q is null ? "Q not determinable" : $"Q {Rendering.Figures.Value(end.Q.AtStop, q)} ± {Rendering.Figures.Uncertainty(q)}";
        return $"when the field ended ({Time(shell, end.Utc)}): f0 {Rendering.Figures.Value(end.F0.AtStop, f0)} ± {Rendering.Figures.Uncertainty(f0)} Hz, {quality}, from {end.Readings} readings since";
    }

    /// <summary>An event's kind, in lower-case words.</summary>
    public static string Kind(RunEventKind kind) =>
        string.Concat(kind.ToString().Select((c, i) => char.IsUpper(c) && i > 0 ? " " + char.ToLowerInvariant(c) : char.ToLowerInvariant(c).ToString()));

    /// <summary>The rate and the line's health.</summary>
    public static string Health(LogState state)
    {
        double perMinute = state.ElapsedS > 0 ? 60 * state.Readings / state.ElapsedS : 0;
        LineTotals lines = state.Lines;
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{state.Readings} readings ({state.FullReadings} full, {state.Failures} failed), {perMinute:0.0} a minute; {state.Gaps} gaps, {state.Reconnects} reconnects, {state.Resets} resets, {state.Pauses} pauses; "
            + $"{lines.Received} lines, {lines.Damaged} damaged, {lines.Missing} missing, {lines.Late} late, {lines.Repeated} asked again");
    }

    /// <summary>What a log came to.</summary>
    public static void WriteSummary(TextWriter writer, LogSummary summary)
    {
        LogState state = summary.State;
        writer.WriteLine($"{summary.Stop.Reason} {Span(state.ElapsedS)}: {Health(state)}.");
        if (state.History.Points.Count > 1)
        {
            LogPoint first = state.History.Points[0];
            LogPoint last = state.History.Points[^1];
            writer.WriteLine(string.Create(
                CultureInfo.InvariantCulture,
                $"f0 went from {first.F0Hz:0.0} to {last.F0Hz:0.0} Hz ({1e6 * ((last.F0Hz / first.F0Hz) - 1):+0;-0;0} ppm), Q from {first.Q:0.0} to {last.Q:0.0}."));
        }

        if (summary.Settling is Settling settling)
        {
            writer.WriteLine($"f0 is {State(settling.State)}: {settling.Because}.");
        }
    }

    private static string State(SettledState state) => state switch
    {
        SettledState.Settled => "settled",
        SettledState.NotSettled => "not settled",
        _ => "not determinable yet",
    };
}
