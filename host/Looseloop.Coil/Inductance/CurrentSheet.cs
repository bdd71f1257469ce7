namespace Looseloop.Coil;

/// <summary>A single-layer coil as a cylindrical current sheet.</summary>
public static class CurrentSheet
{
    /// <summary>
    /// Nagaoka's coefficient of the ratio diameter over length, exact by elliptic integrals (L. Lorenz, Wied. Ann. 7 (1879) 161;
    /// H. Nagaoka, J. Coll. Sci. Tokyo 27 art. 6 (1909)). 1 for a long coil.
    /// </summary>
    /// <param name="diameterOverLength">1e-6 .. 1e6.</param>
    public static double NagaokaCoefficient(double diameterOverLength)
    {
        double x = Demand.Within(diameterOverLength, 1e-6, 1e6, nameof(diameterOverLength), "");
        if (x > 2000)
        {
            return ShortCoil(x);
        }

        double m1 = 1 / (1 + (x * x));
        double kPrime = Math.Sqrt(m1);
        double k = x * kPrime;
        (_, double e, double d) = EllipticIntegrals.Complete(m1);
        return 4 / (3 * Math.PI * kPrime) * ((m1 * d) + e - k);
    }

    /// <summary>Inductance of the sheet, henry: mu0 N^2 pi a^2 K / l.</summary>
    /// <param name="diameterM">To the wire's centre, metres.</param>
    /// <param name="lengthM">Turns times pitch, metres.</param>
    /// <param name="turns">Number of turns.</param>
    public static double InductanceH(double diameterM, double lengthM, double turns)
    {
        Demand.Length(diameterM, nameof(diameterM));
        Demand.Length(lengthM, nameof(lengthM));
        Demand.Turns(turns);
        return PhysicalConstants.Mu0 * turns * turns * Math.PI * diameterM * diameterM / 4 / lengthM
            * NagaokaCoefficient(diameterM / lengthM);
    }

    // Rayleigh and Niven's series for a short coil: E - k would cancel here.
    private static double ShortCoil(double x)
    {
        double l = 1 / x;
        double log = Math.Log(4 / l);
        double bracket = log - 0.5 + (l * l / 8 * (log + 0.25));
        return 2 * l / Math.PI * bracket;
    }
}
