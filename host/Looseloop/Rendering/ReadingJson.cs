using System.Text.Json;
using Looseloop.Readings;

namespace Looseloop.Rendering;

/// <summary>A reading as JSON.</summary>
internal static class ReadingJson
{
    private const int Schema = 1;

    public static void Write(Utf8JsonWriter json, Reading reading)
    {
        json.WriteNumber("schema_version", Schema);
        json.WriteString("id", reading.Id);
        json.WriteString("utc", reading.Utc);
        json.WriteString("verdict", reading.Verdict.ToString().ToLowerInvariant());
        json.Figure("f0_hz", reading.F0Hz);
        json.Figure("f0_repeatability_95_hz", Intervals.F0Hz(reading, absolute: false));
        json.Figure("f0_absolute_95_hz", Intervals.F0Hz(reading, absolute: true));
        json.Figure("q", reading.Q);
        json.Figure("q_repeatability_95", Intervals.Q(reading, absolute: false));
        json.Figure("q_absolute_95", Intervals.Q(reading, absolute: true));
        json.Figure("ring_q", reading.RingQ);
        json.Figure("ring_q_standard_relative", reading.RingQRelative);
        json.Figure("peak_counts", reading.PeakCounts);
        json.Figure("feed_through_ratio", reading.FeedThrough);
        json.Figure("board_s", reading.BoardSeconds);
        json.WriteNumber("board_time_us", reading.BoardTimeUs);
        json.Objects("reasons", reading.Reasons, reason =>
        {
            json.WriteString("code", reason.Name);
            json.WriteString("at_best", reason.AtBest.ToString().ToLowerInvariant());
            json.WriteString("detail", reason.Detail);
            json.WriteString("advice", reason.Advice);
        });
        json.Objects("budget", reading.Budget.Lines, line =>
        {
            json.WriteString("term", line.Term);
            json.Figure("f0_standard_hz", line.F0Hz);
            json.Figure("q_standard_relative", line.QRelative);
            json.WriteBoolean("repeatability", line.Repeatability);
            json.Figure("degrees_of_freedom", line.DegreesOfFreedom);
            json.WriteString("origin", line.Origin);
        });
        json.WriteString("coil", reading.Coil);
        json.WriteString("note", reading.Note);
        json.WriteStartObject("set_up");
        foreach ((string key, string value) in reading.SetUp)
        {
            json.WriteString(key, value);
        }

        json.WriteEndObject();
        json.WriteStartObject("box");
        json.WriteString("port", reading.Box.Port);
        json.WriteString("board", reading.Box.Board);
        json.WriteString("firmware", reading.Box.FirmwareVersion);
        json.WriteNumber("boot_id", reading.Box.BootId);
        json.WriteEndObject();
        json.WriteString("host_version", reading.HostVersion);
        json.Objects("points", reading.Points, point =>
        {
            json.WriteNumber("drive_hz", point.Setting.FrequencyHz);
            json.WriteNumber("duty_bits", point.Setting.DutyBits);
            json.WriteNumber("divider", point.Setting.Divider);
            json.WriteNumber("duty_count", point.Setting.DutyCount);
            json.WriteNumber("samples", point.Samples);
            json.WriteNumber("sum", point.Sum);
            if (point.SumSquares is long squares)
            {
                json.WriteNumber("sum_squares", squares);
            }
            else
            {
                json.WriteNull("sum_squares");
            }

            json.WriteNumber("min", point.Min);
            json.WriteNumber("max", point.Max);
            json.WriteNumber("board_time_us", point.BoardTimeUs);
        });
    }
}
