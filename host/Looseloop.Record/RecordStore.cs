using Looseloop.Readings;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>
/// A record open for writing. Every call that returns has put its document on the disk (WAL, synchronous FULL); a call that
/// throws has changed nothing. One writer at a time; readers may look on. Not for use by several threads at once.
/// </summary>
public sealed class RecordStore : IRunSink, IDisposable
{
    private readonly SqliteConnection _connection;
    private readonly WriterLock _lock;
    private readonly ReadingWriter _readings;
    private readonly Dictionary<Guid, long> _open = [];

    private RecordStore(string path, SqliteConnection connection, WriterLock held)
    {
        Path = path;
        _connection = connection;
        _lock = held;
        _readings = new ReadingWriter(connection);
        Reader = new RecordReader(path, connection, ownsConnection: false);
    }

    /// <summary>The file.</summary>
    public string Path { get; }

    /// <summary>Queries over this record.</summary>
    public RecordReader Reader { get; }

    /// <summary>The runs that had no stop document when the record was opened, and were closed as interrupted.</summary>
    public IReadOnlyList<long> ClosedAtOpening { get; private set; } = [];

    internal SqliteConnection Connection => _connection;

    /// <summary>Opens a record for writing, or makes one; its folder is made too.</summary>
    /// <param name="path">The file.</param>
    /// <param name="utcNow">The time that goes into the stop documents of runs found without one.</param>
    /// <exception cref="RecordException">It cannot be used; it is left as it was.</exception>
    public static RecordStore Open(string path, DateTimeOffset utcNow)
    {
        string full = System.IO.Path.GetFullPath(path);
        MakeFolder(full);
        WriterLock held = WriterLock.Take(full);
        SqliteConnection? connection = null;
        try
        {
            connection = RecordFile.OpenForWriting(full);
            RecordStore store = new(full, connection, held);
            store.ClosedAtOpening = store.CloseUnfinished(utcNow);
            return store;
        }
        catch
        {
            connection?.Dispose();
            held.Dispose();
            throw;
        }
    }

    /// <inheritdoc/>
    public void Append(RunStart document) => Write(transaction =>
    {
        object box = document.Box is { } identity ? _readings.BoxNumber(transaction, identity) : DBNull.Value;
        using SqliteCommand command = _connection.Command(
            "INSERT INTO run (id, utc_us, procedure, host_version, box, coil, note, options_json) VALUES (@0, @1, @2, @3, @4, @5, @6, @7) "
            + "ON CONFLICT (id) DO UPDATE SET id = id RETURNING number",
            Sql.Bytes(document.Id), Sql.Microseconds(document.Utc), document.Procedure, document.HostVersion, box,
            Sql.OrNull(document.Coil), Sql.OrNull(document.Note), TextMap.ToJson(document.Options));
        command.Transaction = transaction;
        long number = (long)command.ExecuteScalar()!;
        return () => _open[document.Id] = number;
    });

    /// <inheritdoc/>
    public void Append(Guid runId, Reading reading) => Write(transaction =>
    {
        _readings.Write(transaction, Number(runId), reading, null);
        return null;
    });

    /// <summary>Keeps many readings in one transaction: all or none.</summary>
    public void AppendMany(Guid runId, IEnumerable<Reading> readings) => Write(transaction =>
    {
        long run = Number(runId);
        foreach (Reading reading in readings)
        {
            _readings.Write(transaction, run, reading, null);
        }

        return null;
    });

    /// <summary>Keeps a reading that was fitted again to the raw points of an earlier one; both stay.</summary>
    /// <param name="runId">An open run.</param>
    /// <param name="refit">The new reading, with an id of its own; its points are not stored a second time.</param>
    /// <param name="original">The number of the earlier one.</param>
    public void AppendRefit(Guid runId, Reading refit, long original) => Write(transaction =>
    {
        long? refitOf = (long?)_connection.Command("SELECT coalesce(refit_of, number) FROM reading WHERE number = @0", original).In(transaction);
        _readings.Write(transaction, Number(runId), refit, refitOf ?? throw NoReading(original));
        return null;
    });

    /// <inheritdoc/>
    public void Append(RunEvent document) => Write(transaction =>
    {
        _connection.Command(
            "INSERT INTO event (id, run, utc_us, monotonic_s, kind, from_us, to_us, detail) VALUES (@0, @1, @2, @3, @4, @5, @6, @7) "
            + "ON CONFLICT (id) DO NOTHING",
            Sql.Bytes(document.Id), Number(document.RunId), Sql.Microseconds(document.Utc), Sql.OrNull(document.MonotonicS),
            (long)document.Kind, Sql.OrNull(document.From is { } from ? Sql.Microseconds(from) : null),
            Sql.OrNull(document.To is { } to ? Sql.Microseconds(to) : null), document.Detail).In(transaction);
        return null;
    });

    /// <inheritdoc/>
    public void Append(RunStop document) => Write(transaction =>
    {
        _connection.Command(
            "INSERT INTO run_stop (run, utc_us, status, reason, count) VALUES (@0, @1, @2, @3, @4)",
            Number(document.RunId), Sql.Microseconds(document.Utc), (long)document.Status, document.Reason, document.Count).In(transaction);
        return () => _open.Remove(document.RunId);
    });

    /// <summary>Keeps a fact about a box or a coil.</summary>
    public void Append(Fact fact) => Write(transaction =>
    {
        _connection.Command(
            "INSERT INTO fact (id, subject_kind, subject, kind, utc_us, host_version, json) VALUES (@0, @1, @2, @3, @4, @5, @6) "
            + "ON CONFLICT (id) DO NOTHING",
            Sql.Bytes(fact.Id), (long)fact.Subject, fact.Name, fact.Kind, Sql.Microseconds(fact.Utc), fact.HostVersion, fact.Json).In(transaction);
        return null;
    });

    /// <summary>
    /// Merges another record into this one: what is there already (by its id) is left, everything else is added. All or
    /// nothing. The other record is only read.
    /// </summary>
    public ImportResult Import(string otherPath, DateTimeOffset utcNow) => RecordImport.Run(this, otherPath, utcNow);

    public void Dispose()
    {
        _readings.Dispose();
        _connection.Dispose();
        _lock.Dispose();
    }

    /// <summary>Runs a write in a transaction of its own; what it returns is done after the commit.</summary>
    internal void Write(Func<SqliteTransaction, Action?> action) => SqliteErrors.Guard(Path, () =>
    {
        using SqliteTransaction transaction = _connection.BeginTransaction(deferred: false);
        try
        {
            Action? afterwards = action(transaction);
            transaction.Commit();
            afterwards?.Invoke();
        }
        catch
        {
            _readings.Forget();
            throw;
        }
    });

    private static RecordException NoReading(long number) => new(RecordProblem.NotFound, $"There is no reading {number} in the record.");

    private static void MakeFolder(string path)
    {
        try
        {
            Directory.CreateDirectory(System.IO.Path.GetDirectoryName(path)!);
        }
        catch (Exception error) when (error is UnauthorizedAccessException or IOException)
        {
            throw new RecordException(
                RecordProblem.NoPermission, $"The folder of the record {path} cannot be made: {error.Message} Use another file with --record.", error);
        }
    }

    private long Number(Guid runId) =>
        _open.TryGetValue(runId, out long number) ? number : throw new InvalidOperationException($"the run {runId} is not open");

    // The writer's lock is held: nobody else can be at work on such a run. Its last reading or event tells when it ended.
    private List<long> CloseUnfinished(DateTimeOffset utcNow)
    {
        List<long> found = _connection.All(
            "SELECT number FROM run WHERE number NOT IN (SELECT run FROM run_stop) ORDER BY number", row => row.GetInt64(0));
        if (found.Count > 0)
        {
            Write(transaction =>
            {
                foreach (long run in found)
                {
                    _connection.Command(
                        "INSERT INTO run_stop (run, utc_us, status, reason, count, assumed) VALUES (@0, @1, @2, @3, "
                        + "(SELECT count(*) FROM reading WHERE run = @0), 1)",
                        run, Sql.Microseconds(utcNow), (long)RunStatus.Interrupted, "found without a stop document at the next start").In(transaction);
                }

                return null;
            });
        }

        return found;
    }
}
