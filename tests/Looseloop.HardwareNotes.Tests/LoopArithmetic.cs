namespace Looseloop.HardwareNotes.Tests;

/// <summary>
/// The formulas of the page on the loop: thin coaxial rings. Kept apart from the project's own coil model so that one can be
/// held against the other.
/// </summary>
internal static class LoopArithmetic
{
    public const double Mu0 = 4e-7 * Math.PI;

    /// <summary>Complete elliptic integrals of a modulus k in 0..1 by the arithmetic-geometric mean (DLMF 19.8).</summary>
    public static (double K, double E) Elliptic(double modulus)
    {
        double a = 1;
        double b = Math.Sqrt(1 - modulus * modulus);
        double c = modulus;
        double sum = c * c / 2;
        double power = 1;
        while (Math.Abs(c) > 1e-16)
        {
            double nextA = (a + b) / 2;
            c = (a - b) / 2;
            b = Math.Sqrt(a * b);
            a = nextA;
            sum += power * c * c;
            power *= 2;
        }

        double first = Math.PI / (2 * a);
        return (first, first * (1 - sum));
    }

    /// <summary>Mutual inductance of two coaxial rings in henry: Maxwell, Treatise, article 701.</summary>
    public static double MutualH(double radiusAM, double radiusBM, double distanceM)
    {
        double k = Math.Sqrt(4 * radiusAM * radiusBM / (Math.Pow(radiusAM + radiusBM, 2) + distanceM * distanceM));
        (double first, double second) = Elliptic(k);
        return Mu0 * Math.Sqrt(radiusAM * radiusBM) * ((2 / k - k) * first - 2 / k * second);
    }

    /// <summary>Inductance of a ring of round wire with its current at the surface, in henry.</summary>
    public static double RingH(double radiusM, double wireRadiusM) =>
        Mu0 * radiusM * (Math.Log(8 * radiusM / wireRadiusM) - 2);

    /// <summary>Current-sheet inductance of a single-layer coil in henry, in Lorenz's form (L. Lorenz, 1879).</summary>
    public static double SheetH(double radiusM, double lengthM, double turns)
    {
        double diameterM = 2 * radiusM;
        double diagonalM = Math.Sqrt(diameterM * diameterM + lengthM * lengthM);
        (double k, double e) = Elliptic(diameterM / diagonalM);
        return Mu0 * turns * turns / (3 * lengthM * lengthM)
            * (diagonalM * (lengthM * lengthM * (k - e) + diameterM * diameterM * e) - Math.Pow(diameterM, 3));
    }

    /// <summary>
    /// Mutual inductance of a ring and a coaxial single-layer coil whose current is the same everywhere, in henry: the coil
    /// as 500 rings. The ring lies <paramref name="belowM"/> under the coil's first turn.
    /// </summary>
    public static double RingToCoilH(double ringRadiusM, double belowM, double radiusM, double lengthM, double turns)
    {
        const int Rings = 500;
        double sum = 0;
        for (int i = 0; i < Rings; i++)
        {
            sum += MutualH(ringRadiusM, radiusM, belowM + (i + 0.5) * lengthM / Rings);
        }

        return sum * turns / Rings;
    }

    /// <summary>Flux density on a ring's axis in tesla (Biot and Savart).</summary>
    public static double AxisFieldT(double currentA, double radiusM, double distanceM) =>
        Mu0 * currentA * radiusM * radiusM / (2 * Math.Pow(radiusM * radiusM + distanceM * distanceM, 1.5));
}
