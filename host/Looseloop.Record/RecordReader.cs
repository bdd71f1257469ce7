using System.Globalization;
using System.Text;
using Looseloop.Readings;
using Microsoft.Data.Sqlite;
using SQLitePCL;

namespace Looseloop.Record;

/// <summary>Queries over a record. Opened by itself it only reads, also while another program writes.</summary>
public sealed class RecordReader : IDisposable
{
    private const string SummaryColumns =
        "number, id, run, refit_of, utc_us, coil, note, f0_hz, f0_repeatability_hz, f0_absolute_hz, q, q_repeatability, q_absolute, verdict";

    private readonly SqliteConnection _connection;
    private readonly bool _owns;

    internal RecordReader(string path, SqliteConnection connection, bool ownsConnection)
    {
        Path = path;
        _connection = connection;
        _owns = ownsConnection;
    }

    /// <summary>The file.</summary>
    public string Path { get; }

    internal SqliteConnection Connection => _connection;

    /// <summary>Opens a record for reading.</summary>
    /// <exception cref="RecordException">There is none, or it cannot be read.</exception>
    public static RecordReader Open(string path)
    {
        string full = System.IO.Path.GetFullPath(path);
        return new RecordReader(full, RecordFile.OpenForReading(full), ownsConnection: true);
    }

    /// <summary>Runs, the newest first.</summary>
    public IReadOnlyList<RunSummary> Runs(HistoryQuery query) => Guard(() =>
    {
        (string where, object[] values) = Where(query, hasProcedure: true);
        List<RunSummary> runs = _connection.All(
            "SELECT run.number, run.id, run.utc_us, procedure, coil, note, s.utc_us, s.status, s.reason, "
            + "coalesce(s.count, (SELECT count(*) FROM reading WHERE reading.run = run.number)) "
            + $"FROM run LEFT JOIN run_stop s ON s.run = run.number {where} ORDER BY run.number DESC LIMIT {Number(query.Limit)}",
            row => new RunSummary(
                row.GetInt64(0), row.Guid(1), row.Time(2), row.GetString(3), row.Text(4), row.Text(5),
                row.IsDBNull(6) ? null : new RunStop(row.Guid(1), row.Time(6), (RunStatus)row.GetInt64(7), row.GetString(8), row.GetInt64(9)),
                row.GetInt64(9), null),
            values);
        return runs.ConvertAll(run => run with
        {
            Last = _connection.All(
                $"SELECT {SummaryColumns} FROM reading WHERE run = @0 ORDER BY number DESC LIMIT 1", Summary, run.Number).FirstOrDefault(),
        });
    });

    /// <summary>Readings, refits among them, the newest first.</summary>
    public IReadOnlyList<ReadingSummary> Readings(HistoryQuery query) => Guard(() =>
    {
        (string where, object[] values) = Where(query, hasProcedure: false);
        return _connection.All(
            $"SELECT {SummaryColumns} FROM reading {where} ORDER BY number DESC LIMIT {Number(query.Limit)}", Summary, values);
    });

    /// <summary>The numbers of the runs that fit a query, the oldest first: what an export goes through.</summary>
    public IReadOnlyList<long> RunNumbers(HistoryQuery query) => Guard(() =>
    {
        (string where, object[] values) = Where(query, hasProcedure: true);
        return _connection.All(
            $"SELECT number FROM (SELECT number FROM run {where} ORDER BY number DESC LIMIT {Number(query.Limit)}) ORDER BY number",
            row => row.GetInt64(0), values);
    });

    /// <summary>The numbers of all readings of a run, refits among them, in the order they were kept.</summary>
    public IReadOnlyList<long> AllReadingsOf(long run) => Guard(() => _connection.All(
        "SELECT number FROM reading WHERE run = @0 ORDER BY number", row => row.GetInt64(0), run));

    /// <summary>How many readings the record holds.</summary>
    public long CountReadings() => Guard(() => (long)_connection.Command("SELECT count(*) FROM reading").ExecuteScalar()!);

    /// <summary>
    /// The number of the full reading that a tracked one rests on: the last one in its run before it that has figures and what
    /// they were made with; null where there is none.
    /// </summary>
    public long? FullReadingBefore(long number) => Guard(() => First(
        // Backwards through the full readings, which are few: a CROSS JOIN keeps that order (sqlite.org/optoverview.html).
        "SELECT b.reading FROM fit_basis b CROSS JOIN reading r ON r.number = b.reading WHERE b.reading < @0 "
        + "AND r.run = (SELECT run FROM reading WHERE number = @0) AND r.refit_of IS NULL AND r.f0_hz IS NOT NULL ORDER BY b.reading DESC LIMIT 1",
        number));

    /// <summary>The refits of a reading, the oldest first.</summary>
    public IReadOnlyList<ReadingSummary> Refits(long number) => Guard(() => _connection.All(
        $"SELECT {SummaryColumns} FROM reading WHERE refit_of = @0 ORDER BY number", Summary, number));

    /// <summary>The figures of one reading.</summary>
    /// <exception cref="RecordException">There is none of this number.</exception>
    public ReadingSummary Figures(long number) => Guard(() => _connection.All(
        $"SELECT {SummaryColumns} FROM reading WHERE number = @0", Summary, number).FirstOrDefault() ?? throw NoReading(number));

    /// <summary>A whole reading with its raw points; a refit has those of the reading it fits again.</summary>
    /// <exception cref="RecordException">There is none of this number.</exception>
    public Reading Reading(long number) => Guard(() => ReadingLoader.Load(_connection, number) ?? throw NoReading(number));

    /// <summary>A run's documents without its readings.</summary>
    /// <exception cref="RecordException">There is none of this number.</exception>
    public RunDocument Run(long number) => Guard(() => RunLoader.Load(_connection, number) ?? throw new RecordException(
        RecordProblem.NotFound, $"There is no run {Number(number)} in the record."));

    /// <summary>The numbers of a run's readings, in the order they were taken; refits are left out.</summary>
    public IReadOnlyList<long> ReadingsOf(long run) => Guard(() => _connection.All(
        "SELECT number FROM reading WHERE run = @0 AND refit_of IS NULL ORDER BY number", row => row.GetInt64(0), run));

    /// <summary>
    /// A run's readings as drift needs them, in the order they were taken, one at a time: memory does not grow with the run.
    /// </summary>
    public IEnumerable<TrackPoint> Track(long run)
    {
        // Not an ORDER BY over an index of another column: numbers of one run rise with time.
        using SqliteCommand command = _connection.Command(
            "SELECT number, utc_us, monotonic_s, f0_hz, f0_repeatability_hz, q, q_repeatability, temperature_c, verdict "
            + "FROM reading WHERE run = @0 AND refit_of IS NULL ORDER BY number",
            run);
        using SqliteDataReader row = Guard(command.ExecuteReader);
        TrackClock clock = default;

        // A million rows of nine columns: columns are read from SQLite's own statement, and no delegate is made for each row.
        sqlite3_stmt columns = row.Handle!;
        Func<bool> read = row.Read;
        while (Guard(read))
        {
            yield return new TrackPoint(
                columns.Whole(0), clock.Next(columns.Whole(1), columns.Real(2)), columns.Real(3), columns.Real(4), columns.Real(5),
                columns.Real(6), columns.Real(7), (Verdict)columns.Whole(8));
        }
    }

    /// <summary>
    /// The number of the reading that a user means: a number, "last", "previous" (the one before the last, of the same coil), or a
    /// note (the newest with it, else the newest whose note begins with it). Words never find a refit; its number does.
    /// </summary>
    /// <exception cref="RecordException">Nothing fits.</exception>
    public long Find(string words) => Guard(() =>
    {
        string text = words.Trim();
        if (long.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out long number))
        {
            return Figures(number).Number;
        }

        long? found = text.ToLowerInvariant() switch
        {
            "last" => First("SELECT max(number) FROM reading WHERE refit_of IS NULL"),
            "previous" => First(
                "SELECT max(r.number) FROM reading r, (SELECT number, coil FROM reading WHERE refit_of IS NULL ORDER BY number DESC LIMIT 1) l "
                + "WHERE r.refit_of IS NULL AND r.number < l.number AND r.coil IS l.coil"),
            _ => First("SELECT max(number) FROM reading WHERE refit_of IS NULL AND note = @0 COLLATE NOCASE", text)
                ?? First("SELECT max(number) FROM reading WHERE refit_of IS NULL AND substr(note, 1, length(@0)) = @0 COLLATE NOCASE", text),
        };
        return found ?? throw new RecordException(
            RecordProblem.NotFound, $"There is no reading \"{text}\" in the record: give a number, last, previous, or a note.");
    });

    /// <summary>The newest fact of a kind, or null.</summary>
    public Fact? LatestFact(FactSubject subject, string name, string kind) =>
        Facts(subject, name, kind) is { Count: > 0 } facts ? facts[^1] : null;

    /// <summary>Facts of a subject, the oldest first; all kinds where <paramref name="kind"/> is null.</summary>
    public IReadOnlyList<Fact> Facts(FactSubject subject, string name, string? kind = null) => Guard(() => _connection.All(
        "SELECT id, subject_kind, subject, kind, utc_us, host_version, json FROM fact "
        + "WHERE subject_kind = @0 AND subject = @1 AND (@2 IS NULL OR kind = @2) ORDER BY utc_us, number",
        row => new Fact(
            row.Guid(0), (FactSubject)row.GetInt64(1), row.GetString(2), row.GetString(3), row.Time(4), row.GetString(5), row.GetString(6)),
        (long)subject, name, Sql.OrNull(kind)));

    /// <summary>SQLite's own check of the whole file: an empty list, or what is wrong.</summary>
    public IReadOnlyList<string> CheckIntegrity() => Guard(() =>
    {
        List<string> lines = _connection.All("PRAGMA integrity_check", row => row.GetString(0));
        lines.AddRange(_connection.All("PRAGMA foreign_key_check", row => $"a row of {row.GetString(0)} points to nothing in {row.GetString(2)}"));
        return lines is ["ok"] ? [] : lines.FindAll(line => line != "ok");
    });

    public void Dispose()
    {
        if (_owns)
        {
            _connection.Dispose();
        }
    }

    private static ReadingSummary Summary(SqliteDataReader row) => new(
        row.GetInt64(0), row.Guid(1), row.GetInt64(2), row.Long(3), row.Time(4), row.Text(5), row.Text(6), row.Double(7), row.Double(8),
        row.Double(9), row.Double(10), row.Double(11), row.Double(12), (Verdict)row.GetInt64(13));

    private static (string Where, object[] Values) Where(HistoryQuery query, bool hasProcedure)
    {
        string table = hasProcedure ? "run" : "reading";
        StringBuilder where = new();
        List<object> values = [];
        Add($"{table}.coil = ", query.Coil);
        Add(hasProcedure ? "procedure = " : "run IN (SELECT number FROM run WHERE procedure = ", query.Procedure, hasProcedure ? "" : ")");
        Add($"instr(lower({table}.note), lower(", query.Note, ")) > 0");
        Add($"{table}.utc_us >= ", query.Since is { } since ? Sql.Microseconds(since) : null);
        Add($"{table}.utc_us <= ", query.Until is { } until ? Sql.Microseconds(until) : null);
        return (where.ToString(), [.. values]);

        void Add(string condition, object? value, string rest = "")
        {
            if (value is not null)
            {
                where.Append(values.Count == 0 ? "WHERE " : " AND ").Append(condition).Append('@').Append(Number(values.Count)).Append(rest);
                values.Add(value);
            }
        }
    }

    private static string Number(long number) => number.ToString(CultureInfo.InvariantCulture);

    private static RecordException NoReading(long number) => new(RecordProblem.NotFound, $"There is no reading {Number(number)} in the record.");

    private long? First(string sql, params ReadOnlySpan<object> values)
    {
        using SqliteCommand command = _connection.Command(sql, values);
        return command.ExecuteScalar() as long?;
    }

    private T Guard<T>(Func<T> action) => SqliteErrors.Guard(Path, action);
}
