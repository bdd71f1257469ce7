using System.Globalization;

namespace Looseloop.Coil;

/// <summary>One dimension of a coil by its path in a coil file, to read, to change, and with its usual tolerance.</summary>
/// <param name="Path">Such as <c>winding_diameter_mm</c> or <c>top_load.major_diameter_mm</c>; parts of a stack are numbered from 1.</param>
/// <param name="Name">In words.</param>
/// <param name="Unit">The unit of the value, such as mm; empty for turns.</param>
/// <param name="Value">In that unit.</param>
/// <param name="With">The coil with another value, in that unit; unchecked.</param>
public sealed record Dimension(string Path, string Name, string Unit, double Value, Func<double, CoilGeometry> With)
{
    /// <summary>
    /// Half-width of what a careful worker with rule and calliper is off by: .3 % of a length and at least .1 mm, 1 % of wire (enamel,
    /// stretch) and at least 3 um, .3 % of the turns, 2 mm of a height. Common practice, no source.
    /// </summary>
    public double DefaultTolerance => Path switch
    {
        "turns" => 0.003 * Value,
        "wire_diameter_mm" => Math.Max(0.003, 0.01 * Value),
        _ when Path.EndsWith("height_mm", StringComparison.Ordinal) => 2,
        _ => Math.Max(0.1, 0.003 * Math.Abs(Value)),
    };

    /// <summary>The path of a key of one body of the top load: numbered only where there are several.</summary>
    public static string LoadPath(CoilGeometry coil, int index, string key) => coil.TopLoads.Count == 1
        ? "top_load." + key
        : string.Create(CultureInfo.InvariantCulture, $"top_load.{index + 1}.{key}");

    /// <summary>All dimensions that decide a coil's resonance.</summary>
    public static IReadOnlyList<Dimension> Of(CoilGeometry coil)
    {
        var all = new List<Dimension>
        {
            Millimetres("winding_diameter_mm", "winding diameter", coil.WindingDiameterM, m => coil with { WindingDiameterM = m }),
            Millimetres("winding_length_mm", "winding length", coil.WindingLengthM, m => coil with { WindingLengthM = m }),
            new("turns", "turns", "", coil.Turns, n => coil with { Turns = n }),
            Millimetres("wire_diameter_mm", "wire diameter", coil.WireDiameterM, m => coil with { WireDiameterM = m }),
            Millimetres("base_height_mm", "base height", coil.BaseHeightM, m => coil with { BaseHeightM = m }),
        };
        if (coil.Ground.Kind == GroundKind.Disc)
        {
            all.Add(Millimetres("ground.diameter_mm", "ground disc diameter", coil.Ground.DiameterM,
                m => coil with { Ground = coil.Ground with { DiameterM = m } }));
            all.Add(Millimetres("ground.above_floor_mm", "ground disc above floor", coil.Ground.AboveFloorM,
                m => coil with { Ground = coil.Ground with { AboveFloorM = m } }));
        }

        for (int i = 0; i < coil.TopLoads.Count; i++)
        {
            AddLoad(coil, i, all);
        }

        return all;
    }

    /// <summary>What may be changed of the primary; empty where there is none.</summary>
    public static IReadOnlyList<Dimension> OfPrimary(CoilGeometry coil)
    {
        if (coil.Primary is not PrimaryGeometry p)
        {
            return [];
        }

        CoilGeometry Replace(PrimaryGeometry other) => coil with { Primary = other };
        return
        [
            Millimetres("primary.inner_diameter_mm", "primary inner diameter", p.InnerDiameterM, m => Replace(p with { InnerDiameterM = m })),
            new("primary.turns", "primary turns", "", p.Turns, n => Replace(p with { Turns = n })),
            Millimetres("primary.pitch_mm", "primary pitch", p.PitchM, m => Replace(p with { PitchM = m })),
            new("primary.slope_deg", "primary slope", "degrees", p.SlopeDegrees, d => Replace(p with { SlopeDegrees = d })),
            Millimetres("primary.conductor_diameter_mm", "primary conductor", p.ConductorDiameterM, m => Replace(p with { ConductorDiameterM = m })),
            Millimetres("primary.base_height_mm", "primary height", p.BaseHeightM, m => Replace(p with { BaseHeightM = m })),
            new("primary.capacitor_nf", "tank capacitor", "nF", (p.CapacitorF ?? double.NaN) * 1e9, c => Replace(p with { CapacitorF = c / 1e9 })),
            new("primary.bus_voltage_v", "bus voltage", "V", p.BusVoltageV ?? double.NaN, v => Replace(p with { BusVoltageV = v })),
        ];
    }

    /// <summary>The dimension of that path, of coil or primary, or null.</summary>
    public static Dimension? Find(CoilGeometry coil, string path) =>
        Of(coil).Concat(OfPrimary(coil)).FirstOrDefault(d => string.Equals(d.Path, path, StringComparison.Ordinal));

    private static void AddLoad(CoilGeometry coil, int i, List<Dimension> all)
    {
        TopLoad load = coil.TopLoads[i];
        CoilGeometry Replace(TopLoad other) => coil with { TopLoads = [.. coil.TopLoads.Select((l, k) => k == i ? other : l)] };
        string which = coil.TopLoads.Count == 1 ? load.Kind : string.Create(CultureInfo.InvariantCulture, $"{load.Kind} {i + 1}");
        void Add(string key, string words, double valueM, Func<double, TopLoad> with) =>
            all.Add(Millimetres(LoadPath(coil, i, key), which + " " + words, valueM, m => Replace(with(m))));
        switch (load)
        {
            case Toroid toroid:
                Add("major_diameter_mm", "outside diameter", toroid.MajorDiameterM, m => toroid with { MajorDiameterM = m });
                Add("minor_diameter_mm", "tube diameter", toroid.MinorDiameterM, m => toroid with { MinorDiameterM = m });
                break;
            case Sphere sphere:
                Add("diameter_mm", "diameter", sphere.DiameterM, m => sphere with { DiameterM = m });
                break;
            case Disc disc:
                Add("diameter_mm", "diameter", disc.DiameterM, m => disc with { DiameterM = m });
                break;
        }

        Add("height_mm", "height", load.HeightM, m => load with { HeightM = m });
    }

    private static Dimension Millimetres(string path, string name, double valueM, Func<double, CoilGeometry> withM) =>
        new(path, name, "mm", valueM * 1e3, mm => withM(mm / 1e3));
}
