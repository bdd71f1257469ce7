namespace Looseloop.Coil;

/// <summary>
/// Part of a turn by itself. Its mutual inductance with whole coaxial loops is its share of the whole turn's, by symmetry; its own
/// inductance is not: that is Neumann's double integral over the arc.
/// </summary>
internal static class LoopArc
{
    /// <summary>Self-inductance of an arc over that of the whole loop, 0..1.</summary>
    /// <param name="share">The part of the turn, 0..1.</param>
    /// <param name="thickness">Wire radius over loop radius.</param>
    public static double SelfShare(double share, double thickness)
    {
        if (share <= 0)
        {
            return 0;
        }

        return share >= 1 ? 1 : Neumann(2 * Math.PI * share, thickness) / Neumann(2 * Math.PI, thickness);
    }

    // Double integral of cos(t - t') / distance over the arc, as a single one over the difference angle u, whose weight is
    // (arc - u). Both ends of a nearly closed turn lie close: u = g sinh(t) from either side takes the near-singularity out.
    private static double Neumann(double arc, double g)
    {
        double Term(double u, double weight) =>
            weight * Math.Cos(u) / Math.Sqrt((4 * Math.Sin(u / 2) * Math.Sin(u / 2)) + (g * g));

        double nearEnd = Math.Min(arc, Math.PI);
        double sum = GaussLegendre.Integrate(
            t => Term(g * Math.Sinh(t), arc - (g * Math.Sinh(t))) * g * Math.Cosh(t), 0, Math.Asinh(nearEnd / g), 4);
        if (arc > Math.PI)
        {
            sum += GaussLegendre.Integrate(
                t => Term(g * Math.Sinh(t), arc - (2 * Math.PI) + (g * Math.Sinh(t))) * g * Math.Cosh(t),
                Math.Asinh(((2 * Math.PI) - arc) / g), Math.Asinh(Math.PI / g), 4);
        }

        return sum;
    }
}
