using Looseloop.Readings;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>Writes whole readings, within a transaction of the caller's.</summary>
internal sealed class ReadingWriter : IDisposable
{
    private const string Ignore = "ON CONFLICT (id) DO NOTHING RETURNING number";

    private readonly SqliteConnection _connection;
    private readonly PreparedInsert _reading;
    private readonly PreparedInsert _line;
    private readonly PreparedInsert _reason;
    private readonly PreparedInsert _point;
    private readonly PreparedInsert _dark;
    private readonly BasisWriter _basis;
    private readonly Dictionary<BoxIdentity, long> _boxes = [];
    private readonly Dictionary<string, long> _setUps = [];

    public ReadingWriter(SqliteConnection connection)
    {
        _connection = connection;
        _reading = new(
            connection, "reading",
            "id, run, refit_of, utc_us, monotonic_s, f0_hz, f0_repeatability_hz, f0_absolute_hz, q, q_repeatability, q_absolute, verdict, "
            + "temperature_c, peak_counts, feed_through, ring_q, ring_q_relative, board_time_us, board_s, box, set_up, host_version, coil, note",
            Ignore);
        _line = new(connection, "budget_line", "reading, place, term, f0_hz, q_relative, repeatability, degrees_of_freedom, origin");
        _reason = new(connection, "reason", "reading, place, code, detail");
        _point = new(
            connection, "point",
            "reading, place, duty_bits, divider, duty_count, frequency_hz, samples, sum, sum_squares, min, max, board_time_us");
        _dark = new(connection, "dark", "reading, place, channel, samples, sum, sum_squares, min, max, from_us, to_us");
        _basis = new(connection);
    }

    /// <summary>Writes a reading; false where one of its id is there already.</summary>
    /// <param name="transaction">The transaction it is part of.</param>
    /// <param name="run">The run's number.</param>
    /// <param name="reading">The reading.</param>
    /// <param name="refitOf">The number of the reading whose raw points it was fitted to again, or null.</param>
    public bool Write(SqliteTransaction transaction, long run, Reading reading, long? refitOf)
    {
        Budget budget = reading.Budget;
        long? number = _reading.Run(
            transaction, Sql.Bytes(reading.Id), run, Sql.OrNull(refitOf), Sql.Microseconds(reading.Utc), Sql.OrNull(reading.MonotonicS),
            Sql.OrNull(reading.F0Hz), budget.F0Hz(false), budget.F0Hz(true), Sql.OrNull(reading.Q), budget.QRelative(false) * Scale(reading.Q),
            budget.QRelative(true) * Scale(reading.Q), (long)reading.Verdict, Sql.OrNull(reading.TemperatureC), Sql.OrNull(reading.PeakCounts),
            Sql.OrNull(reading.FeedThrough), Sql.OrNull(reading.RingQ), Sql.OrNull(reading.RingQRelative), reading.BoardTimeUs,
            Sql.OrNull(reading.BoardSeconds), BoxNumber(transaction, reading.Box), SetUpNumber(transaction, reading.SetUp), reading.HostVersion,
            Sql.OrNull(reading.Coil), Sql.OrNull(reading.Note));
        if (number is not { } own)
        {
            return false;
        }

        for (int i = 0; i < budget.Lines.Count; i++)
        {
            BudgetLine line = budget.Lines[i];
            _line.Run(
                transaction, own, (long)i, line.Term, line.F0Hz, line.QRelative, line.Repeatability ? 1L : 0L,
                Sql.OrNull(line.DegreesOfFreedom), line.Origin);
        }

        for (int i = 0; i < reading.Reasons.Count; i++)
        {
            _reason.Run(transaction, own, (long)i, reading.Reasons[i].Code.ToString(), reading.Reasons[i].Detail);
        }

        _basis.Write(transaction, own, reading.Basis, withPoints: refitOf is null);
        if (refitOf is null)
        {
            WritePoints(transaction, own, reading);
        }

        return true;
    }

    /// <summary>The number of a box, which is added where it is new.</summary>
    public long BoxNumber(SqliteTransaction transaction, BoxIdentity box)
    {
        if (!_boxes.TryGetValue(box, out long number))
        {
            const string Columns =
                "port, board, firmware_version, protocol_version, boot_id, most_duty_bits, lowest_hz, highest_hz, full_counts, inputs";
            using SqliteCommand command = _connection.Command(
                $"INSERT INTO box ({Columns}) VALUES (@0, @1, @2, @3, @4, @5, @6, @7, @8, @9) ON CONFLICT DO UPDATE SET port = port RETURNING number",
                box.Port, box.Board, box.FirmwareVersion, (long)box.ProtocolVersion, box.BootId, (long)box.MostDutyBits, (long)box.LowestHz,
                (long)box.HighestHz, (long)box.FullCounts, (long)box.Inputs);
            command.Transaction = transaction;
            number = (long)command.ExecuteScalar()!;
            _boxes[box] = number;
        }

        return number;
    }

    /// <summary>Forgets numbers given out in a transaction that was rolled back.</summary>
    public void Forget()
    {
        _boxes.Clear();
        _setUps.Clear();
    }

    public void Dispose()
    {
        _reading.Dispose();
        _line.Dispose();
        _reason.Dispose();
        _point.Dispose();
        _dark.Dispose();
        _basis.Dispose();
    }

    // A reading without Q has a budget of nothing: zero keeps the column without a NaN.
    private static double Scale(double q) => double.IsFinite(q) ? q : 0;

    private long SetUpNumber(SqliteTransaction transaction, IReadOnlyDictionary<string, string> setUp)
    {
        string json = TextMap.ToJson(setUp);
        if (!_setUps.TryGetValue(json, out long number))
        {
            using SqliteCommand command = _connection.Command(
                "INSERT INTO set_up (json) VALUES (@0) ON CONFLICT DO UPDATE SET json = json RETURNING number", json);
            command.Transaction = transaction;
            number = (long)command.ExecuteScalar()!;
            _setUps[json] = number;
        }

        return number;
    }

    private void WritePoints(SqliteTransaction transaction, long reading, Reading document)
    {
        for (int i = 0; i < document.Points.Count; i++)
        {
            RawPoint point = document.Points[i];
            _point.Run(
                transaction, reading, (long)i, (long)point.Setting.DutyBits, (long)point.Setting.Divider, (long)point.Setting.DutyCount,
                point.Setting.FrequencyHz, (long)point.Samples, point.Sum, Sql.OrNull(point.SumSquares), (long)point.Min, (long)point.Max,
                point.BoardTimeUs);
        }

        for (int i = 0; i < document.Dark.Count; i++)
        {
            DarkLevel dark = document.Dark[i];
            _dark.Run(
                transaction, reading, (long)i, (long)dark.Channel, (long)dark.Samples, dark.Sum, dark.SumSquares, (long)dark.Min,
                (long)dark.Max, dark.FromUs, dark.ToUs);
        }
    }
}
