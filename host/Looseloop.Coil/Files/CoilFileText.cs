using System.Globalization;
using System.Text;

namespace Looseloop.Coil;

/// <summary>Writes a coil as the text of a coil file, with a remark beside each value.</summary>
public static class CoilFileText
{
    /// <summary>The text; <see cref="CoilFile.Parse"/> reads it back.</summary>
    public static string Of(CoilGeometry coil)
    {
        var text = new StringBuilder();
        void Line(string s) => text.Append(s).Append('\n');
        void Value(string key, double value, string remark) =>
            Line(string.Create(CultureInfo.InvariantCulture, $"{key} = {Number(value),-12} # {remark}"));

        Line("# A coil as it stands. Lengths in millimetres.");
        Line($"name = {Quoted(coil.Name)}");
        if (coil.Note is not null)
        {
            Line($"note = {Quoted(coil.Note)}");
        }

        Value("winding_diameter_mm", coil.WindingDiameterM * 1e3, "to the wire's centre");
        Value("winding_length_mm", coil.WindingLengthM * 1e3, "turns times pitch; or give turn_pitch_mm");
        Value("turns", coil.Turns, "");
        Value("wire_diameter_mm", coil.WireDiameterM * 1e3, "bare copper, without enamel");
        Line($"former = \"{coil.Former.Word}\" # {string.Join(", ", Former.All.Select(f => f.Word))}");
        Value("base_height_mm", coil.BaseHeightM * 1e3, "first turn above the ground");
        Line("");
        Line("[ground]");
        Line($"kind = \"{coil.Ground.Word}\" # plane (wide earthed floor), sheet (wide sheet of metal), disc");
        if (coil.Ground.Kind == GroundKind.Disc)
        {
            Value("diameter_mm", coil.Ground.DiameterM * 1e3, "of the disc");
            Value("above_floor_mm", coil.Ground.AboveFloorM * 1e3, "the disc above the floor");
        }

        if (coil.WallDistanceM is not null || coil.CeilingHeightM is not null)
        {
            Line("");
            Line("[room]");
            Optional("wall_distance_mm", coil.WallDistanceM * 1e3, "from the coil's axis to the nearest wall", Value);
            Optional("ceiling_height_mm", coil.CeilingHeightM * 1e3, "above the ground", Value);
        }

        AppendLoads(coil, Line, Value);
        if (coil.Primary is PrimaryGeometry primary)
        {
            AppendPrimary(primary, Line, Value);
        }

        if (coil.Tolerances.Count > 0)
        {
            Line("");
            Line("[tolerance]");
            foreach ((string path, double tolerance) in coil.Tolerances.OrderBy(t => t.Key, StringComparer.Ordinal))
            {
                Value(path, tolerance, "half-width, in the unit of the dimension");
            }
        }

        return text.ToString();
    }

    private static void AppendLoads(CoilGeometry coil, Action<string> line, Action<string, double, string> value)
    {
        if (coil.TopLoads.Count == 0)
        {
            line("");
            line("[top_load]");
            line("kind = \"none\" # toroid, sphere, disc, none; several [[top_load]] tables make a stack");
        }

        foreach (TopLoad load in coil.TopLoads)
        {
            line("");
            line(coil.TopLoads.Count == 1 ? "[top_load]" : "[[top_load]]");
            line($"kind = \"{load.Kind}\" # toroid, sphere, disc, none; several [[top_load]] tables make a stack");
            switch (load)
            {
                case Toroid toroid:
                    value("major_diameter_mm", toroid.MajorDiameterM * 1e3, "outside");
                    value("minor_diameter_mm", toroid.MinorDiameterM * 1e3, "of the tube");
                    break;
                case Sphere sphere:
                    value("diameter_mm", sphere.DiameterM * 1e3, "");
                    break;
                case Disc disc:
                    value("diameter_mm", disc.DiameterM * 1e3, "");
                    break;
            }

            value("height_mm", load.HeightM * 1e3, "its centre above the winding's top");
        }
    }

    private static void AppendPrimary(PrimaryGeometry primary, Action<string> line, Action<string, double, string> value)
    {
        line("");
        line("[primary]");
        value("inner_diameter_mm", primary.InnerDiameterM * 1e3, "of the first turn's beginning, to the conductor's centre");
        value("turns", primary.Turns, "as wound");
        value("pitch_mm", primary.PitchM * 1e3, "from turn to turn along the slope");
        value("slope_deg", primary.SlopeDegrees, "0 flat spiral, 90 helix, between: cone");
        value("conductor_diameter_mm", primary.ConductorDiameterM * 1e3, "tube or wire");
        value("base_height_mm", primary.BaseHeightM * 1e3, "of its beginning above the ground");
        Optional("capacitor_nf", primary.CapacitorF * 1e9, "tank capacitor", value);
        Optional("bus_voltage_v", primary.BusVoltageV, "supply of the driver's bridge", value);
        line($"bridge = \"{(primary.FullBridge ? "full" : "half")}\" # half (two switches), full (four)");
    }

    private static void Optional(string key, double? value, string remark, Action<string, double, string> write)
    {
        if (value is double number)
        {
            write(key, number, remark);
        }
    }

    // Twelve digits: a millimetre value that went through metres comes back as it was typed.
    private static string Number(double value)
    {
        string s = value.ToString("G12", CultureInfo.InvariantCulture);
        return s.Contains('E', StringComparison.Ordinal) && !s.Contains('.', StringComparison.Ordinal) ? s.Replace("E", ".0E", StringComparison.Ordinal) : s;
    }

    private static string Quoted(string s)
    {
        var quoted = new StringBuilder("\"");
        foreach (char c in s)
        {
            quoted.Append(c switch
            {
                '"' => "\\\"",
                '\\' => "\\\\",
                '\n' => "\\n",
                _ when char.IsControl(c) => string.Create(CultureInfo.InvariantCulture, $"\\u{(int)c:X4}"),
                _ => c.ToString(),
            });
        }

        return quoted.Append('"').ToString();
    }
}
