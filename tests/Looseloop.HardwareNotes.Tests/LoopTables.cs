using static Looseloop.HardwareNotes.Tests.MarkdownTable;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>The tables of the page on the loop.</summary>
internal static class LoopTables
{
    private const double LoopRadiusM = 0.1;
    private const double ConductorRadiusM = 0.45e-3;
    private const double SeriesOhm = 50;
    private const double SwingV = 5;

    private static readonly (string Name, double RadiusM, double LengthM, double Turns, double FrequencyHz, double LoopRadiusM)[] _coils =
    [
        ("small: 60 x 250 mm, 800 turns", 0.030, 0.250, 800, 450e3, 0.1),
        ("middle: 110 x 480 mm, 1000 turns", 0.055, 0.480, 1000, 268e3, 0.1),
        ("large: 320 x 1200 mm, 1100 turns", 0.160, 1.200, 1100, 80e3, 0.25),
    ];

    /// <summary>The fundamental's amplitude at duty 1/2, ampere.</summary>
    public static double CurrentA => 2 / Math.PI * SwingV / SeriesOhm;

    public static string Loop()
    {
        double inductanceH = LoopArithmetic.RingH(LoopRadiusM, ConductorRadiusM);
        var table = new MarkdownTable("frequency, kHz", "reactance, ohm", "X = reactance / 50 ohm", "current at duty 1/2, mA peak");
        foreach (double khz in (double[])[30, 150, 300, 600, 1000])
        {
            double reactance = 2 * Math.PI * khz * 1e3 * inductanceH;
            double currentA = 2 / Math.PI * SwingV / double.Hypot(SeriesOhm, reactance);
            table.Row(Fixed(khz, 0), Digits(reactance, 3), Digits(reactance / SeriesOhm, 2), Fixed(1e3 * currentA, 1));
        }

        return $"L = {Fixed(1e6 * inductanceH, 3)} uH\n\n{table}";
    }

    public static string Field()
    {
        var table = new MarkdownTable("distance on the axis, mm", "flux density, nT peak");
        foreach (double mm in (double[])[0, 50, 100, 200, 300, 500])
        {
            table.Row(Fixed(mm, 0), Digits(1e9 * LoopArithmetic.AxisFieldT(CurrentA, LoopRadiusM, mm / 1e3), 3));
        }

        return table.ToString();
    }

    public static string Coupling()
    {
        var table = new MarkdownTable(
            "coil",
            "loop, mm below the first turn",
            "M, uH",
            "k",
            "f0 with this loop, ppm",
            "f0 with a shorted loop, ppm",
            "Q of 200 reads",
            "EMF, mV peak",
            "top, V peak at Q 200");
        foreach (var coil in _coils)
        {
            double coilH = LoopArithmetic.SheetH(coil.RadiusM, coil.LengthM, coil.Turns);
            double loopH = LoopArithmetic.RingH(coil.LoopRadiusM, ConductorRadiusM);
            double omega = 2 * Math.PI * coil.FrequencyHz;
            double x = omega * loopH / SeriesOhm;
            foreach (double mm in (double[])[0, 100, 200, 300, 500])
            {
                double mutualH = LoopArithmetic.RingToCoilH(coil.LoopRadiusM, mm / 1e3, coil.RadiusM, coil.LengthM, coil.Turns);
                double k = mutualH / Math.Sqrt(loopH * coilH);
                double emfV = omega * mutualH * CurrentA / double.Hypot(1, x);
                table.Row(
                    coil.Name,
                    Fixed(mm, 0),
                    Digits(1e6 * mutualH, 3),
                    Fixed(k, 4),
                    Digits(1e6 * k * k / 2 * x * x / (1 + x * x), 2),
                    Digits(1e6 * k * k / 2, 3),
                    Fixed(1 / (1 / 200.0 + k * k * x / (1 + x * x)), 1),
                    Digits(1e3 * emfV, 3),
                    Digits(200 * emfV, 3));
            }
        }

        return table.ToString();
    }
}
