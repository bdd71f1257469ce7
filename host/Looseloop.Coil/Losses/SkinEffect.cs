using System.Numerics;

namespace Looseloop.Coil;

/// <summary>Current crowding to the skin of a straight round wire (Kelvin; Terman, Radio Engineers' Handbook, 1943).</summary>
public static class SkinEffect
{
    /// <summary>Depth at which the current density has fallen to 1/e, metres: sqrt(rho / (pi f mu0)).</summary>
    public static double DepthM(double frequencyHz, double resistivity = PhysicalConstants.CopperResistivity)
    {
        Demand.Frequency(frequencyHz, nameof(frequencyHz));
        Demand.Within(resistivity, 1e-12, 1, nameof(resistivity), "ohm m");
        return Math.Sqrt(resistivity / (Math.PI * frequencyHz * PhysicalConstants.Mu0));
    }

    /// <summary>Resistance over that at direct current, exact: Re[(z/2) J0(z)/J1(z)], z = (1 - j) a/delta.</summary>
    /// <param name="radiusOverDepth">Wire radius over skin depth, 0 .. 1e6.</param>
    public static double RoundWireRatio(double radiusOverDepth)
    {
        double x = Demand.Within(radiusOverDepth, 0, 1e6, nameof(radiusOverDepth), "");
        if (x < 1e-3)
        {
            return 1 + (x * x * x * x / 48);
        }

        if (x > 200)
        {
            // Asymptotic series of the same ratio; the next term is below 1e-7.
            return (x / 2) + 0.25 + (3 / (32 * x));
        }

        var z = new Complex(x, -x);
        // J1/J0 by its continued fraction (DLMF 10.10.1), from far enough back.
        Complex tail = Complex.Zero;
        for (int order = (int)(2.5 * x) + 40; order >= 1; order--)
        {
            tail = 1 / ((2 * order / z) - tail);
        }

        return (z / (2 * tail)).Real;
    }

    /// <summary>Direct-current resistance of a round wire, ohm.</summary>
    public static double DirectOhm(double lengthM, double diameterM, double resistivity = PhysicalConstants.CopperResistivity)
    {
        Demand.Within(lengthM, 1e-9, 1e9, nameof(lengthM), "m");
        Demand.Length(diameterM, nameof(diameterM));
        return resistivity * lengthM / (Math.PI * diameterM * diameterM / 4);
    }
}
