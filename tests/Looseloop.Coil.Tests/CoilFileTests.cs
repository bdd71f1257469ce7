using System.Globalization;
using CsCheck;

namespace Looseloop.Coil.Tests;

public class CoilFileTests
{
    private const string Good = """
        name = "sample"
        winding_diameter_mm = 110
        winding_length_mm = 480
        turns = 1000
        wire_diameter_mm = 0.40
        base_height_mm = 30

        [top_load]
        kind = "toroid"
        major_diameter_mm = 300
        minor_diameter_mm = 80
        height_mm = 50
        """;

    [Fact]
    public void Good_file()
    {
        CoilFileResult result = CoilFile.Parse(Good);
        Assert.Empty(result.Errors);
        Assert.Equal(SampleCoil.Loaded.TopLoads[0], result.Coil!.TopLoads[0]);
        Assert.Equal(Expectations.F1Hz(SampleCoil.Loaded, Resolution.Quick), Expectations.F1Hz(result.Coil, Resolution.Quick), 1e-6);
    }

    [Theory]
    [InlineData("turns = 1000", "turns = 1000\ntop_laod = 3", 5, "unknown key top_laod")]
    [InlineData("turns = 1000", "turns = 1000\nwinding_diametre_mm = 3", 5, "did you mean winding_diameter_mm")]
    [InlineData("height_mm = 50", "heigth_mm = 50", 12, "did you mean height_mm")]
    [InlineData("height_mm = 50", "heigth_mm = 50", 8, "top_load.height_mm is missing")]
    [InlineData("turns = 1000", "turns = 2000", 5, "thicker than the pitch")]
    [InlineData("base_height_mm = 30", "base_height_mm = -30", 6, "must lie between")]
    [InlineData("base_height_mm = 30", "base_height_mm = 0", 6, "lies in the ground plane")]
    [InlineData("turns = 1000", "turns = nan", 4, "must lie between")]
    [InlineData("turns = 1000", "turns = inf", 4, "must lie between")]
    [InlineData("turns = 1000", "turns = 0", 4, "must lie between")]
    [InlineData("turns = 1000", "turns = 1e30", 4, "must lie between")]
    [InlineData("turns = 1000", "turns = \"many\"", 4, "must be a number")]
    [InlineData("turns = 1000", "turns = [1, 2]", 4, "must be a number")]
    [InlineData("turns = 1000\n", "", 1, "turns is missing")]
    [InlineData("turns = 1000", "turns = ", 4, "not TOML")]
    [InlineData("turns = 1000", "turns = 1000\nturns = 1000", 5, "not TOML")]
    [InlineData("minor_diameter_mm = 80", "minor_diameter_mm = 160", 11, "no hole")]
    [InlineData("kind = \"toroid\"", "kind = \"doughnut\"", 9, "a top load is")]
    [InlineData("kind = \"toroid\"", "kind = \"toroid\"\ndiameter_mm = 3", 10, "no meaning for this kind")]
    [InlineData("name = \"sample\"", "name = \"sample\"\nformer = \"oak\"", 2, "no former is called")]
    [InlineData("turns = 1000", "turns = 1000\nturn_pitch_mm = 0.6", 5, "600 mm, not 480 mm")]
    [InlineData("height_mm = 50", "height_mm = 50\n[ground]\nkind = \"mud\"", 14, "the ground is a")]
    [InlineData("height_mm = 50", "height_mm = 50\n[tolerance]\nwidth_mm = 1", 14, "no dimension width_mm")]
    [InlineData("height_mm = 50", "height_mm = 50\n[tolerance]\nturns = -1", 14, "0 or more")]
    [InlineData("height_mm = 50", "height_mm = 50\n[primary]\ninner_diameter_mm = 90\nturns = 8\npitch_mm = 12\nslope_deg = 0\nconductor_diameter_mm = 6\nbase_height_mm = 30", 14, "does not clear the winding")]
    public void Refused_with_the_line(string what, string with, int line, string text)
    {
        string normal = Good.ReplaceLineEndings("\n");
        Assert.Contains(what, normal, StringComparison.Ordinal);
        CoilFileResult result = CoilFile.Parse(ReplaceFirst(normal, what, with));
        Assert.Null(result.Coil);
        Assert.Contains(result.Errors, e => e.Line == line && e.Text.Contains(text, StringComparison.Ordinal));
    }

    // A toroid whose hole clears the winding may sit low; one whose hole does not may not.
    [Fact]
    public void Top_load_inside_the_winding()
    {
        string narrow = Good.Replace("major_diameter_mm = 300", "major_diameter_mm = 170", StringComparison.Ordinal);
        Assert.NotNull(CoilFile.Parse(narrow).Coil);
        Assert.NotNull(CoilFile.Parse(Good.Replace("\nheight_mm = 50", "\nheight_mm = -40", StringComparison.Ordinal)).Coil);
        foreach (string height in (string[])["30", "0", "-200"])
        {
            CoilFileResult result = CoilFile.Parse(narrow.Replace("\nheight_mm = 50", "\nheight_mm = " + height, StringComparison.Ordinal));
            Assert.Contains(result.Errors, e => e.Line == 12 && e.Text.Contains("reaches into the winding", StringComparison.Ordinal));
        }
    }

    private static string ReplaceFirst(string text, string what, string with)
    {
        // A key may be the tail of another one: take the whole line.
        int at = ("\n" + text).IndexOf("\n" + what, StringComparison.Ordinal);
        return text[..at] + with + text[(at + what.Length)..];
    }

    [Fact]
    public void Every_error_is_told_at_once()
    {
        CoilFileResult result = CoilFile.Parse(Good.Replace("turns = 1000", "turns = -1", StringComparison.Ordinal).Replace("= 300", "= 0", StringComparison.Ordinal));
        Assert.Equal(2, result.Errors.Count);
    }

    [Fact]
    public void Pitch_serves_in_place_of_length()
    {
        CoilFileResult result = CoilFile.Parse(Good.Replace("winding_length_mm = 480", "turn_pitch_mm = 0.48", StringComparison.Ordinal));
        Assert.Equal(.48, result.Coil!.WindingLengthM, 1e-12);
        CoilFileResult thick = CoilFile.Parse(Good.Replace("winding_length_mm = 480", "turn_pitch_mm = 0.3", StringComparison.Ordinal));
        Assert.Contains(thick.Errors, e => e.Text.Contains("thicker than the pitch", StringComparison.Ordinal));
    }

    [Fact]
    public void Dotted_keys_and_inline_tables_mean_the_same()
    {
        string[] head = Good.ReplaceLineEndings("\n").Split("\n\n");
        CoilFileResult inline = CoilFile.Parse(
            head[0] + "\ntop_load = { kind = \"toroid\", major_diameter_mm = 300, minor_diameter_mm = 80, height_mm = 50 }\n");
        CoilFileResult dotted = CoilFile.Parse(
            head[0] + "\ntop_load.kind = \"toroid\"\ntop_load.major_diameter_mm = 300\ntop_load.minor_diameter_mm = 80\ntop_load.height_mm = 50\n");
        Assert.Empty(inline.Errors);
        Assert.Empty(dotted.Errors);
        Assert.Equal(inline.Coil!.TopLoads, dotted.Coil!.TopLoads);
    }

    [Fact]
    public void A_stack_numbers_its_parts()
    {
        string[] head = Good.ReplaceLineEndings("\n").Split("\n\n");
        string Stack(double secondHeight) => head[0] + string.Create(CultureInfo.InvariantCulture, $"""

            [[top_load]]
            kind = "toroid"
            major_diameter_mm = 300
            minor_diameter_mm = 80
            height_mm = 50
            [[top_load]]
            kind = "sphere"
            diameter_mm = 100
            height_mm = {secondHeight}
            """);
        CoilFileResult good = CoilFile.Parse(Stack(200));
        Assert.Equal(2, good.Coil!.TopLoads.Count);
        Assert.NotNull(Dimension.Find(good.Coil, "top_load.2.diameter_mm"));
        CoilFileResult bad = CoilFile.Parse(Stack(-100));
        Assert.Contains(bad.Errors, e => e.Line == 15 && e.Text.Contains("top_load.2.height_mm", StringComparison.Ordinal));
    }

    [Fact]
    public void The_examples_are_good_and_can_be_worked_out()
    {
        foreach (string name in CoilExamples.Names)
        {
            CoilFileResult result = CoilFile.Parse(CoilExamples.Text(name)!);
            Assert.True(result.Errors.Count == 0, name + ": " + string.Join("; ", result.Errors));
            Assert.Equal(name, result.Coil!.Name);
            Assert.InRange(Expectations.F1Hz(result.Coil, Resolution.Quick), 20e3, 2e6);
        }

        Assert.Null(CoilExamples.Text("nowhere"));
    }

    // A coil written and read again is the same coil.
    [Fact]
    public void Round_trip()
    {
        foreach (string name in CoilExamples.Names)
        {
            CoilGeometry coil = CoilFile.Parse(CoilExamples.Text(name)!).Coil!;
            CoilFileResult again = CoilFile.Parse(CoilFileText.Of(coil));
            Assert.Empty(again.Errors);
            Assert.Equal(coil.TopLoads, again.Coil!.TopLoads);
            Assert.Equal(coil.Tolerances, again.Coil.Tolerances);
            Assert.Equal(coil with { TopLoads = [], Tolerances = again.Coil.Tolerances }, again.Coil with { TopLoads = [], Tolerances = again.Coil.Tolerances }, SameCoil);
        }
    }

    private static bool SameCoil(CoilGeometry a, CoilGeometry b) => CoilFileText.Of(a) == CoilFileText.Of(b)
        && Math.Abs((a.WindingLengthM / b.WindingLengthM) - 1) < 1e-12 && a.Former == b.Former && a.Ground == b.Ground && a.Note == b.Note;

    [Fact]
    public void Any_name_survives() => Gen.String[Gen.Char["abcXYZ 019\"\\\t\n\u0001é"], 1, 20]
        .Where(s => !string.IsNullOrWhiteSpace(s))
        .Sample(name => CoilFile.Parse(CoilFileText.Of(SampleCoil.Loaded with { Name = name })).Coil!.Name == name, iter: 100);

    // No text whatever may throw.
    [Fact]
    public void Garbage_is_refused_not_thrown() => Gen.Select(Gen.Int[0, Good.Length - 1], Gen.String[0, 8]).Sample(
        (at, junk) =>
        {
            CoilFileResult result = CoilFile.Parse(Good[..at] + junk + Good[at..]);
            return result.Coil is not null || result.Errors.Count > 0;
        },
        iter: 300);

    [Fact]
    public void A_reader_in_another_country_reads_the_same()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = new CultureInfo("de-DE");
            Assert.Equal(.0004, CoilFile.Parse(Good).Coil!.WireDiameterM, 1e-15);
            Assert.Contains("0.4 ", CoilFileText.Of(SampleCoil.Loaded), StringComparison.Ordinal);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }
}
