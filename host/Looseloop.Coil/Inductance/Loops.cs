namespace Looseloop.Coil;

/// <summary>Circular loops: mutual and self-inductance.</summary>
public static class Loops
{
    /// <summary>
    /// Mutual inductance of two coaxial filaments, henry (Maxwell, Treatise art. 701; Rosa and Grover, Bull. BS 8 (1912) 1;
    /// with the elliptic integrals of DLMF 19).
    /// </summary>
    /// <param name="radiusAM">Radius of the one, metres.</param>
    /// <param name="radiusBM">Radius of the other, metres.</param>
    /// <param name="distanceM">Distance of their planes, metres; zero only where the radii differ.</param>
    public static double MutualH(double radiusAM, double radiusBM, double distanceM)
    {
        Demand.Length(radiusAM, nameof(radiusAM));
        Demand.Length(radiusBM, nameof(radiusBM));
        Demand.Within(distanceM, -Demand.LongestM, Demand.LongestM, nameof(distanceM), "m");
        double apart = ((radiusAM - radiusBM) * (radiusAM - radiusBM)) + (distanceM * distanceM);
        if (apart == 0)
        {
            throw new ArgumentException("two filaments in the same place have no finite mutual inductance: use SelfH with the wire's radius");
        }

        return MutualFromSquareH(radiusAM, radiusBM, apart, distanceM);
    }

    /// <summary>The same from the squared distance of the wires in the half-plane, where it is an effective one.</summary>
    internal static double MutualFromSquareH(double a, double b, double apartSquared, double dz)
    {
        double sum = ((a + b) * (a + b)) + (dz * dz);
        double m1 = Math.Min(1, apartSquared / sum);
        (double k, double s) = EllipticIntegrals.WithHigherSum(m1);
        double m = 4 * a * b / sum;
        // M = mu0 sqrt(ab) 2k [(K - E)/k^2 - K/2]
        return 2 * PhysicalConstants.Mu0 * Math.Sqrt(a * b) * m * Math.Sqrt(m) * k * s;
    }

    /// <summary>
    /// Self-inductance of one loop of round conductor, henry: mu0 R (ln(8R/a) - 2 + Y) (Maxwell; Rosa and Grover 1912).
    /// Good to (a/R)^2.
    /// </summary>
    /// <param name="radiusM">To the conductor's centre, metres.</param>
    /// <param name="wireRadiusM">The conductor's radius, metres; below the loop's.</param>
    /// <param name="insideShare">Y: 1/4 where the current fills the conductor evenly, 0 where it flows on its skin.</param>
    public static double SelfH(double radiusM, double wireRadiusM, double insideShare)
    {
        Demand.Length(radiusM, nameof(radiusM));
        Demand.Within(wireRadiusM, 1e-9, 0.999 * radiusM, nameof(wireRadiusM), "m");
        Demand.Within(insideShare, 0, 0.25, nameof(insideShare), "");
        return PhysicalConstants.Mu0 * radiusM * (Math.Log(8 * radiusM / wireRadiusM) - 2 + insideShare);
    }
}
