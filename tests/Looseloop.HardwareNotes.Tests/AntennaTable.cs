using static Looseloop.HardwareNotes.Tests.MarkdownTable;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>What an antenna takes from the middle coil, and what it does to it.</summary>
internal static class AntennaTable
{
    /// <summary>At the coil's top with the loop at k = 0.005 and Q = 200, volt peak.</summary>
    public const double TopV = 13.3;

    private const double Epsilon0 = 8.8541878e-12;
    private const double RodRadiusM = 0.5e-3;
    private const double TopLoadF = 13.04e-12;
    private const double TopHeightM = 0.6;
    private const double CoilF = 15.58e-12;
    private const double InputF = 5e-12;

    public static string Antenna()
    {
        var table = new MarkdownTable(
            "rod, mm", "distance, m", "its own capacitance, pF", "to the top load, fF", "f0 lower by, ppm", "at the buffer, mV peak");
        double equivalentRadiusM = TopLoadF / (4 * Math.PI * Epsilon0);
        foreach (double rodMm in (double[])[20, 50])
        {
            double rodM = rodMm / 1e3;
            double rodF = 2 * Math.PI * Epsilon0 * rodM / (Math.Log(2 * rodM / RodRadiusM) - 1);
            foreach (double distanceM in (double[])[0.5, 0.75, 1, 1.5, 2])
            {
                double fraction = equivalentRadiusM * (1 / distanceM - 1 / double.Hypot(distanceM, 2 * TopHeightM));
                double couplingF = rodF * fraction;
                table.Row(
                    Fixed(rodMm, 0),
                    Digits(distanceM, 2),
                    Digits(rodF * 1e12, 2),
                    Digits(couplingF * 1e15, 2),
                    Fixed(1e6 * couplingF / (2 * CoilF), 0),
                    Digits(1e3 * TopV * couplingF / (rodF + InputF), 2));
            }
        }

        return table.ToString();
    }
}
