namespace Looseloop.Coil;

/// <summary>
/// A primary turn by turn: every turn a loop of round conductor with the current on its skin, a part of a turn an arc. Leads are not
/// included; half a metre of lead adds some .3 to .5 uH (common practice, no source).
/// </summary>
public sealed class PrimaryCoil
{
    private readonly PrimaryGeometry _geometry;

    /// <summary>Takes the geometry; refuses impossible ones.</summary>
    public PrimaryCoil(PrimaryGeometry geometry)
    {
        Demand.Length(geometry.InnerDiameterM, "primary.inner_diameter_mm");
        Demand.Length(geometry.PitchM, "primary.pitch_mm");
        Demand.Within(geometry.SlopeDegrees, 0, 90, "primary.slope_deg", "");
        Demand.Within(geometry.ConductorDiameterM, 1e-9, geometry.InnerDiameterM / 2, "primary.conductor_diameter_mm", "m");
        Demand.Within(geometry.Turns, 0.05, 1000, "primary.turns", "");
        Demand.Within(geometry.BaseHeightM, 0, Demand.LongestM, "primary.base_height_mm", "m");
        if (geometry.Turns > 1 && geometry.ConductorDiameterM > geometry.PitchM)
        {
            throw new ArgumentOutOfRangeException(nameof(geometry), geometry.ConductorDiameterM,
                "the primary's conductor is thicker than its pitch");
        }

        _geometry = geometry;
    }

    /// <summary>The geometry.</summary>
    public PrimaryGeometry Geometry => _geometry;

    /// <summary>Inductance from the beginning to a tap, henry.</summary>
    /// <param name="turns">Where the tap sits, above 0 and at most the turns that are wound; a fraction is a part of a turn.</param>
    public double InductanceH(double turns)
    {
        (double Share, double R, double Z)[] loops = LoopsTo(turns);
        double wire = _geometry.ConductorDiameterM / 2;
        double sum = 0;
        for (int i = 0; i < loops.Length; i++)
        {
            (double share, double r, double z) = loops[i];
            sum += Loops.SelfH(r, wire, 0) * LoopArc.SelfShare(share, wire / r);
            for (int j = 0; j < i; j++)
            {
                // A whole loop and an arc: the arc's share of the whole, by symmetry.
                sum += 2 * share * loops[j].Share * Loops.MutualH(r, loops[j].R, z - loops[j].Z);
            }
        }

        return sum;
    }

    /// <summary>Mutual inductance of the turns up to a tap with a secondary, its turns taken one by one, henry.</summary>
    public double MutualH(CoilGeometry secondary, double turns)
    {
        (double Share, double R, double Z)[] loops = LoopsTo(turns);
        double a = secondary.WindingDiameterM / 2;
        // Above 2000 turns each filament stands for several; the field hardly varies over them.
        int filaments = (int)Math.Clamp(Math.Round(secondary.Turns), 1, 2000);
        double perFilament = secondary.Turns / filaments;
        double step = secondary.WindingLengthM / filaments;
        double sum = 0;
        foreach ((double share, double r, double z) in loops)
        {
            double own = 0;
            for (int k = 0; k < filaments; k++)
            {
                double height = secondary.BaseHeightM + ((k + 0.5) * step);
                own += Loops.MutualH(a, r, height - z);
            }

            sum += share * own * perFilament;
        }

        return sum;
    }

    /// <summary>k = M / sqrt(Lp Ls), both inductances at direct current.</summary>
    public double CouplingTo(CoilGeometry secondary, double turns, double secondaryInductanceH) =>
        MutualH(secondary, turns) / Math.Sqrt(InductanceH(turns) * Demand.Inductance(secondaryInductanceH, nameof(secondaryInductanceH)));

    /// <summary>Where the tap must sit for an inductance; null where the winding has too few turns for it.</summary>
    public double? TurnsForInductance(double inductanceH)
    {
        Demand.Inductance(inductanceH, nameof(inductanceH));
        double least = Math.Min(0.05, _geometry.Turns / 2);
        return Root.Bracketed(n => InductanceH(n) - inductanceH, least, _geometry.Turns);
    }

    /// <summary>Length of conductor from the beginning to a tap, metres.</summary>
    public double ConductorM(double turns)
    {
        double sum = 0;
        foreach ((double share, double r, _) in LoopsTo(turns))
        {
            sum += share * 2 * Math.PI * r;
        }

        return sum;
    }

    private (double Share, double R, double Z)[] LoopsTo(double turns)
    {
        Demand.Within(turns, 1e-3, _geometry.Turns * (1 + 1e-12), nameof(turns), "");
        var loops = new (double, double, double)[(int)Math.Ceiling(turns - 1e-9)];
        for (int i = 0; i < loops.Length; i++)
        {
            double share = Math.Min(1, turns - i);
            // Mid-turn: a turn of a spiral is best stood for by the loop of its mean radius.
            double middle = i + (share / 2);
            loops[i] = (share, _geometry.RadiusM(middle), _geometry.HeightM(middle));
        }

        return loops;
    }
}
