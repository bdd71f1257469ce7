using System.Globalization;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;
using Looseloop.Terminal;

namespace Looseloop.Tables;

/// <summary>A reading's points as a table that <c>fit</c> and any spreadsheet take.</summary>
internal static class PointFile
{
    private const string Header =
        "frequency_hz,amplitude_counts,amplitude_uncertainty_counts,group,weight,drive_hz,duty_bits,divider,duty_count,samples,sum,sum_squares,min,max,board_time_us";

    /// <summary>Writes the points; an existing file is not overwritten.</summary>
    public static void Save(string path, ReadOutcome outcome)
    {
        try
        {
            using var file = new FileStream(path, FileMode.CreateNew, FileAccess.Write);
            using var writer = new StreamWriter(file);
            writer.WriteLine(Header);
            IReadOnlyList<RawPoint> raw = outcome.Reading.Points;
            for (int i = 0; i < raw.Count; i++)
            {
                FitPoint? point = i < outcome.Points.Count ? outcome.Points[i] : null;
                writer.WriteLine(Line(raw[i], point));
            }
        }
        catch (IOException) when (File.Exists(path))
        {
            throw new UserError($"{path} exists already and was left as it is. Name another file.", ExitCode.Failure);
        }
    }

    private static string Line(RawPoint raw, FitPoint? point) => string.Create(
        CultureInfo.InvariantCulture,
        $"{point?.FrequencyHz ?? raw.Setting.FrequencyHz:R},{point?.Amplitude ?? raw.Mean:R},{Math.Sqrt(point?.Variance ?? raw.MeanVariance):R},{point?.Group ?? 0},{point?.DriveWeight ?? 1:R},{raw.Setting.FrequencyHz:R},{raw.Setting.DutyBits},{raw.Setting.Divider},{raw.Setting.DutyCount},{raw.Samples},{raw.Sum},{raw.SumSquares},{raw.Min},{raw.Max},{raw.BoardTimeUs}");
}
