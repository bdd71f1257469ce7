namespace Looseloop.Coil;

/// <summary>How one dimension moves f1, and what its tolerance makes of that.</summary>
/// <param name="Dimension">Which.</param>
/// <param name="RelativePerPercent">Relative change of f1 for a small relative change of the dimension (per cent for per cent); NaN for a dimension of zero.</param>
/// <param name="HzPerUnit">Change of f1 per unit of the dimension (per millimetre, per turn), hertz.</param>
/// <param name="Tolerance">Half-width taken, in the dimension's unit.</param>
/// <param name="Stated">True where the coil file states it, false for the default.</param>
public sealed record Sensitivity(Dimension Dimension, double RelativePerPercent, double HzPerUnit, double Tolerance, bool Stated)
{
    /// <summary>Standard uncertainty of f1 that it makes, hertz: an even distribution over the tolerance (GUM 4.3.7).</summary>
    public double UncertaintyHz => Math.Abs(HzPerUnit) * Tolerance / Math.Sqrt(3);
}
