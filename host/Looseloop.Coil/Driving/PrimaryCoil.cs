namespace Looseloop.Coil;

/// <summary>
/// A primary turn by turn: every turn a loop of round conductor with the current on its skin. Between whole turns a winding's
/// inductance runs smoothly (its end always has the turn before it one pitch away): a cubic through the four nearest whole turns;
/// within the first turn an arc. Leads are not included; half a metre of lead adds some .3 to .5 uH (common practice, no source).
/// </summary>
public sealed class PrimaryCoil
{
    private readonly PrimaryGeometry _geometry;

    // Inductance of 0, 1, 2 ... whole turns, two beyond what is wound so that the last one can be interpolated too.
    private readonly double[] _wholeH;

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
        _wholeH = WholeTurns((int)Math.Ceiling(geometry.Turns) + 2);
    }

    /// <summary>The geometry.</summary>
    public PrimaryGeometry Geometry => _geometry;

    /// <summary>Inductance from the beginning to a tap, henry.</summary>
    /// <param name="turns">Where the tap sits, above 0 and at most the turns that are wound; a fraction is a part of a turn.</param>
    public double InductanceH(double turns)
    {
        Demand.Within(turns, 1e-3, _geometry.Turns * (1 + 1e-12), "the tap", "");
        int whole = (int)Math.Floor(turns);
        double part = turns - whole;
        if (part == 0)
        {
            return _wholeH[whole];
        }

        if (whole == 0)
        {
            return _wholeH[1] * LoopArc.SelfShare(part, _geometry.ConductorDiameterM / 2 / _geometry.RadiusM(0.5));
        }

        // Lagrange's polynomial through whole - 1 .. whole + 2.
        double a = _wholeH[whole - 1];
        double b = _wholeH[whole];
        double c = _wholeH[whole + 1];
        double d = _wholeH[whole + 2];
        return (-a * part * (part - 1) * (part - 2) / 6) + (b * (part + 1) * (part - 1) * (part - 2) / 2)
            - (c * (part + 1) * part * (part - 2) / 2) + (d * (part + 1) * part * (part - 1) / 6);
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
        MutualH(secondary, turns) / Math.Sqrt(InductanceH(turns) * Demand.Inductance(secondaryInductanceH, "the secondary's inductance"));

    /// <summary>Where the tap must sit for an inductance; null where the winding has too few turns for it.</summary>
    public double? TurnsForInductance(double inductanceH)
    {
        Demand.Inductance(inductanceH, "the inductance");
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

    private double[] WholeTurns(int count)
    {
        double[] sums = new double[count + 1];
        double wire = _geometry.ConductorDiameterM / 2;
        for (int i = 0; i < count; i++)
        {
            double r = _geometry.RadiusM(i + 0.5);
            double z = _geometry.HeightM(i + 0.5);
            double added = Loops.SelfH(r, wire, 0);
            for (int j = 0; j < i; j++)
            {
                added += 2 * Loops.MutualH(r, _geometry.RadiusM(j + 0.5), z - _geometry.HeightM(j + 0.5));
            }

            sums[i + 1] = sums[i] + added;
        }

        return sums;
    }

    private (double Share, double R, double Z)[] LoopsTo(double turns)
    {
        Demand.Within(turns, 1e-3, _geometry.Turns * (1 + 1e-12), "the tap", "");
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
