using Looseloop.Readings;
using Looseloop.RecordBench;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record.Tests;

public sealed class MigrationTests : IDisposable
{
    private static readonly DateTimeOffset _now = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);

    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void A_record_of_the_first_version_is_brought_up_to_date_with_everything_in_it()
    {
        string path = _folder.File("old.db");
        using (SqliteConnection connection = new($"Data Source={path};Pooling=False"))
        {
            connection.Open();
            Migrations.Run(connection, 0, 1);
            Guid run = Guid.CreateVersion7();
            connection.Command(
                "INSERT INTO run (id, utc_us, procedure, host_version, options_json) VALUES (@0, 1, 'read', '0.0.1', '{}')",
                run.ToByteArray(bigEndian: true)).ExecuteNonQuery();
        }

        Assert.Equal(RecordProblem.OlderVersion, Assert.Throws<RecordException>(() => RecordReader.Open(path)).Problem);
        using RecordStore store = RecordStore.Open(path, _now);
        Assert.Equal("0.0.1", store.Reader.Run(1).Start.HostVersion);
        store.Append(new Fact(Guid.CreateVersion7(), FactSubject.Coil, "tall", "pull", _now, "0.1.0", "{}"));
        Assert.Equal((long)Migrations.Latest, store.Connection.Command("PRAGMA user_version").ExecuteScalar());
    }

    [Fact]
    public void Readings_of_the_second_version_are_brought_up_to_date_without_a_basis_that_nobody_knows()
    {
        string path = _folder.File("second.db");
        Reading reading = SampleReadings.At(1);
        using (RecordStore store = RecordStore.Open(path, _now))
        {
            RunStart start = SampleReadings.Start();
            store.Append(start);
            store.Append(start.Id, reading);
            store.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", 1));

            // As it stood before the third script.
            store.Connection.Command("DROP TABLE fit_basis; DROP TABLE check_point; PRAGMA user_version = 2").ExecuteNonQuery();
        }

        using RecordStore opened = RecordStore.Open(path, _now);
        RoundTripTests.Same(reading, opened.Reader.Reading(1));
        Assert.Null(opened.Reader.Reading(1).Basis);
    }

    [Fact]
    public void The_file_is_durable_and_strict_as_stated()
    {
        using RecordStore store = RecordStore.Open(_folder.File("a.db"), _now);
        Assert.Equal("wal", store.Connection.Command("PRAGMA journal_mode").ExecuteScalar());

        // 2 is FULL (sqlite.org/pragma.html).
        Assert.Equal(2L, store.Connection.Command("PRAGMA synchronous").ExecuteScalar());
        Assert.Equal(1L, store.Connection.Command("PRAGMA foreign_keys").ExecuteScalar());
        Assert.Equal(
            0L, store.Connection.Command("SELECT count(*) FROM pragma_table_list WHERE schema = 'main' AND type = 'table' AND NOT strict AND name NOT LIKE 'sqlite_%'").ExecuteScalar());
        Assert.Throws<SqliteException>(() => store.Connection.Command("INSERT INTO set_up (json) VALUES (x'00')").ExecuteNonQuery());
    }
}
