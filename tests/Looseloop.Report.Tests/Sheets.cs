using Looseloop.Report.Plots;

namespace Looseloop.Report.Tests;

/// <summary>Sheets to draw: a resonance at 150 kHz, Q 200, and a warm-up of 120 Hz.</summary>
internal static class Sheets
{
    public static PlotSheet Curve()
    {
        double[] points = [.. Enumerable.Range(-6, 13).Select(i => 150000 + (560.0 * i))];
        double[] curve = [.. Enumerable.Range(0, 301).Select(i => 146000 + (8000 * i / 300.0))];
        Random random = new(1);
        return CurveSheet.Of(
            "coil \"tall\": f0 and Q", points, [.. points.Select(f => Amplitude(f) + (8 * random.NextDouble()))], [.. points.Select(_ => 25.0)],
            curve, [.. curve.Select(Amplitude)], 150000);
    }

    public static PlotSheet Drift(int readings = 200)
    {
        Random random = new(2);
        double[] time = [.. Enumerable.Range(0, readings).Select(i => 5400.0 * i / readings)];
        return DriftSheet.Of(
            "warm-up", "f0 in Hz", time, [.. time.Select(t => Model(t) + (6 * (random.NextDouble() - 0.5)))],
            readings <= 300 ? [.. time.Select(_ => 4.0)] : null, Model, [149950, 150150]);
    }

    private static double Amplitude(double f) => 2000 / Math.Sqrt(1 + Math.Pow(2 * (f - 150000) / 750, 2));

    private static double Model(double t) => 150000 + (120 * Math.Exp(-t / 900));
}
