using System.Globalization;
using System.Text.RegularExpressions;
using Looseloop.Bench.Files;
using Looseloop.Bench.Physics;

namespace Looseloop.Bench.Tests;

/// <summary>Worlds from files: those that ship keep what their comments promise, and mistakes are named by line.</summary>
public partial class WorldFileTests
{
    public static TheoryData<string> Shipped => new(WorldShelf.Names);

    [GeneratedRegex(@"^# Offset from the coil left alone: f0 (\S+) ppm, Q (\S+) %\.$", RegexOptions.Multiline)]
    private static partial Regex Offset();

    [Theory]
    [MemberData(nameof(Shipped))]
    public void AShippedWorldSaysItsOffset(string name)
    {
        World world = WorldShelf.Load(name);
        Assert.NotEmpty(world.About);
        Assert.Equal(name, world.Name);
        Match match = Offset().Match(WorldShelf.TextOf(name));
        Assert.True(match.Success, "no line with the offset");
        Truth alone = Truth.Unloaded(world);
        Truth loaded = Truth.Loaded(world);
        Assert.Equal(double.Parse(match.Groups[1].Value, CultureInfo.InvariantCulture), ((loaded.F0Hz / alone.F0Hz) - 1) * 1e6, 0.06);
        Assert.Equal(double.Parse(match.Groups[2].Value, CultureInfo.InvariantCulture), ((loaded.Q / alone.Q) - 1) * 100, 0.006);
    }

    [Theory]
    [MemberData(nameof(Shipped))]
    public void AShippedWorldHasAUsableLevel(string name)
    {
        // All but the one made to saturate peak in the upper half of the converter, below its end.
        double counts = WorldShelf.Load(name).PeakCounts();
        if (name == "bittern")
        {
            Assert.True(counts > Converter.Full);
        }
        else if (name != "kestrel")
        {
            Assert.InRange(counts, 2000, 3600);
        }
    }

    [Fact]
    public void ARunningCoilStandsOverTheFieldThreshold()
    {
        // 5 % of what is left of the converter's range above the pedestal.
        const double threshold = 310 + (0.05 * (4095 - 310));
        var kestrel = new Scene(WorldShelf.Load("kestrel"), 1);
        Assert.True(kestrel.ReadDetector(0.5) > 2 * threshold);

        var nightjar = new Scene(WorldShelf.Load("nightjar"), 1);
        int above = 0;
        for (int i = 0; i < 10_000; i++)
        {
            above += nightjar.ReadDetector(i * 1e-4) > threshold ? 1 : 0;
        }

        Assert.InRange(above, 230, 260);

        var owl = new Scene(WorldShelf.Load("owl"), 1);
        Assert.InRange(owl.ReadDetector(0.5), 330, (int)threshold);
        Assert.Equal(0, new Scene(WorldShelf.Load("coot"), 1).ReadDetector(0.5));
    }

    [Theory]
    [InlineData("[coil]\ninductance = 3", "w.toml, line 2: [coil] has no 'inductance'.")]
    [InlineData("[coil]\n\n[koil]\n", "w.toml, line 3: a world has no section 'koil'.")]
    [InlineData("[mode]\nf0_hz = 1e5", "w.toml, line 1: a world has no section 'mode' (write it as [[mode]]).")]
    [InlineData("[[coil]]\n", "w.toml, line 1: a world has no section 'coil' (write it as [coil]).")]
    [InlineData("[[mode]]\nf0_hz = 150_000", "w.toml: [[mode]] needs 'q'.")]
    [InlineData("[[mode]]\nf0_hz = \"a\"\nq = 100", "w.toml, line 2: 'f0_hz' in [[mode]] must be a number.")]
    [InlineData("[loop]\ncoupling = 2", "w.toml, line 2: 'coupling' in [loop] is 2, but must lie between 1E-06 and 0.5.")]
    [InlineData("[loop]\ncoupling = nan", "w.toml, line 2: 'coupling' in [loop] is NaN, but must lie between 1E-06 and 0.5.")]
    [InlineData("[drive]\nharmonics = 2.5", "w.toml, line 2: 'harmonics' in [drive] must be a whole number.")]
    [InlineData("[detector]\n\nkind = \"rms\"", "w.toml, line 3: 'kind' in [detector] is \"rms\", but must be one of \"rms_linear\", \"rms_log\"")]
    [InlineData("about = 3", "w.toml, line 1: 'about' in the file's head must be a text in quotes.")]
    [InlineData("colour = 3", "w.toml, line 1: the file's head has no 'colour'.")]
    [InlineData("[loop]\ncoupling = 0.1\ncoupling = 0.2", "w.toml, line 3: ")]
    [InlineData("[loop]\ncoupling = \n", "w.toml, line 2: ")]
    [InlineData("[loop\n", "w.toml, line 1: ")]
    public void AMistakeIsNamedByItsLine(string text, string message)
    {
        var error = Assert.Throws<WorldFileException>(() => WorldFile.Read("w.toml", "w", text));
        Assert.StartsWith(message, error.Message, StringComparison.Ordinal);
        Assert.EndsWith(".", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void AnEmptyFileIsTheOrdinaryWorld()
    {
        World world = WorldFile.Read("w.toml", "w", "");
        Assert.Equal(new World { Name = "w" }.PeakCounts(), world.PeakCounts());
    }

    [Fact]
    public void AWorldThatIsNotThereIsSaidSo()
    {
        var error = Assert.Throws<WorldFileException>(() => WorldShelf.Load("albatross"));
        Assert.StartsWith("There is no world 'albatross'. Worlds that ship with the program: bittern, ", error.Message, StringComparison.Ordinal);
        Assert.StartsWith("There is no file 'x/y.toml'.", Assert.Throws<WorldFileException>(() => WorldShelf.Load("x/y.toml")).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void ALevelCanBeAskedFor()
    {
        World world = WorldShelf.Load("dipper").WithPeakCounts(3000, 1.0 / 3);
        Assert.Equal(3000, world.PeakCounts(1.0 / 3), 0.1);
    }
}
