using System.Text.RegularExpressions;
using Looseloop.Bench.Files;

namespace Looseloop.Bench.Tests;

/// <summary>The page that lists a world file's keys, held against the reader.</summary>
public partial class WorldKeyTests
{
    [GeneratedRegex(@"^\| `(\[+\w+\]+)` \| `(\w+)` \| `([^`]+)` \|", RegexOptions.Multiline)]
    private static partial Regex Row();

    [GeneratedRegex(@"\.(?:Number|Needed|Whole|Flag|Text|Choice)\(\s*""(\w+)""")]
    private static partial Regex Asked();

    [Fact]
    public void EveryListedKeyIsReadAndItsDefaultIsTheOrdinaryWorlds()
    {
        var sections = Row().Matches(File.ReadAllText(Bench("Worlds/README.md")))
            .GroupBy(row => row.Groups[1].Value, row => $"{row.Groups[2].Value} = {row.Groups[3].Value}");
        string text = string.Join('\n', sections.Select(section => section.Key + "\n" + string.Join('\n', section)));
        World world = WorldFile.Read("keys.toml", "keys", text);
        var ordinary = new World();
        Assert.Equal(ordinary.Loop, world.Loop);
        Assert.Equal(ordinary.Drive, world.Drive);
        Assert.Equal(ordinary.Pickup, world.Pickup);
        Assert.Equal(ordinary.FeedThrough, world.FeedThrough);
        Assert.Equal(ordinary.Detector, world.Detector);
        Assert.Equal(ordinary.Converter, world.Converter);
        Assert.Equal(ordinary.Board, world.Board);
        Assert.Equal(ordinary.Room.Hum, world.Room.Hum);
        Assert.Equal(ordinary.Room.Bursts, world.Room.Bursts);
        Assert.Equal(ordinary.Room.WarmUp, world.Room.WarmUp);
        Assert.Equal(ordinary.Coil.InductanceMh, world.Coil.InductanceMh);
        Assert.Equal(new CoilMode(150_000, 200), world.Coil.Modes.Single());
        Assert.Equal(new Neighbour(), world.Room.Neighbours.Single());
        Assert.Equal(new Carrier(), world.Room.Carriers.Single());
    }

    [Theory]
    [InlineData("diode", DetectorKind.Diode)]
    [InlineData("peak", DetectorKind.Peak)]
    [InlineData("peak_to_peak", DetectorKind.PeakToPeak)]
    [InlineData("rms_log", DetectorKind.RmsLog)]
    public void WhatIsLeftOutIsThatOfAnOrdinaryDetectorOfTheKind(string word, DetectorKind kind)
    {
        var ordinary = DetectorParameters.Of(kind);
        Assert.Equal(ordinary, WorldFile.Read("a.toml", "a", $"[detector]\nkind = \"{word}\"\n").Detector);
        Assert.Equal(ordinary with { Gain = 7 }, WorldFile.Read("a.toml", "a", $"[detector]\nkind = \"{word}\"\ngain = 7\n").Detector);
    }

    [Fact]
    public void EveryKeyThatIsReadIsListed()
    {
        int listed = Row().Count(File.ReadAllText(Bench("Worlds/README.md")));
        int read = Asked().Matches(File.ReadAllText(Bench("Files/WorldFile.cs"))).Count(match => match.Groups[1].Value != "about");
        Assert.True(read > 70);
        Assert.Equal(read, listed);
    }

    private static string Bench(string path)
    {
        for (DirectoryInfo? folder = new(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            string file = Path.Combine(folder.FullName, "host", "Looseloop.Bench", path);
            if (File.Exists(file))
            {
                return file;
            }
        }

        throw new FileNotFoundException(path);
    }
}
