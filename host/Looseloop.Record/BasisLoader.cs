using Looseloop.Readings;
using Microsoft.Data.Sqlite;

namespace Looseloop.Record;

/// <summary>Loads what a reading's fit was made with.</summary>
internal static class BasisLoader
{
    /// <summary>The basis of a reading, or null where the record has none.</summary>
    /// <param name="connection">The record.</param>
    /// <param name="number">The reading.</param>
    /// <param name="pointsOf">The reading whose points it has: itself, or the one that it fits again.</param>
    public static FitBasis? Load(SqliteConnection connection, long number, long pointsOf)
    {
        if (connection.All("SELECT json FROM fit_basis WHERE reading = @0", row => row.GetString(0), number) is not [var json])
        {
            return null;
        }

        return BasisJson.From(json) with
        {
            AtOtherDuty = Points(connection, pointsOf, BasisWriter.OtherDuty),
            AfterLongerDwell = Points(connection, pointsOf, BasisWriter.LongerDwell),
        };
    }

    private static List<RawPoint> Points(SqliteConnection connection, long number, long sweep) => connection.All(
        $"SELECT {ReadingLoader.PointColumns} FROM check_point WHERE reading = @0 AND sweep = @1 ORDER BY place", ReadingLoader.Point, number, sweep);
}
