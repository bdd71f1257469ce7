using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>A log as JSON lines on the output: start, readings, events, figures at the end of a field, stop.</summary>
internal sealed class LogJson(Shell shell) : ILogWatch
{
    private const int Schema = 1;

    public void Begin(string task, double boardSeconds)
    {
    }

    public void Progress(double share)
    {
    }

    public void Started(RunStart start) => Line(JsonText.Object(
        json =>
        {
            json.WriteString("type", "start");
            json.WriteNumber("schema_version", Schema);
            json.WriteString("run", start.Id);
            json.WriteString("utc", start.Utc);
            json.WriteString("coil", start.Coil);
            json.WriteString("note", start.Note);
            json.WriteString("port", start.Box?.Port);
            json.WriteString("host_version", start.HostVersion);
        },
        oneLine: true));

    public void Kept(Reading reading, LogState state) => Line(JsonText.Object(
        json =>
        {
            json.WriteString("type", "reading");
            json.WriteString("id", reading.Id);
            json.WriteString("utc", reading.Utc);
            json.Figure("monotonic_s", reading.MonotonicS);
            json.WriteNumber("board_time_us", reading.BoardTimeUs);
            json.WriteNumber("boot_id", reading.Box.BootId);
            json.WriteBoolean("tracked", TrackedReading.Is(reading));
            json.WriteString("verdict", reading.Verdict.ToString().ToLowerInvariant());
            json.Figure("f0_hz", reading.F0Hz);
            json.Figure("f0_repeatability_95_hz", Intervals.F0Hz(reading, absolute: false));
            json.Figure("f0_absolute_95_hz", Intervals.F0Hz(reading, absolute: true));
            json.Figure("q", reading.Q);
            json.Figure("q_repeatability_95", Intervals.Q(reading, absolute: false));
            json.Figure("q_absolute_95", Intervals.Q(reading, absolute: true));
            json.Figure("peak_counts", reading.PeakCounts);
            json.Figure("board_s", reading.BoardSeconds);
        },
        oneLine: true));

    public void Kept(RunEvent document) => Line(JsonText.Object(
        json =>
        {
            json.WriteString("type", "event");
            json.WriteString("id", document.Id);
            json.WriteString("utc", document.Utc);
            json.WriteString("kind", LogWords.Kind(document.Kind).Replace(' ', '-'));
            if (document.From is DateTimeOffset from)
            {
                json.WriteString("from_utc", from);
            }

            if (document.To is DateTimeOffset to)
            {
                json.WriteString("to_utc", to);
            }

            json.WriteString("detail", document.Detail);
        },
        oneLine: true));

    public void CoolDown(FieldEnd fieldEnd) => Line(JsonText.Object(
        json =>
        {
            json.WriteString("type", "field_end");
            json.WriteString("utc", fieldEnd.Utc);
            json.Figure("utc_standard_s", fieldEnd.UncertaintyS);
            json.Figure("f0_hz", fieldEnd.F0.AtStop);
            json.Figure("f0_95_hz", 2 * fieldEnd.F0StandardHz);
            json.Figure("q", fieldEnd.Q?.AtStop ?? double.NaN);
            json.Figure("q_95", 2 * fieldEnd.QStandard);
            json.WriteNumber("readings", fieldEnd.Readings);
        },
        oneLine: true));

    public void Waiting(LogState state)
    {
    }

    public void Stopped(LogSummary summary) => Line(JsonText.Object(
        json =>
        {
            LogState state = summary.State;
            json.WriteString("type", "stop");
            json.WriteString("utc", summary.Stop.Utc);
            json.WriteString("status", summary.Stop.Status == RunStatus.LinkLost ? "link-lost" : summary.Stop.Status.ToString().ToLowerInvariant());
            json.WriteString("reason", summary.Stop.Reason);
            json.WriteNumber("readings", summary.Stop.Count);
            json.WriteNumber("full_readings", state.FullReadings);
            json.WriteNumber("failed_readings", state.Failures);
            json.WriteNumber("gaps", state.Gaps);
            json.WriteNumber("reconnects", state.Reconnects);
            json.WriteNumber("resets", state.Resets);
            json.WriteNumber("pauses", state.Pauses);
            json.WriteString("settled", summary.Settling?.State.ToString());
        },
        oneLine: true));

    private void Line(string text)
    {
        shell.OutText.WriteLine(text);
        shell.OutText.Flush();
    }
}
