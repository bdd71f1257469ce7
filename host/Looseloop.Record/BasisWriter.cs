using Looseloop.Readings;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>Writes what a reading's fit was made with, within a transaction of the caller's.</summary>
internal sealed class BasisWriter(SqliteConnection connection) : IDisposable
{
    /// <summary>The sweeps that checked a reading, as they are numbered in the record.</summary>
    public const long OtherDuty = 1;

    /// <inheritdoc cref="OtherDuty"/>
    public const long LongerDwell = 2;

    private readonly PreparedInsert _basis = new(connection, "fit_basis", "reading, json");
    private readonly PreparedInsert _point = new(
        connection, "check_point",
        "reading, sweep, place, duty_bits, divider, duty_count, frequency_hz, samples, sum, sum_squares, min, max, board_time_us");

    /// <summary>Writes it; nothing where there is none.</summary>
    /// <param name="transaction">The transaction it is part of.</param>
    /// <param name="reading">The reading's number.</param>
    /// <param name="basis">The basis, or null.</param>
    /// <param name="withPoints">False for a refit, whose points stand with the reading that it fits again.</param>
    public void Write(SqliteTransaction transaction, long reading, FitBasis? basis, bool withPoints)
    {
        if (basis is null)
        {
            return;
        }

        _basis.Run(transaction, reading, BasisJson.Of(basis));
        if (withPoints)
        {
            WritePoints(transaction, reading, OtherDuty, basis.AtOtherDuty);
            WritePoints(transaction, reading, LongerDwell, basis.AfterLongerDwell);
        }
    }

    public void Dispose()
    {
        _basis.Dispose();
        _point.Dispose();
    }

    private void WritePoints(SqliteTransaction transaction, long reading, long sweep, IReadOnlyList<RawPoint> points)
    {
        for (int i = 0; i < points.Count; i++)
        {
            RawPoint point = points[i];
            _point.Run(
                transaction, reading, sweep, (long)i, (long)point.Setting.DutyBits, (long)point.Setting.Divider,
                (long)point.Setting.DutyCount, point.Setting.FrequencyHz, (long)point.Samples, point.Sum, Sql.OrNull(point.SumSquares),
                (long)point.Min, (long)point.Max, point.BoardTimeUs);
        }
    }
}
