using Looseloop.Drift;
using Looseloop.Record;
using Looseloop.Terminal;

namespace Looseloop.Coils;

/// <summary>When a logged run's warm-up carries f0 out of a window about its first value.</summary>
internal static class WarmUpExit
{
    public static WindowExit Of(string recordPath, long run, WindowRow window)
    {
        try
        {
            using RecordReader reader = RecordReader.Open(recordPath);
            _ = reader.Run(run);
            DriftSeries series = DriftSeries.Of(reader.Track(run).Select(
                p => new DriftPoint(p.TimeS, p.F0Hz, p.F0RepeatabilityHz, p.TemperatureC)));
            if (series.Count < 3)
            {
                throw new UserError($"Run {run} has {series.Count} readings with an f0; a warm-up needs three or more.");
            }

            // Half of the whole window: its two halves differ by less than a hundredth.
            return DriftAnalysis.Of(series, new DriftOptions { WindowHalfWidth = window.Window.WidthHz / 2 }).Window!;
        }
        catch (RecordException error)
        {
            throw new UserError(error.Message, error.Problem == RecordProblem.NotFound ? ExitCode.Usage : ExitCode.Failure);
        }
    }
}
