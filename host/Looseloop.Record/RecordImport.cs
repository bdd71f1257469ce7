using System.Reflection;
using Looseloop.Readings;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>Merges another record by globally unique ids; numbers are given anew.</summary>
internal static class RecordImport
{
    private static readonly Lazy<string> _script = new(() =>
    {
        using StreamReader reader = new(Assembly.GetExecutingAssembly().GetManifestResourceStream("merge.sqlscript")!);
        return reader.ReadToEnd();
    });

    public static ImportResult Run(RecordStore store, string otherPath, DateTimeOffset utcNow)
    {
        string other = Path.GetFullPath(otherPath);
        if (string.Equals(other, store.Path, StringComparison.Ordinal))
        {
            throw new RecordException(RecordProblem.Busy, "A record cannot be merged into itself.");
        }

        // Opening it checks that it is a record of a form this program knows.
        RecordReader.Open(other).Dispose();
        SqliteErrors.Guard(store.Path, () => Attach(store.Connection, other));
        try
        {
            return Merge(store, utcNow);
        }
        finally
        {
            RecordFile.Execute(store.Connection, "DETACH other");
        }
    }

    private static ImportResult Merge(RecordStore store, DateTimeOffset utcNow)
    {
        ImportResult? result = null;
        store.Write(transaction =>
        {
            SqliteConnection connection = store.Connection;
            long runs = Count("run");
            long readings = Count("reading");
            long events = Count("event");
            long facts = Count("fact");
            using SqliteCommand merge = connection.Command(_script.Value, Sql.Microseconds(utcNow), (long)RunStatus.Interrupted);
            merge.Transaction = transaction;
            merge.ExecuteNonQuery();
            long added = Count("reading") - readings;
            result = new ImportResult(
                Count("run") - runs, added, Count("event") - events, Count("fact") - facts, Count("other.reading") - added);
            return null;

            long Count(string table) => (long)connection.Command($"SELECT count(*) FROM {(table.Contains('.') ? table : "main." + table)}").In(transaction)!;
        });
        return result!;
    }

    private static void Attach(SqliteConnection connection, string path)
    {
        string uri = RecordFile.Address(path) + "?mode=ro";
        try
        {
            connection.Command("ATTACH @0 AS other", uri).ExecuteNonQuery();
        }
        catch (SqliteException error) when (error.SqliteErrorCode is 8 or 14)
        {
            connection.Command("ATTACH @0 AS other", uri + "&immutable=1").ExecuteNonQuery();
        }
    }
}
