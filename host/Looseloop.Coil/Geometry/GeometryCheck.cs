using static System.FormattableString;

namespace Looseloop.Coil;

/// <summary>Whether a coil can exist: every dimension in its range, and no conductor inside another.</summary>
public static class GeometryCheck
{
    /// <summary>Everything that is wrong; empty for a coil that can be built.</summary>
    public static IReadOnlyList<GeometryProblem> Problems(CoilGeometry coil)
    {
        var problems = new List<GeometryProblem>();
        void Range(double valueM, string path, double leastM, double mostM, double perUnit = 1e3, string unit = "mm")
        {
            if (!double.IsFinite(valueM) || valueM < leastM || valueM > mostM)
            {
                problems.Add(new GeometryProblem(
                    path, Invariant($"must lie between {leastM * perUnit:G6} and {mostM * perUnit:G6} {unit}").TrimEnd()));
            }
        }

        Range(coil.WindingDiameterM, "winding_diameter_mm", 1e-3, 100);
        Range(coil.WindingLengthM, "winding_length_mm", 1e-4, 100);
        Range(coil.Turns, "turns", 1, 1e5, 1, "");
        Range(coil.WireDiameterM, "wire_diameter_mm", 1e-7, 1);
        Range(coil.BaseHeightM, "base_height_mm", 0, 100);
        if (coil.Ground.Kind == GroundKind.Disc)
        {
            Range(coil.Ground.DiameterM, "ground.diameter_mm", 1e-3, 1000);
            Range(coil.Ground.AboveFloorM, "ground.above_floor_mm", 1e-3, 1000);
        }

        if (coil.WallDistanceM is double wall)
        {
            Range(wall, "room.wall_distance_mm", 1e-2, 1000);
        }

        if (coil.CeilingHeightM is double ceiling)
        {
            Range(ceiling, "room.ceiling_height_mm", 1e-2, 1000);
        }

        for (int i = 0; i < coil.TopLoads.Count; i++)
        {
            CheckLoadRanges(coil, i, (v, path, least, most) => Range(v, path, least, most));
        }

        if (coil.Primary is PrimaryGeometry primary)
        {
            Range(primary.InnerDiameterM, "primary.inner_diameter_mm", 1e-3, 100);
            Range(primary.Turns, "primary.turns", 0.05, 1000, 1, "");
            Range(primary.PitchM, "primary.pitch_mm", 1e-4, 10);
            Range(primary.SlopeDegrees, "primary.slope_deg", 0, 90, 1, "degrees");
            Range(primary.ConductorDiameterM, "primary.conductor_diameter_mm", 1e-5, 1);
            Range(primary.BaseHeightM, "primary.base_height_mm", 0, 100);
            if (primary.CapacitorF is double c)
            {
                Range(c, "primary.capacitor_nf", 1e-12, 1e-3, 1e9, "nF");
            }

            if (primary.BusVoltageV is double v)
            {
                Range(v, "primary.bus_voltage_v", 0.1, 1e5, 1, "V");
            }
        }

        if (problems.Count == 0)
        {
            CheckFit(coil, problems);
        }

        return problems;
    }

    /// <summary>Refuses a coil that cannot be built.</summary>
    /// <exception cref="ImpossibleGeometryException">With every reason.</exception>
    public static void ThrowIfImpossible(CoilGeometry coil)
    {
        IReadOnlyList<GeometryProblem> problems = Problems(coil);
        if (problems.Count > 0)
        {
            throw new ImpossibleGeometryException(problems);
        }
    }

    private static void CheckLoadRanges(CoilGeometry coil, int index, Action<double, string, double, double> range)
    {
        string At(string key) => Dimension.LoadPath(coil, index, key);
        TopLoad load = coil.TopLoads[index];
        range(load.HeightM, At("height_mm"), -100, 100);
        switch (load)
        {
            case Toroid toroid:
                range(toroid.MajorDiameterM, At("major_diameter_mm"), 1e-3, 100);
                range(toroid.MinorDiameterM, At("minor_diameter_mm"), 1e-4, 100);
                break;
            case Sphere sphere:
                range(sphere.DiameterM, At("diameter_mm"), 1e-3, 100);
                break;
            case Disc disc:
                range(disc.DiameterM, At("diameter_mm"), 1e-3, 100);
                break;
        }
    }

    private static void CheckFit(CoilGeometry coil, List<GeometryProblem> problems)
    {
        if (coil.WireDiameterM > coil.PitchM * (1 + 1e-9))
        {
            problems.Add(new GeometryProblem("wire_diameter_mm", Invariant(
                $"the wire of {coil.WireDiameterM * 1e3:G4} mm is thicker than the pitch of {coil.PitchM * 1e3:G4} mm (length over turns)")));
        }

        if (coil.PitchM > coil.WindingDiameterM * 5)
        {
            problems.Add(new GeometryProblem("turns", Invariant(
                $"the pitch of {coil.PitchM * 1e3:G4} mm is more than five diameters: this is a wire, not a coil")));
        }

        // With the first turn in the plane itself the base has no distance from its image.
        if (coil.BaseHeightM < coil.WireDiameterM / 2)
        {
            problems.Add(new GeometryProblem("base_height_mm",
                "the first turn lies in the ground plane; give the height of the wire's centre above it"));
        }

        for (int i = 0; i < coil.TopLoads.Count; i++)
        {
            CheckLoadFit(coil, i, problems);
        }

        if (coil.Primary is PrimaryGeometry primary)
        {
            CheckPrimaryFit(coil, primary, problems);
        }
    }

    private static void CheckLoadFit(CoilGeometry coil, int index, List<GeometryProblem> problems)
    {
        TopLoad load = coil.TopLoads[index];
        string height = Dimension.LoadPath(coil, index, "height_mm");
        if (load is Toroid toroid && toroid.MinorDiameterM >= toroid.MajorDiameterM / 2)
        {
            problems.Add(new GeometryProblem(Dimension.LoadPath(coil, index, "minor_diameter_mm"),
                "the tube must be thinner than half of the outside diameter, or the toroid has no hole"));
            return;
        }

        if (load.LowestM + coil.TopHeightM <= 0)
        {
            problems.Add(new GeometryProblem(height, "the top load reaches into the ground plane"));
            return;
        }

        if (InsideWinding(coil, load))
        {
            problems.Add(new GeometryProblem(height, Invariant(
                $"the {load.Kind} reaches into the winding: its lowest point is {load.LowestM * 1e3:G4} mm from the winding's top, height counts from there to its centre")));
        }

        for (int j = 0; j < index; j++)
        {
            bool overlap = load.Profile.Cut(48, 0).Any(b => coil.TopLoads[j].Clearance(b.RadiusM, b.HeightM) < 0)
                || coil.TopLoads[j].Profile.Cut(48, 0).Any(b => load.Clearance(b.RadiusM, b.HeightM) < 0);
            if (overlap)
            {
                problems.Add(new GeometryProblem(height, Invariant($"parts {j + 1} and {index + 1} of the top load lie inside one another")));
            }
        }
    }

    private static bool InsideWinding(CoilGeometry coil, TopLoad load)
    {
        double a = coil.WindingDiameterM / 2;
        const int Steps = 200;
        for (int i = 0; i <= Steps; i++)
        {
            double z = -coil.WindingLengthM * i / Steps;
            if (load.Clearance(a, z) <= coil.WireDiameterM / 2)
            {
                return true;
            }
        }

        // Within the former without touching the wire is no place either.
        return load.Profile.Cut(48, 0).Any(b => b.RadiusM < a && b.HeightM < 0);
    }

    private static void CheckPrimaryFit(CoilGeometry coil, PrimaryGeometry primary, List<GeometryProblem> problems)
    {
        if (primary.ConductorDiameterM > primary.PitchM && primary.Turns > 1)
        {
            problems.Add(new GeometryProblem("primary.conductor_diameter_mm", Invariant(
                $"the conductor of {primary.ConductorDiameterM * 1e3:G4} mm is thicker than the primary's pitch of {primary.PitchM * 1e3:G4} mm")));
        }

        if (primary.InnerDiameterM - primary.ConductorDiameterM <= coil.WindingDiameterM + coil.WireDiameterM)
        {
            problems.Add(new GeometryProblem("primary.inner_diameter_mm", "the primary's first turn does not clear the winding"));
        }

        if (primary.ConductorDiameterM >= primary.InnerDiameterM / 2)
        {
            problems.Add(new GeometryProblem("primary.conductor_diameter_mm", "the conductor is too thick for a turn of this diameter"));
        }
    }
}
