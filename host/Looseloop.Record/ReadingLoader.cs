using Looseloop.Readings;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>Loads whole readings.</summary>
internal static class ReadingLoader
{
    /// <summary>The columns of a raw point.</summary>
    public const string PointColumns = "duty_bits, divider, duty_count, frequency_hz, samples, sum, sum_squares, min, max, board_time_us";

    private const string Query =
        "SELECT r.id, r.utc_us, r.monotonic_s, r.f0_hz, r.q, r.temperature_c, r.peak_counts, r.feed_through, r.ring_q, r.ring_q_relative, "
        + "r.board_time_us, r.board_s, r.host_version, r.coil, r.note, r.verdict, coalesce(r.refit_of, r.number), s.json, "
        + "b.port, b.board, b.firmware_version, b.protocol_version, b.boot_id, b.most_duty_bits, b.lowest_hz, b.highest_hz, b.full_counts, "
        + "b.inputs FROM reading r JOIN box b ON b.number = r.box JOIN set_up s ON s.number = r.set_up WHERE r.number = @0";

    /// <summary>The reading of a number, or null where there is none.</summary>
    public static Reading? Load(SqliteConnection connection, long number)
    {
        using SqliteCommand command = connection.Command(Query, number);
        using SqliteDataReader row = command.ExecuteReader();
        if (!row.Read())
        {
            return null;
        }

        long pointsOf = row.GetInt64(16);
        return new Reading
        {
            Id = row.Guid(0),
            Utc = row.Time(1),
            MonotonicS = row.Double(2),
            F0Hz = row.Double(3),
            Q = row.Double(4),
            TemperatureC = row.Double(5),
            PeakCounts = row.Double(6),
            FeedThrough = row.Double(7),
            RingQ = row.Double(8),
            RingQRelative = row.Double(9),
            BoardTimeUs = row.GetInt64(10),
            BoardSeconds = row.Double(11),
            HostVersion = row.GetString(12),
            Coil = row.Text(13),
            Note = row.Text(14),
            Verdict = (Verdict)row.GetInt64(15),
            SetUp = TextMap.FromJson(row.GetString(17)),
            Box = Box(row, 18),
            Budget = new Budget(Lines(connection, number)),
            Reasons = Reasons(connection, number),
            Points = Points(connection, pointsOf),
            Dark = Dark(connection, pointsOf),
            Basis = BasisLoader.Load(connection, number, pointsOf),
        };
    }

    /// <summary>A box from ten columns.</summary>
    public static BoxIdentity Box(SqliteDataReader row, int first) => new(
        row.GetString(first), row.GetString(first + 1), row.GetString(first + 2), row.GetInt32(first + 3), row.GetInt64(first + 4),
        row.GetInt32(first + 5), row.GetInt32(first + 6), row.GetInt32(first + 7), row.GetInt32(first + 8), row.GetInt32(first + 9));

    private static List<BudgetLine> Lines(SqliteConnection connection, long number) => connection.All(
        "SELECT term, f0_hz, q_relative, repeatability, degrees_of_freedom, origin FROM budget_line WHERE reading = @0 ORDER BY place",
        row => new BudgetLine(
            row.GetString(0), row.GetDouble(1), row.GetDouble(2), row.GetInt64(3) != 0,
            row.IsDBNull(4) ? double.PositiveInfinity : row.GetDouble(4), row.GetString(5)),
        number);

    // A code that this program does not know can only come from a damaged record: newer ones are refused at opening.
    private static List<Reason> Reasons(SqliteConnection connection, long number) => connection.All(
        "SELECT code, detail FROM reason WHERE reading = @0 ORDER BY place",
        row => new Reason(
            Enum.TryParse(row.GetString(0), out ReasonCode code) && Enum.IsDefined(code)
                ? code
                : throw new RecordException(RecordProblem.Corrupt, $"Reading {number} has an unknown reason \"{row.GetString(0)}\"."),
            row.GetString(1)),
        number);

    /// <summary>A point from <see cref="PointColumns"/>.</summary>
    public static RawPoint Point(SqliteDataReader row) => new(
        new Setting(row.GetInt32(0), row.GetInt32(1), row.GetInt32(2), row.GetDouble(3)), row.GetInt32(4), row.GetInt64(5), row.Long(6),
        row.GetInt32(7), row.GetInt32(8), row.GetInt64(9));

    private static List<RawPoint> Points(SqliteConnection connection, long number) => connection.All(
        $"SELECT {PointColumns} FROM point WHERE reading = @0 ORDER BY place", Point, number);

    private static List<DarkLevel> Dark(SqliteConnection connection, long number) => connection.All(
        "SELECT channel, samples, sum, sum_squares, min, max, from_us, to_us FROM dark WHERE reading = @0 ORDER BY place",
        row => new DarkLevel(
            row.GetInt32(0), row.GetInt32(1), row.GetInt64(2), row.GetInt64(3), row.GetInt32(4), row.GetInt32(5), row.GetInt64(6),
            row.GetInt64(7)),
        number);
}
