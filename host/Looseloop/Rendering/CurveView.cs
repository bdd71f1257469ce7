using Looseloop.Procedures.Read;
using Looseloop.Report.Plots;
using Looseloop.Resonance;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>The points of a reading and the curve through them, as the terminal draws them.</summary>
internal static class CurveView
{
    private const int HeightCells = 12;
    private const int CurvePoints = 240;

    /// <summary>Draws the curve, if there is one.</summary>
    public static void Write(IAnsiConsole console, ReadOutcome outcome, double prefactorExponent)
    {
        if (outcome.Fit is not { IsFitted: true } fit || outcome.Points.Count == 0)
        {
            return;
        }

        console.Write(new BrailleCanvas(Sheet(fit, outcome.Points, prefactorExponent), HeightCells));
    }

    /// <summary>The same as a sheet, for a picture.</summary>
    public static PlotSheet Sheet(ResonanceFit fit, IReadOnlyList<FitPoint> points, double prefactorExponent)
    {
        // Amplitudes over their drive weights: what each would be at duty 1/2. A vernier group's own constant stays in.
        double low = points.Min(point => point.FrequencyHz);
        double high = points.Max(point => point.FrequencyHz);
        double[] curveHz = [.. Enumerable.Range(0, CurvePoints + 1).Select(i => low + ((high - low) * i / CurvePoints))];
        return CurveSheet.Of(
            "", [.. points.Select(point => point.FrequencyHz)], [.. points.Select(point => point.Amplitude / point.DriveWeight)], null,
            curveHz, [.. curveHz.Select(hz => fit.AmplitudeAt(hz, prefactorExponent))], fit.F0Hz);
    }
}
