namespace Looseloop.Coil;

/// <summary>A narrow ring-shaped strip of a surface of revolution.</summary>
/// <param name="RadiusM">Of its middle, metres.</param>
/// <param name="HeightM">Of its middle, metres.</param>
/// <param name="WidthM">Along the surface, metres.</param>
/// <param name="AlongM">Where its middle lies along the surface's line, metres.</param>
/// <param name="Surface">Which surface it belongs to.</param>
/// <param name="PerimeterM">Length of that surface's line where it is closed, else 0.</param>
internal readonly record struct Band(
    double RadiusM, double HeightM, double WidthM, double AlongM, int Surface, double PerimeterM)
{
    /// <summary>
    /// Square of the distance that stands for the two bands' mean logarithmic one: on one surface the geometric mean distance of
    /// strips (E.B. Rosa, Bull. Bureau of Standards 2 (1906) 161), else that of their middles.
    /// </summary>
    public static double EffectiveSquare(in Band a, in Band b)
    {
        double dr = a.RadiusM - b.RadiusM;
        double dz = a.HeightM - b.HeightM;
        double chord = (dr * dr) + (dz * dz);
        if (a.Surface != b.Surface)
        {
            return chord;
        }

        double apart = Math.Abs(a.AlongM - b.AlongM);
        if (a.PerimeterM > 0)
        {
            apart = Math.Min(apart, a.PerimeterM - apart);
        }

        if (apart < 0.25 * Math.Min(a.WidthM, b.WidthM))
        {
            double own = a.WidthM * Math.Exp(-1.5);
            return own * own;
        }

        double ratio = GeometricMeanDistance.OfStrips(apart, a.WidthM, b.WidthM) / apart;
        return chord * ratio * ratio;
    }
}
