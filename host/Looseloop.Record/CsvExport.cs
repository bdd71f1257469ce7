using System.Globalization;
using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>
/// Readings or raw points as comma-separated values (RFC 4180): a header with the units in the names, a decimal point, times in
/// UTC by ISO 8601, empty where a figure is not known. Written row by row: memory does not grow with the record.
/// </summary>
public static class CsvExport
{
    private const string ReadingHeader =
        "number,id,run,refit_of,utc,monotonic_s,board_time_us,board_s,coil,note,set_up,verdict,reasons,f0_hz,u_f0_repeatability_hz,"
        + "u_f0_absolute_hz,q,u_q_repeatability,u_q_absolute,peak_counts,feed_through,ring_q,u_ring_q_relative,temperature_c,points,"
        + "port,board,boot_id,firmware_version,host_version";

    private const string PointHeader =
        "reading,place,frequency_hz,duty,duty_bits,divider,duty_count,samples,sum_counts,sum_squares_counts2,min_counts,max_counts,mean_counts,"
        + "board_time_us";

    /// <summary>Writes one row for each reading of some runs, and returns how many.</summary>
    public static long WriteReadings(RecordReader record, IEnumerable<long> runs, TextWriter output)
    {
        Line(output, ReadingHeader);
        long count = 0;
        foreach (long run in runs)
        {
            foreach (long number in record.AllReadingsOf(run))
            {
                ReadingSummary figures = record.Figures(number);
                Reading reading = record.Reading(number);
                Row(
                    output, Text(number), figures.Id.ToString(), Text(run), figures.RefitOf is { } of ? Text(of) : "", Iso.Text(reading.Utc),
                    Text(reading.MonotonicS), Text(reading.BoardTimeUs), Text(reading.BoardSeconds), reading.Coil ?? "", reading.Note ?? "",
                    string.Join("; ", reading.SetUp.Select(pair => $"{pair.Key}={pair.Value}")), Word(reading.Verdict),
                    string.Join(' ', reading.Reasons.Select(reason => reason.Name)), Text(reading.F0Hz), Text(figures.F0RepeatabilityHz),
                    Text(figures.F0AbsoluteHz), Text(reading.Q), Text(figures.QRepeatability), Text(figures.QAbsolute),
                    Text(reading.PeakCounts), Text(reading.FeedThrough), Text(reading.RingQ), Text(reading.RingQRelative),
                    Text(reading.TemperatureC), Text(reading.Points.Count), reading.Box.Port, reading.Box.Board, Text(reading.Box.BootId),
                    reading.Box.FirmwareVersion, reading.HostVersion);
                count++;
            }
        }

        return count;
    }

    /// <summary>Writes one row for each raw point of some runs' readings, and returns how many.</summary>
    public static long WritePoints(RecordReader record, IEnumerable<long> runs, TextWriter output)
    {
        Line(output, PointHeader);
        long count = 0;
        foreach (long number in runs.SelectMany(record.ReadingsOf))
        {
            IReadOnlyList<RawPoint> points = record.Reading(number).Points;
            for (int i = 0; i < points.Count; i++)
            {
                RawPoint point = points[i];
                Row(
                    output, Text(number), Text(i), Text(point.Setting.FrequencyHz), Text(point.Setting.Duty), Text(point.Setting.DutyBits),
                    Text(point.Setting.Divider), Text(point.Setting.DutyCount), Text(point.Samples), Text(point.Sum),
                    point.SumSquares is { } squares ? Text(squares) : "", Text(point.Min), Text(point.Max), Text(point.Mean),
                    Text(point.BoardTimeUs));
                count++;
            }
        }

        return count;
    }

    private static string Word(Verdict verdict) => verdict.ToString().ToLowerInvariant();

    private static string Text(long value) => value.ToString(CultureInfo.InvariantCulture);

    // "R" gives back the very same number when it is read again.
    private static string Text(double value) => double.IsFinite(value) ? value.ToString("R", CultureInfo.InvariantCulture) : "";

    private static void Row(TextWriter output, params ReadOnlySpan<string> fields)
    {
        for (int i = 0; i < fields.Length; i++)
        {
            if (i > 0)
            {
                output.Write(',');
            }

            output.Write(Quoted(fields[i]));
        }

        output.Write("\r\n");
    }

    private static string Quoted(string field) =>
        field.AsSpan().IndexOfAny("\",\r\n") < 0 ? field : "\"" + field.Replace("\"", "\"\"", StringComparison.Ordinal) + "\"";

    private static void Line(TextWriter output, string line)
    {
        output.Write(line);
        output.Write("\r\n");
    }
}
