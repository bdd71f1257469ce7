using Microsoft.Data.Sqlite;
using SQLitePCL;

namespace Looseloop.Record;

/// <summary>Small conversions between documents and columns.</summary>
internal static class Sql
{
    public static object OrNull(double value) => double.IsFinite(value) ? value : DBNull.Value;

    public static object OrNull(string? value) => value is null ? DBNull.Value : value;

    public static object OrNull(long? value) => value is null ? DBNull.Value : value.Value;

    public static byte[] Bytes(Guid id) => id.ToByteArray(bigEndian: true);

    public static Guid Id(byte[] bytes) => new(bytes, bigEndian: true);

    public static long Microseconds(DateTimeOffset time) => (time.UtcTicks - DateTimeOffset.UnixEpoch.Ticks) / 10;

    public static DateTimeOffset Time(long microseconds) => DateTimeOffset.UnixEpoch.AddTicks(microseconds * 10);

    public static double Double(this SqliteDataReader row, int column) => row.IsDBNull(column) ? double.NaN : row.GetDouble(column);

    /// <summary>A column of the row that a statement stands on, without the checks of the data reader; NaN for NULL.</summary>
    public static double Real(this sqlite3_stmt row, int column) =>
        raw.sqlite3_column_type(row, column) == raw.SQLITE_NULL ? double.NaN : raw.sqlite3_column_double(row, column);

    /// <summary>The same of a whole number, which may not be NULL.</summary>
    public static long Whole(this sqlite3_stmt row, int column) => raw.sqlite3_column_int64(row, column);

    public static string? Text(this SqliteDataReader row, int column) => row.IsDBNull(column) ? null : row.GetString(column);

    public static long? Long(this SqliteDataReader row, int column) => row.IsDBNull(column) ? null : row.GetInt64(column);

    public static Guid Guid(this SqliteDataReader row, int column) => Id(row.GetFieldValue<byte[]>(column));

    public static DateTimeOffset Time(this SqliteDataReader row, int column) => Time(row.GetInt64(column));

    /// <summary>A command with its parameters named @0, @1, ... in order.</summary>
    public static SqliteCommand Command(this SqliteConnection connection, string sql, params ReadOnlySpan<object> values)
    {
        SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        for (int i = 0; i < values.Length; i++)
        {
            command.Parameters.AddWithValue("@" + i.ToString(System.Globalization.CultureInfo.InvariantCulture), values[i]);
        }

        return command;
    }

    /// <summary>Every row of a query.</summary>
    public static List<T> All<T>(this SqliteConnection connection, string sql, Func<SqliteDataReader, T> map, params ReadOnlySpan<object> values)
    {
        using SqliteCommand command = connection.Command(sql, values);
        using SqliteDataReader row = command.ExecuteReader();
        List<T> all = [];
        while (row.Read())
        {
            all.Add(map(row));
        }

        return all;
    }

    /// <summary>Runs a command once within a transaction; its first value, or null.</summary>
    public static object? In(this SqliteCommand command, SqliteTransaction transaction)
    {
        using (command)
        {
            command.Transaction = transaction;
            return command.ExecuteScalar();
        }
    }
}
