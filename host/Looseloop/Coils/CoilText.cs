using System.Text.Json;
using Looseloop.Coil;
using Looseloop.Rendering;
using Spectre.Console;

namespace Looseloop.Coils;

/// <summary>A coil's geometry as a person reads it, and as JSON.</summary>
internal static class CoilText
{
    public static void Write(IAnsiConsole console, CoilGeometry coil)
    {
        console.MarkupLineInterpolated($"[bold]{coil.Name}[/]{(coil.Note is null ? "" : $": {coil.Note}")}");
        Grid grid = new Grid().AddColumns(2);
        void Row(string name, string value) => grid.AddRow(Markup.Escape(name), Markup.Escape(value));
        Row("winding", $"{WindingWords(coil)} mm, {TurnsWords(coil)} turns");
        Row("wire", $"{Mm(coil.WireDiameterM)} mm bare at {Mm(coil.PitchM)} mm pitch, {Words.Number(WireM(coil), 0)} m, {Words.Digits(SkinEffect.DirectOhm(WireM(coil), coil.WireDiameterM), 4)} ohm at direct current");
        Row("former", coil.Former.Word);
        Row("base", $"{Mm(coil.BaseHeightM)} mm above {GroundWords(coil.Ground)}");
        Row("top load", coil.TopLoads.Count == 0 ? "none" : string.Join("; ", coil.TopLoads.Select(l => $"{LoadWords(l)}, centre {Mm(l.HeightM)} mm above the winding")));
        if (coil.WallDistanceM is double wall)
        {
            Row("wall", $"{Mm(wall)} mm away");
        }

        if (coil.CeilingHeightM is double ceiling)
        {
            Row("ceiling", $"{Mm(ceiling)} mm above the ground");
        }

        if (coil.Primary is PrimaryGeometry p)
        {
            Row("primary", $"{PrimaryWords(p)}, {Words.Number(p.Turns, 2)} turns from {Mm(p.InnerDiameterM)} mm, pitch {Mm(p.PitchM)} mm, conductor {Mm(p.ConductorDiameterM)} mm, {Mm(p.BaseHeightM)} mm above the ground");
            Row("driver", $"{(p.CapacitorF is double c ? Words.Nanofarad(c) : "no tank capacitor")}{(p.BusVoltageV is double v ? $", {Words.Plain(v)} V, {(p.FullBridge ? "full" : "half")} bridge" : "")}");
        }

        console.Write(grid);
    }

    public static void WriteJson(Utf8JsonWriter json, CoilGeometry coil)
    {
        json.WriteString("name", coil.Name);
        json.WriteString("note", coil.Note);
        json.WriteString("former", coil.Former.Word);
        json.WriteString("ground", coil.Ground.Word);
        json.Figure("turn_pitch_mm", coil.PitchM * 1e3);
        json.Figure("wire_m", WireM(coil));
        json.Figure("wire_direct_ohm", SkinEffect.DirectOhm(WireM(coil), coil.WireDiameterM));
        json.Objects("top_loads", coil.TopLoads, load => json.WriteString("kind", load.Kind));
        json.Objects("dimensions", Dimension.Of(coil).Concat(Dimension.OfPrimary(coil)).Where(d => double.IsFinite(d.Value)), d =>
        {
            json.WriteString("key", d.Path);
            json.Figure("value", d.Value);
            json.WriteString("unit", d.Unit);
        });
    }

    public static string LoadWords(TopLoad load) => load switch
    {
        Toroid t => $"toroid {Mm(t.MajorDiameterM)} x {Mm(t.MinorDiameterM)} mm",
        Sphere s => $"sphere {Mm(s.DiameterM)} mm",
        Disc d => $"disc {Mm(d.DiameterM)} mm",
        _ => load.Kind,
    };

    public static string WindingWords(CoilGeometry coil) => $"{Mm(coil.WindingDiameterM)} x {Mm(coil.WindingLengthM)}";

    public static string TurnsWords(CoilGeometry coil) => Words.Number(coil.Turns, coil.Turns % 1 == 0 ? 0 : 2);

    private static string PrimaryWords(PrimaryGeometry p) => p.SlopeDegrees <= 0 ? "flat spiral" : p.SlopeDegrees >= 90 ? "helix" : $"cone of {Words.Digits(p.SlopeDegrees, 3)} degrees";

    private static string GroundWords(Ground ground) => ground.Kind switch
    {
        GroundKind.Plane => "a wide earthed floor",
        GroundKind.Sheet => "a wide sheet of metal",
        _ => $"an earthed disc of {Mm(ground.DiameterM)} mm, {Mm(ground.AboveFloorM)} mm above the floor",
    };

    private static double WireM(CoilGeometry coil) => coil.Turns * double.Hypot(Math.PI * coil.WindingDiameterM, coil.PitchM);

    private static string Mm(double metres) => (metres * 1e3).ToString("0.###", System.Globalization.CultureInfo.InvariantCulture);
}
