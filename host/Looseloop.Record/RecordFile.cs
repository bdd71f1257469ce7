using Microsoft.Data.Sqlite;
using SQLitePCL;

namespace Looseloop.Record;

/// <summary>Opens the SQLite file behind a record with the settings that make it durable.</summary>
internal static class RecordFile
{
    /// <summary>How long a reader that is in the way is waited for, seconds.</summary>
    private const int PatienceS = 5;

    /// <summary>
    /// Opens for writing: WAL journal, synchronous FULL (every commit is on the disk before it returns), foreign keys checked.
    /// Makes the file where there is none.
    /// </summary>
    public static SqliteConnection OpenForWriting(string path)
    {
        if (File.Exists(path) && new FileInfo(path) is { Length: > 0 } file)
        {
            RefuseOtherFiles(path, file);
        }

        return SqliteErrors.Guard(path, () =>
        {
            SqliteConnection connection = Connect(Address(path), SqliteOpenMode.ReadWriteCreate);
            try
            {
                // SQLite opens a file that may not be written for reading, and says nothing until the first write.
                if (raw.sqlite3_db_readonly(connection.Handle, "main") == 1)
                {
                    throw new RecordException(
                        RecordProblem.NoPermission, $"The record {path} may not be written. It was left as it is. Check its permissions, or name another file with --record.");
                }

                // Looked at before the first write: a record that this program must not touch stays as it is, to the byte.
                int version = Migrations.Check(connection, path);
                Execute(connection, "PRAGMA journal_mode = WAL; PRAGMA synchronous = FULL; PRAGMA foreign_keys = ON; PRAGMA wal_autocheckpoint = 4000;");
                Migrations.Run(connection, version, Migrations.Latest);
                return connection;
            }
            catch
            {
                connection.Dispose();
                throw;
            }
        });
    }

    /// <summary>Opens for reading only.</summary>
    public static SqliteConnection OpenForReading(string path)
    {
        if (!File.Exists(path))
        {
            throw new RecordException(RecordProblem.NotFound, $"There is no record {path}.");
        }

        RefuseOtherFiles(path, new FileInfo(path));
        return SqliteErrors.Guard(path, () =>
        {
            try
            {
                return Checked(Connect(Address(path), SqliteOpenMode.ReadOnly), path);
            }
            catch (SqliteException error) when (error.SqliteErrorCode is 8 or 14 && NoJournal(path))
            {
                // On a read-only disk the shared index of the journal cannot be made. With no journal there, the file is whole
                // by itself and nobody can change it.
                return Checked(Connect(Address(path) + "?immutable=1", SqliteOpenMode.ReadOnly), path);
            }
        });
    }

    /// <summary>
    /// A path as a file URI (sqlite.org/uri.html). A connection opened by one also understands them in ATTACH, where a record to
    /// be merged is opened read-only by its query.
    /// </summary>
    public static string Address(string path)
    {
        string slashes = OperatingSystem.IsWindows() ? "/" + path.Replace('\\', '/') : path;
        return "file:" + Uri.EscapeDataString(slashes).Replace("%2F", "/", StringComparison.Ordinal).Replace("%3A", ":", StringComparison.Ordinal);
    }

    public static void Execute(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }

    private static SqliteConnection Checked(SqliteConnection connection, string path)
    {
        try
        {
            int version = Migrations.Check(connection, path);
            if (version == 0)
            {
                throw new RecordException(RecordProblem.NotARecord, $"{path} is empty: nothing was recorded in it yet.");
            }

            if (version < Migrations.Latest)
            {
                throw new RecordException(
                    RecordProblem.OlderVersion,
                    $"The record {path} is of an older form ({version}). It was left as it is. Take a reading into it, which brings it up to date, or copy it to where it may be written.");
            }

            return connection;
        }
        catch
        {
            connection.Dispose();
            throw;
        }
    }

    private static SqliteConnection Connect(string source, SqliteOpenMode mode)
    {
        SqliteConnection connection = new(new SqliteConnectionStringBuilder
        {
            DataSource = source,
            Mode = mode,
            Pooling = false,
            DefaultTimeout = PatienceS,
        }.ToString());
        try
        {
            connection.Open();
            return connection;
        }
        catch
        {
            connection.Dispose();
            throw;
        }
    }

    private static bool NoJournal(string path) => !File.Exists(path + "-wal") || new FileInfo(path + "-wal").Length == 0;

    // The header of every SQLite file (sqlite.org/fileformat2.html, 1.3).
    private static void RefuseOtherFiles(string path, FileInfo file)
    {
        Span<byte> header = stackalloc byte[16];
        int read;
        try
        {
            using FileStream stream = new(file.FullName, FileMode.Open, FileAccess.Read, FileShare.ReadWrite | FileShare.Delete);
            read = stream.ReadAtLeast(header, header.Length, throwOnEndOfStream: false);
        }
        catch (UnauthorizedAccessException error)
        {
            throw new RecordException(RecordProblem.NoPermission, $"The record {path} may not be read. Check its permissions.", error);
        }

        if (read > 0 && !header[..read].SequenceEqual("SQLite format 3\0"u8))
        {
            throw new RecordException(
                RecordProblem.NotARecord,
                $"{path} is not a record, or its beginning is damaged. It was left as it is. Use another file with --record.");
        }
    }
}
