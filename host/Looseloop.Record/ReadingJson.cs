using System.Text.Json;
using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>The fields of a reading as JSON, within an object of the caller's.</summary>
internal static class ReadingJson
{
    public static void Write(Utf8JsonWriter json, ReadingSummary figures, Reading reading)
    {
        json.WriteNumber("number", figures.Number);
        json.WriteString("id", figures.Id);
        json.WriteNumber("run", figures.Run);
        Number(json, "refit_of", figures.RefitOf ?? double.NaN);
        json.WriteString("utc", Iso.Text(reading.Utc));
        Number(json, "monotonic_s", reading.MonotonicS);
        json.WriteNumber("board_time_us", reading.BoardTimeUs);
        Number(json, "board_s", reading.BoardSeconds);
        json.WriteString("host_version", reading.HostVersion);
        Box(json, reading.Box);
        json.WriteString("coil", reading.Coil);
        json.WriteString("note", reading.Note);
        Map(json, "set_up", reading.SetUp);
        json.WriteString("verdict", reading.Verdict.ToString().ToLowerInvariant());
        Number(json, "f0_hz", reading.F0Hz);
        Number(json, "u_f0_repeatability_hz", figures.F0RepeatabilityHz);
        Number(json, "u_f0_absolute_hz", figures.F0AbsoluteHz);
        Number(json, "q", reading.Q);
        Number(json, "u_q_repeatability", figures.QRepeatability);
        Number(json, "u_q_absolute", figures.QAbsolute);
        Number(json, "peak_counts", reading.PeakCounts);
        Number(json, "feed_through", reading.FeedThrough);
        Number(json, "ring_q", reading.RingQ);
        Number(json, "u_ring_q_relative", reading.RingQRelative);
        Number(json, "temperature_c", reading.TemperatureC);
        Reasons(json, reading);
        Lines(json, reading.Budget);
        Points(json, "points", reading.Points);
        Dark(json, reading.Dark);
        if (reading.Basis is { } basis)
        {
            json.WriteStartObject("fit_basis");
            BasisJson.Write(json, basis);
            Points(json, "at_other_duty", basis.AtOtherDuty);
            Points(json, "after_longer_dwell", basis.AfterLongerDwell);
            json.WriteEndObject();
        }
    }

    public static void Number(Utf8JsonWriter json, string name, double value)
    {
        if (double.IsFinite(value))
        {
            json.WriteNumber(name, value);
        }
        else
        {
            json.WriteNull(name);
        }
    }

    public static void Map(Utf8JsonWriter json, string name, IReadOnlyDictionary<string, string> map)
    {
        json.WriteStartObject(name);
        foreach ((string key, string value) in map)
        {
            json.WriteString(key, value);
        }

        json.WriteEndObject();
    }

    public static void Box(Utf8JsonWriter json, BoxIdentity box)
    {
        json.WriteStartObject("box");
        json.WriteString("port", box.Port);
        json.WriteString("board", box.Board);
        json.WriteString("firmware_version", box.FirmwareVersion);
        json.WriteNumber("protocol_version", box.ProtocolVersion);
        json.WriteNumber("boot_id", box.BootId);
        json.WriteNumber("most_duty_bits", box.MostDutyBits);
        json.WriteNumber("lowest_hz", box.LowestHz);
        json.WriteNumber("highest_hz", box.HighestHz);
        json.WriteNumber("full_counts", box.FullCounts);
        json.WriteNumber("inputs", box.Inputs);
        json.WriteEndObject();
    }

    private static void Reasons(Utf8JsonWriter json, Reading reading)
    {
        json.WriteStartArray("reasons");
        foreach (Reason reason in reading.Reasons)
        {
            json.WriteStartObject();
            json.WriteString("code", reason.Name);
            json.WriteString("detail", reason.Detail);
            json.WriteString("advice", reason.Advice);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Lines(Utf8JsonWriter json, Budget budget)
    {
        json.WriteStartArray("budget");
        foreach (BudgetLine line in budget.Lines)
        {
            json.WriteStartObject();
            json.WriteString("term", line.Term);
            Number(json, "u_f0_hz", line.F0Hz);
            Number(json, "u_q_relative", line.QRelative);
            json.WriteBoolean("repeatability", line.Repeatability);
            Number(json, "degrees_of_freedom", line.DegreesOfFreedom);
            json.WriteString("origin", line.Origin);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Points(Utf8JsonWriter json, string name, IReadOnlyList<RawPoint> points)
    {
        json.WriteStartArray(name);
        foreach (RawPoint point in points)
        {
            json.WriteStartObject();
            json.WriteNumber("frequency_hz", point.Setting.FrequencyHz);
            json.WriteNumber("duty_bits", point.Setting.DutyBits);
            json.WriteNumber("divider", point.Setting.Divider);
            json.WriteNumber("duty_count", point.Setting.DutyCount);
            json.WriteNumber("samples", point.Samples);
            json.WriteNumber("sum_counts", point.Sum);
            Number(json, "sum_squares_counts2", point.SumSquares ?? double.NaN);
            json.WriteNumber("min_counts", point.Min);
            json.WriteNumber("max_counts", point.Max);
            json.WriteNumber("board_time_us", point.BoardTimeUs);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Dark(Utf8JsonWriter json, IReadOnlyList<DarkLevel> levels)
    {
        json.WriteStartArray("dark");
        foreach (DarkLevel dark in levels)
        {
            json.WriteStartObject();
            json.WriteNumber("channel", dark.Channel);
            json.WriteNumber("samples", dark.Samples);
            json.WriteNumber("sum_counts", dark.Sum);
            json.WriteNumber("sum_squares_counts2", dark.SumSquares);
            json.WriteNumber("min_counts", dark.Min);
            json.WriteNumber("max_counts", dark.Max);
            json.WriteNumber("from_us", dark.FromUs);
            json.WriteNumber("to_us", dark.ToUs);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }
}
