namespace Looseloop.Coil;

/// <summary>A layer of round wire taken as a porous foil (P.L. Dowell, Proc. IEE 113 (1966) 1387).</summary>
public static class Dowell
{
    /// <summary>Resistance over that at direct current of one layer: xi (sinh 2xi + sin 2xi)/(cosh 2xi - cos 2xi).</summary>
    /// <param name="xi">Foil thickness over skin depth, with porosity; 0 .. 1e6.</param>
    public static double SingleLayerRatio(double xi)
    {
        Demand.Within(xi, 0, 1e6, nameof(xi), "");
        if (xi < 0.05)
        {
            // Both halves of the fraction vanish together.
            return 1 + (4 * Math.Pow(xi, 4) / 45);
        }

        // Past 300 the hyperbolic functions overflow and their ratio is 1.
        return xi > 300 ? xi : xi * (Math.Sinh(2 * xi) + Math.Sin(2 * xi)) / (Math.Cosh(2 * xi) - Math.Cos(2 * xi));
    }

    /// <summary>xi of a layer of round wire: a square wire of the same section, spread to the pitch: (pi/4)^(3/4) d/delta sqrt(d/p).</summary>
    public static double Xi(double wireDiameterM, double pitchM, double skinDepthM)
    {
        Demand.Length(wireDiameterM, nameof(wireDiameterM));
        Demand.Length(pitchM, nameof(pitchM));
        Demand.Length(skinDepthM, nameof(skinDepthM));
        return Math.Pow(Math.PI / 4, 0.75) * wireDiameterM / skinDepthM * Math.Sqrt(wireDiameterM / pitchM);
    }
}
