using System.Globalization;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>An INSERT that is prepared once and run many times.</summary>
internal sealed class PreparedInsert : IDisposable
{
    private readonly SqliteCommand _command;

    /// <param name="connection">Where to.</param>
    /// <param name="table">The table.</param>
    /// <param name="columns">Its columns, in the order of the values to come.</param>
    /// <param name="returning">Ends the statement, such as "ON CONFLICT (id) DO NOTHING RETURNING number".</param>
    public PreparedInsert(SqliteConnection connection, string table, string columns, string returning = "")
    {
        int count = columns.Count(c => c == ',') + 1;
        _command = connection.CreateCommand();
        _command.CommandText = $"INSERT INTO {table} ({columns}) VALUES ({string.Join(", ", Enumerable.Range(0, count).Select(Name))}) {returning}";
        for (int i = 0; i < count; i++)
        {
            _command.Parameters.Add(new SqliteParameter { ParameterName = Name(i) });
        }
    }

    /// <summary>Inserts; the value of the RETURNING clause, or null where nothing was inserted.</summary>
    public long? Run(SqliteTransaction transaction, params ReadOnlySpan<object> values)
    {
        _command.Transaction = transaction;
        for (int i = 0; i < values.Length; i++)
        {
            _command.Parameters[i].Value = values[i];
        }

        return (long?)_command.ExecuteScalar();
    }

    public void Dispose() => _command.Dispose();

    private static string Name(int i) => "@" + i.ToString(CultureInfo.InvariantCulture);
}
