namespace Looseloop.Coil;

/// <summary>Closed handbook formulas for a single-layer coil, kept as cross checks of <see cref="CurrentSheet"/>.</summary>
public static class HandbookFormulas
{
    /// <summary>Lundin's two-branch formula, henry (Proc. IEEE 73 (1985) 1428); within 3e-6 of the exact sheet.</summary>
    public static double LundinH(double diameterM, double lengthM, double turns)
    {
        Demand.Length(diameterM, nameof(diameterM));
        Demand.Length(lengthM, nameof(lengthM));
        Demand.Turns(turns);
        double a = diameterM / 2;
        double scale = PhysicalConstants.Mu0 * turns * turns * a;
        if (diameterM <= lengthM)
        {
            double x = diameterM * diameterM / (lengthM * lengthM);
            return scale * Math.PI * a / lengthM * (F1(x) - (8 * a / (3 * Math.PI * lengthM)));
        }

        double y = lengthM * lengthM / (diameterM * diameterM);
        return scale * (((Math.Log(8 * a / lengthM) - 0.5) * F1(y)) + F2(y));
    }

    /// <summary>Wheeler's formula of 1928, henry (Proc. IRE 16 (1928) 1398); within 1 % for lengths above .4 diameters.</summary>
    public static double Wheeler1928H(double diameterM, double lengthM, double turns)
    {
        Demand.Length(diameterM, nameof(diameterM));
        Demand.Length(lengthM, nameof(lengthM));
        Demand.Turns(turns);
        const double InchM = 0.0254;
        double r = diameterM / 2 / InchM;
        double l = lengthM / InchM;
        return 1e-6 * r * r * turns * turns / ((9 * r) + (10 * l));
    }

    /// <summary>A continuous form after Wheeler (Proc. IEEE 70 (1982) 1449, with later coefficients), henry; within 2.2e-5 of the sheet.</summary>
    public static double WheelerContinuousH(double diameterM, double lengthM, double turns)
    {
        Demand.Length(diameterM, nameof(diameterM));
        Demand.Length(lengthM, nameof(lengthM));
        Demand.Turns(turns);
        double k = lengthM / diameterM;
        double second = 1 / (2.3004 + (3.437 * k) + (1.7636 * k * k) - (0.47 / Math.Pow(0.755 + (1 / k), 1.44)));
        return 0.002e-6 * Math.PI * (diameterM * 100) * turns * turns * (Math.Log(1 + (Math.PI / (2 * k))) + second);
    }

    /// <summary>Wheeler's formula for a flat spiral, henry (Proc. IRE 16 (1928) 1398); several per cent.</summary>
    /// <param name="meanRadiusM">Mean radius, metres.</param>
    /// <param name="radialWidthM">From the first to the last turn, metres.</param>
    /// <param name="turns">Number of turns.</param>
    public static double WheelerSpiralH(double meanRadiusM, double radialWidthM, double turns)
    {
        Demand.Length(meanRadiusM, nameof(meanRadiusM));
        Demand.Length(radialWidthM, nameof(radialWidthM));
        Demand.Turns(turns);
        const double InchM = 0.0254;
        double r = meanRadiusM / InchM;
        return 1e-6 * r * r * turns * turns / ((8 * r) + (11 * radialWidthM / InchM));
    }

    private static double F1(double x) => (1 + (0.383901 * x) + (0.017108 * x * x)) / (1 + (0.258952 * x));

    private static double F2(double x) => (0.093842 * x) + (0.002029 * x * x) - (0.000801 * x * x * x);
}
