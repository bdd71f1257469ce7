namespace Looseloop.Coil;

/// <summary>
/// A coil on file: TOML, every length with its unit in the key. Unknown keys, wrong kinds, missing values and geometry that cannot be
/// built are refused with the number of the line.
/// </summary>
public static class CoilFile
{
    private static readonly string[] _topKeys =
    [
        "name", "note", "winding_diameter_mm", "winding_length_mm", "turn_pitch_mm", "turns", "wire_diameter_mm", "former", "base_height_mm",
    ];

    private static readonly string[] _groundKeys = ["kind", "diameter_mm", "above_floor_mm"];
    private static readonly string[] _loadKeys = ["kind", "major_diameter_mm", "minor_diameter_mm", "diameter_mm", "height_mm"];
    private static readonly string[] _roomKeys = ["wall_distance_mm", "ceiling_height_mm"];

    private static readonly string[] _primaryKeys =
    [
        "inner_diameter_mm", "turns", "pitch_mm", "slope_deg", "conductor_diameter_mm", "base_height_mm", "capacitor_nf", "bus_voltage_v", "bridge",
    ];

    /// <summary>Reads a coil file's text.</summary>
    public static CoilFileResult Parse(string text)
    {
        TomlEntries entries = TomlEntries.Read(text);
        if (entries.Errors.Count > 0)
        {
            return new CoilFileResult(null, entries.Errors);
        }

        var values = new CoilFileValues(entries);
        CoilGeometry? coil = Build(values, entries);
        if (coil is not null && values.Errors.Count == 0)
        {
            foreach (GeometryProblem problem in GeometryCheck.Problems(coil))
            {
                string path = problem.Path == "winding_length_mm" && !values.Has(problem.Path) ? "turn_pitch_mm" : problem.Path;
                values.Errors.Add(new CoilFileError(values.LineOf(path), problem.Path + ": " + problem.Text));
            }

            CheckTolerances(coil, values);
        }

        RefuseUnknown(values);
        return values.Errors.Count > 0
            ? new CoilFileResult(null, [.. values.Errors.OrderBy(e => e.Line)])
            : new CoilFileResult(coil, []);
    }

    private static CoilGeometry? Build(CoilFileValues values, TomlEntries entries)
    {
        string? name = values.Word("name", required: true);
        string? note = values.Word("note", required: false);
        double? diameter = values.Number("winding_diameter_mm", required: true);
        double? turns = values.Number("turns", required: true);
        double? wire = values.Number("wire_diameter_mm", required: true);
        double? height = values.Number("base_height_mm", required: true);
        double? length = LengthOf(values, turns);
        Former? former = values.Word("former", required: false) is string word
            ? Former.Find(word) ?? values.Refuse<Former>("former",
                $"no former is called \"{word}\"; known are {string.Join(", ", Former.All.Select(f => f.Word))}")
            : Former.Unknown;
        Ground? ground = GroundOf(values);
        List<TopLoad> loads = LoadsOf(values, entries);
        PrimaryGeometry? primary = values.HasTable("primary") ? PrimaryOf(values) : null;
        double? wall = values.Number("room.wall_distance_mm", required: false);
        double? ceiling = values.Number("room.ceiling_height_mm", required: false);
        if (name is not null && string.IsNullOrWhiteSpace(name))
        {
            values.Refuse<object>("name", "the name is empty");
        }

        if (values.Errors.Count > 0 || name is null || diameter is null || length is null || turns is null || wire is null
            || height is null || former is null || ground is null)
        {
            return null;
        }

        return new CoilGeometry
        {
            Name = name,
            Note = note,
            WindingDiameterM = diameter.Value / 1e3,
            WindingLengthM = length.Value / 1e3,
            Turns = turns.Value,
            WireDiameterM = wire.Value / 1e3,
            BaseHeightM = height.Value / 1e3,
            Former = former,
            Ground = ground,
            TopLoads = loads,
            WallDistanceM = wall / 1e3,
            CeilingHeightM = ceiling / 1e3,
            Primary = primary,
            Tolerances = values.Numbers("tolerance."),
        };
    }

    private static double? LengthOf(CoilFileValues values, double? turns)
    {
        double? pitch = values.Number("turn_pitch_mm", required: false);
        if (pitch is null)
        {
            return values.Number("winding_length_mm", required: true);
        }

        if (values.Number("winding_length_mm", required: false) is not double length)
        {
            return pitch * turns;
        }

        if (turns is double n && !(Math.Abs((pitch.Value * n) - length) <= 0.005 * length))
        {
            values.Refuse<object>("turn_pitch_mm", FormattableString.Invariant(
                $"{n:G6} turns of {pitch.Value:G6} mm make {pitch.Value * n:G6} mm, not {length:G6} mm: give the length or the pitch, or make them agree"));
        }

        return length;
    }

    private static Ground? GroundOf(CoilFileValues values)
    {
        if (!values.HasTable("ground"))
        {
            return Ground.Plane;
        }

        switch (values.Word("ground.kind", required: true))
        {
            case "plane":
                return Ground.Plane;
            case "sheet":
                return new Ground(GroundKind.Sheet);
            case "disc":
                double? diameter = values.Number("ground.diameter_mm", required: true);
                double? above = values.Number("ground.above_floor_mm", required: true);
                return diameter is null || above is null ? null : new Ground(GroundKind.Disc, diameter.Value / 1e3, above.Value / 1e3);
            case null:
                return null;
            default:
                return values.Refuse<Ground>("ground.kind", "the ground is a \"plane\", a \"sheet\" or a \"disc\"");
        }
    }

    private static List<TopLoad> LoadsOf(CoilFileValues values, TomlEntries entries)
    {
        var loads = new List<TopLoad>();
        int count = Math.Max(1, entries.CountOf("top_load"));
        for (int i = 1; i <= count && values.HasTable("top_load"); i++)
        {
            string prefix = count > 1 ? FormattableString.Invariant($"top_load.{i}.") : "top_load.";
            string? kind = values.Word(prefix + "kind", required: true);
            if (kind is null || (kind == "none" && count == 1))
            {
                continue;
            }

            double Need(string key) => (values.Number(prefix + key, required: true) ?? double.NaN) / 1e3;
            switch (kind)
            {
                case "toroid":
                    loads.Add(new Toroid(Need("major_diameter_mm"), Need("minor_diameter_mm"), Need("height_mm")));
                    break;
                case "sphere":
                    loads.Add(new Sphere(Need("diameter_mm"), Need("height_mm")));
                    break;
                case "disc":
                    loads.Add(new Disc(Need("diameter_mm"), Need("height_mm")));
                    break;
                default:
                    values.Refuse<object>(prefix + "kind",
                        "a top load is a \"toroid\", a \"sphere\", a \"disc\" or \"none\"; several [[top_load]] tables make a stack");
                    break;
            }
        }

        return loads;
    }

    private static PrimaryGeometry? PrimaryOf(CoilFileValues values)
    {
        double? inner = values.Number("primary.inner_diameter_mm", required: true);
        double? turns = values.Number("primary.turns", required: true);
        double? pitch = values.Number("primary.pitch_mm", required: true);
        double? slope = values.Number("primary.slope_deg", required: true);
        double? conductor = values.Number("primary.conductor_diameter_mm", required: true);
        double? height = values.Number("primary.base_height_mm", required: true);
        double? capacitor = values.Number("primary.capacitor_nf", required: false);
        double? bus = values.Number("primary.bus_voltage_v", required: false);
        string? bridge = values.Word("primary.bridge", required: false);
        if (bridge is not (null or "half" or "full"))
        {
            values.Refuse<object>("primary.bridge", "a bridge is \"half\" or \"full\"");
        }

        return inner is null || turns is null || pitch is null || slope is null || conductor is null || height is null
            ? null
            : new PrimaryGeometry(inner.Value / 1e3, turns.Value, pitch.Value / 1e3, slope.Value, conductor.Value / 1e3, height.Value / 1e3)
            {
                CapacitorF = capacitor / 1e9,
                BusVoltageV = bus,
                FullBridge = bridge == "full",
            };
    }

    private static void CheckTolerances(CoilGeometry coil, CoilFileValues values)
    {
        foreach ((string path, double tolerance) in coil.Tolerances)
        {
            Dimension? dimension = Dimension.Of(coil).FirstOrDefault(d => d.Path == path);
            if (dimension is null)
            {
                values.Refuse<object>("tolerance." + path, $"this coil has no dimension {path}");
            }
            else if (!double.IsFinite(tolerance) || tolerance < 0 || tolerance > Math.Max(1, Math.Abs(dimension.Value)))
            {
                values.Refuse<object>("tolerance." + path, "a tolerance is a half-width in the dimension's own unit, 0 or more, and not larger than the dimension");
            }
        }
    }

    private static void RefuseUnknown(CoilFileValues values)
    {
        foreach (TomlEntry entry in values.Unused())
        {
            string table = entry.Path.Contains('.', StringComparison.Ordinal) ? entry.Path[..entry.Path.LastIndexOf('.')] : "";
            string key = table.Length > 0 ? entry.Path[(table.Length + 1)..] : entry.Path;
            string[] known = table.Split('.')[0] switch
            {
                "" => _topKeys,
                "ground" => _groundKeys,
                "top_load" => _loadKeys,
                "room" => _roomKeys,
                "primary" => _primaryKeys,
                _ => [],
            };
            string text = known.Contains(key)
                ? $"{entry.Path} has no meaning for this kind"
                : Spelling.Nearest(key, known) is string near
                    ? $"unknown key {entry.Path}; did you mean {near}?"
                    : $"unknown key {entry.Path}";
            values.Errors.Add(new CoilFileError(entry.Line, text));
        }
    }
}
