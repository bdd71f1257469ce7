using System.Globalization;
using System.Reflection;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>
/// Brings a record to today's form by numbered scripts; the number of the last one stands in SQLite's user_version. Each script
/// and its number are one transaction: a record is of one version or the next, never between.
/// </summary>
internal static class Migrations
{
    /// <summary>Marks the file as a record ("LLRC"; SQLite's application_id).</summary>
    public const int ApplicationId = 0x4C4C5243;

    /// <summary>The scripts in order; the first makes version 1.</summary>
    public static IReadOnlyList<string> Scripts { get; } = Load();

    /// <summary>The version this program reads and writes.</summary>
    public static int Latest => Scripts.Count;

    /// <summary>The version of an open record; 0 for an empty file.</summary>
    /// <exception cref="RecordException">It is no record, or one of a newer version.</exception>
    public static int Check(SqliteConnection connection, string path)
    {
        long version = Scalar(connection, "PRAGMA user_version");
        long application = Scalar(connection, "PRAGMA application_id");
        long tables = Scalar(connection, "SELECT count(*) FROM sqlite_schema");
        if (application != ApplicationId && (application != 0 || tables > 0))
        {
            throw new RecordException(
                RecordProblem.NotARecord,
                $"{path} is a database of another program. It was left as it is. Use another file with --record.");
        }

        if (version > Latest)
        {
            throw new RecordException(
                RecordProblem.NewerVersion,
                $"The record {path} was made by a newer version of this program (form {version}; this one knows up to {Latest}). It was left as it is. Update this program, or use another file with --record.");
        }

        return (int)version;
    }

    /// <summary>Runs the scripts that a record still lacks.</summary>
    public static void Run(SqliteConnection connection, int from, int to)
    {
        for (int version = from + 1; version <= to; version++)
        {
            using SqliteTransaction transaction = connection.BeginTransaction(deferred: false);
            using SqliteCommand command = connection.CreateCommand();
            command.Transaction = transaction;
            command.CommandText = string.Create(
                CultureInfo.InvariantCulture,
                $"{Scripts[version - 1]}\nPRAGMA application_id = {ApplicationId};\nPRAGMA user_version = {version};");
            command.ExecuteNonQuery();
            transaction.Commit();
        }
    }

    private static long Scalar(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        return (long)command.ExecuteScalar()!;
    }

    private static List<string> Load()
    {
        Assembly assembly = typeof(Migrations).Assembly;
        List<string> scripts = [];
        foreach (string name in assembly.GetManifestResourceNames().Where(n => n.EndsWith(".sql", StringComparison.Ordinal)).Order(StringComparer.Ordinal))
        {
            if (int.Parse(name.AsSpan(0, 3), CultureInfo.InvariantCulture) != scripts.Count + 1)
            {
                throw new InvalidOperationException($"the script {name} is out of number");
            }

            using StreamReader reader = new(assembly.GetManifestResourceStream(name)!);
            scripts.Add(reader.ReadToEnd());
        }

        return scripts;
    }
}
