using System.Security.Cryptography;
using Looseloop.Readings;
using Looseloop.RecordBench;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record.Tests;

// Whatever is wrong with a record, opening it says so, and the file is the same afterwards, to the byte.
public sealed class BadRecordTests : IDisposable
{
    private static readonly DateTimeOffset _now = new(2026, 3, 1, 12, 0, 0, TimeSpan.Zero);

    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private string Good(string name = "a.db", int readings = 200)
    {
        string path = _folder.File(name);
        using RecordStore store = RecordStore.Open(path, _now);
        RunStart start = SampleReadings.Start();
        store.Append(start);
        store.AppendMany(start.Id, Enumerable.Range(0, readings).Select(n => SampleReadings.At(n)));
        store.Append(new RunStop(start.Id, _now, RunStatus.Completed, "done", readings));
        return path;
    }

    private static void Raw(string path, string sql)
    {
        using SqliteConnection connection = new($"Data Source={path};Pooling=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }

    private static void Refused(string path, RecordProblem problem)
    {
        byte[] before = SHA256.HashData(File.ReadAllBytes(path));
        RecordException writing = Assert.Throws<RecordException>(() => RecordStore.Open(path, _now));
        RecordException reading = Assert.Throws<RecordException>(() => RecordReader.Open(path));
        Assert.Equal(problem, writing.Problem);
        Assert.Equal(problem, reading.Problem);
        Assert.Contains(path, writing.Message, StringComparison.Ordinal);
        Assert.Equal(before, SHA256.HashData(File.ReadAllBytes(path)));
    }

    [Fact]
    public void A_record_of_a_newer_version_is_left_alone()
    {
        string path = Good();
        Raw(path, $"PRAGMA user_version = {Migrations.Latest + 1}");
        Refused(path, RecordProblem.NewerVersion);
    }

    [Fact]
    public void A_database_of_another_program_is_left_alone()
    {
        string path = _folder.File("other.db");
        Raw(path, "CREATE TABLE things (name TEXT)");
        Refused(path, RecordProblem.NotARecord);
    }

    [Fact]
    public void A_text_file_is_left_alone()
    {
        string path = _folder.File("notes.txt");
        File.WriteAllText(path, "not a record at all, but dear to somebody");
        Refused(path, RecordProblem.NotARecord);
    }

    [Fact]
    public void A_damaged_beginning_is_left_alone()
    {
        string path = Good();
        using (FileStream file = File.OpenWrite(path))
        {
            file.Write(new byte[64]);
        }

        Refused(path, RecordProblem.NotARecord);
    }

    [Fact]
    public void Damage_inside_is_reported_when_it_is_met_and_by_the_check()
    {
        string path = Good();
        using (FileStream file = File.OpenWrite(path))
        {
            // Leaves the first pages (the schema) and spoils a third of the rest.
            file.Position = file.Length / 3;
            file.Write([.. Enumerable.Repeat((byte)0xA5, (int)(file.Length / 3))]);
        }

        using RecordReader reader = RecordReader.Open(path);
        RecordException met = Assert.Throws<RecordException>(() =>
        {
            foreach (long number in reader.ReadingsOf(1))
            {
                reader.Reading(number);
            }

            reader.Runs(new HistoryQuery());
        });
        Assert.Equal(RecordProblem.Corrupt, met.Problem);
        bool damaged;
        try
        {
            damaged = reader.CheckIntegrity().Count > 0;
        }
        catch (RecordException error)
        {
            damaged = error.Problem == RecordProblem.Corrupt;
        }

        Assert.True(damaged);
    }

    [Fact]
    public void A_second_writer_is_told_and_the_first_goes_on()
    {
        string path = Good();
        using RecordStore first = RecordStore.Open(path, _now);
        RecordException second = Assert.Throws<RecordException>(() => RecordStore.Open(path, _now));
        Assert.Equal(RecordProblem.Busy, second.Problem);
        RunStart start = SampleReadings.Start();
        first.Append(start);
        first.Append(start.Id, SampleReadings.At(5));
        Assert.Equal(201, first.Reader.CountReadings());
    }

    [Fact]
    public void A_full_disk_is_told_and_keeps_what_was_saved()
    {
        string path = Good();
        using (RecordStore store = RecordStore.Open(path, _now))
        {
            RunStart start = SampleReadings.Start();
            store.Append(start);

            // SQLite's own limit on pages gives the very result of a full disk (SQLITE_FULL).
            long pages = (long)store.Connection.Command("PRAGMA page_count").ExecuteScalar()!;
            store.Connection.Command($"PRAGMA max_page_count = {pages + 2}").ExecuteNonQuery();
            int kept = 0;
            RecordException full = Assert.Throws<RecordException>(() =>
            {
                for (int n = 0; n < 1000; n++, kept++)
                {
                    store.Append(start.Id, SampleReadings.At(n));
                }
            });
            Assert.Equal(RecordProblem.DiskFull, full.Problem);
            Assert.Equal(200 + kept, store.Reader.CountReadings());

            // Room was made: the same store goes on.
            store.Connection.Command("PRAGMA max_page_count = 1000000").ExecuteNonQuery();
            store.Append(start.Id, SampleReadings.At(2000));
            Assert.Equal(201 + kept, store.Reader.CountReadings());
        }

        using RecordReader reader = RecordReader.Open(path);
        Assert.Empty(reader.CheckIntegrity());
    }

    [Fact]
    public void A_record_without_its_journal_is_read_from_a_folder_that_cannot_be_written()
    {
        string path = Good();
        Assert.False(File.Exists(path + "-wal"));
        if (OperatingSystem.IsWindows())
        {
            return;
        }

        File.SetUnixFileMode(path, UnixFileMode.UserRead);
        File.SetUnixFileMode(Path.GetDirectoryName(path)!, UnixFileMode.UserRead | UnixFileMode.UserExecute);
        try
        {
            using RecordReader reader = RecordReader.Open(path);
            Assert.Equal(200, reader.CountReadings());
        }
        finally
        {
            File.SetUnixFileMode(Path.GetDirectoryName(path)!, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
        }
    }

    [OrdinaryUserFact]
    public void A_read_only_record_is_told_and_left_alone()
    {
        string path = Good();
        byte[] before = SHA256.HashData(File.ReadAllBytes(path));
        if (!OperatingSystem.IsWindows())
        {
            File.SetUnixFileMode(path, UnixFileMode.UserRead);
        }

        RecordException refused = Assert.Throws<RecordException>(() => RecordStore.Open(path, _now));
        Assert.Equal(RecordProblem.NoPermission, refused.Problem);
        Assert.Equal(before, SHA256.HashData(File.ReadAllBytes(path)));
    }

    [Fact]
    public void A_record_that_SQLite_calls_read_only_is_told()
    {
        string path = Good();
        using RecordStore store = RecordStore.Open(path, _now);
        store.Connection.Command("PRAGMA query_only = ON").ExecuteNonQuery();
        RecordException refused = Assert.Throws<RecordException>(() => store.Append(SampleReadings.Start()));
        Assert.Equal(RecordProblem.NoPermission, refused.Problem);
    }

    [Fact]
    public void A_missing_record_is_not_made_by_reading()
    {
        string path = _folder.File("none.db");
        Assert.Equal(RecordProblem.NotFound, Assert.Throws<RecordException>(() => RecordReader.Open(path)).Problem);
        Assert.False(File.Exists(path));
    }

    [Fact]
    public void A_folder_that_cannot_be_made_is_told()
    {
        string file = _folder.File("plain");
        File.WriteAllText(file, "");
        Assert.Equal(
            RecordProblem.NoPermission, Assert.Throws<RecordException>(() => RecordStore.Open(Path.Combine(file, "sub", "a.db"), _now)).Problem);
    }
}
