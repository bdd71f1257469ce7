using System.Globalization;

namespace Looseloop.Report.Plots;

/// <summary>The response curve of a reading: measured points and the fitted curve.</summary>
public static class CurveSheet
{
    /// <summary>Lays the plot out; frequencies in kilohertz.</summary>
    /// <param name="title">Its title.</param>
    /// <param name="pointsHz">Frequencies of the points, hertz.</param>
    /// <param name="amplitudes">Their amplitudes, counts.</param>
    /// <param name="halfBars">Their expanded uncertainties, counts, or null.</param>
    /// <param name="curveHz">Frequencies of the fitted curve, hertz, rising; empty for none.</param>
    /// <param name="curve">Its amplitudes, counts.</param>
    /// <param name="f0Hz">The resonant frequency, hertz; NaN for none.</param>
    public static PlotSheet Of(
        string title, IReadOnlyList<double> pointsHz, IReadOnlyList<double> amplitudes, IReadOnlyList<double>? halfBars,
        IReadOnlyList<double> curveHz, IReadOnlyList<double> curve, double f0Hz)
    {
        List<PlotSeries> series = [];
        if (curveHz.Count > 0)
        {
            series.Add(new PlotSeries("fit", Kilohertz(curveHz), curve, SeriesLook.Line));
        }

        series.Add(new PlotSeries("points", Kilohertz(pointsHz), amplitudes, SeriesLook.Points, halfBars));
        return new PlotSheet(title, "frequency in kHz", "amplitude in counts", series)
        {
            Marks = double.IsFinite(f0Hz)
                ? [new PlotMark(true, f0Hz / 1e3, string.Create(CultureInfo.InvariantCulture, $"f0 = {f0Hz / 1e3:0.0000} kHz"))]
                : [],
        };
    }

    private static double[] Kilohertz(IReadOnlyList<double> hertz) => [.. hertz.Select(f => f / 1e3)];
}
