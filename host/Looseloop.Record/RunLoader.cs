using Looseloop.Readings;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>Loads a run's documents without its readings.</summary>
internal static class RunLoader
{
    public static RunDocument? Load(SqliteConnection connection, long number)
    {
        using SqliteCommand command = connection.Command(
            "SELECT r.id, r.utc_us, r.procedure, r.host_version, r.coil, r.note, r.options_json, s.utc_us, s.status, s.reason, s.count, "
            + "s.assumed, b.port, b.board, b.firmware_version, b.protocol_version, b.boot_id, b.most_duty_bits, b.lowest_hz, b.highest_hz, "
            + "b.full_counts, b.inputs FROM run r LEFT JOIN run_stop s ON s.run = r.number LEFT JOIN box b ON b.number = r.box "
            + "WHERE r.number = @0",
            number);
        using SqliteDataReader row = command.ExecuteReader();
        if (!row.Read())
        {
            return null;
        }

        RunStart start = new()
        {
            Id = row.Guid(0),
            Utc = row.Time(1),
            Procedure = row.GetString(2),
            HostVersion = row.GetString(3),
            Coil = row.Text(4),
            Note = row.Text(5),
            Options = TextMap.FromJson(row.GetString(6)),
            Box = row.IsDBNull(12) ? null : ReadingLoader.Box(row, 12),
        };
        RunStop? stop = row.IsDBNull(7)
            ? null
            : new RunStop(start.Id, row.Time(7), (RunStatus)row.GetInt64(8), row.GetString(9), row.GetInt64(10));
        return new RunDocument(number, start, Events(connection, number, start.Id), stop, stop is not null && row.GetInt64(11) != 0);
    }

    private static List<RunEvent> Events(SqliteConnection connection, long run, Guid runId) => connection.All(
        "SELECT id, utc_us, monotonic_s, kind, from_us, to_us, detail FROM event WHERE run = @0 ORDER BY number",
        row => new RunEvent
        {
            Id = row.Guid(0),
            RunId = runId,
            Utc = row.Time(1),
            MonotonicS = row.Double(2),
            Kind = (RunEventKind)row.GetInt64(3),
            From = row.IsDBNull(4) ? null : row.Time(4),
            To = row.IsDBNull(5) ? null : row.Time(5),
            Detail = row.GetString(6),
        },
        run);
}
