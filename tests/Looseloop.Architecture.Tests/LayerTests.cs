using System.Reflection.Metadata;
using System.Reflection.PortableExecutable;

namespace Looseloop.Architecture.Tests;

/// <summary>Arrows run downward only. What an assembly really uses is read from its metadata, not from its project file.</summary>
public class LayerTests
{
    /// <summary>What each layer may use of the project itself.</summary>
    private static readonly Dictionary<string, string[]> _allowed = new()
    {
        ["looseloop"] =
        [
            "Looseloop.Procedures", "Looseloop.Report", "Looseloop.Record", "Looseloop.Bench", "Looseloop.Box", "Looseloop.Link",
            "Looseloop.Protocol", "Looseloop.Resonance", "Looseloop.Coil", "Looseloop.Drift", "Looseloop.Statistics", "Looseloop.Readings",
        ],
        ["Looseloop.Procedures"] =
        [
            "Looseloop.Box", "Looseloop.Link", "Looseloop.Protocol", "Looseloop.Resonance", "Looseloop.Coil", "Looseloop.Drift",
            "Looseloop.Statistics", "Looseloop.Readings",
        ],
        ["Looseloop.Box"] = ["Looseloop.Link", "Looseloop.Protocol", "Looseloop.Readings"],
        ["Looseloop.Link"] = ["Looseloop.Protocol"],
        ["Looseloop.Protocol"] = [],
        ["Looseloop.Readings"] = [],
        ["Looseloop.Statistics"] = [],
        ["Looseloop.Resonance"] = ["Looseloop.Statistics", "Looseloop.Readings"],
        ["Looseloop.Coil"] = ["Looseloop.Readings"],
        ["Looseloop.Drift"] = ["Looseloop.Statistics", "Looseloop.Readings"],
        ["Looseloop.Record"] = ["Looseloop.Readings"],
        ["Looseloop.Report"] = ["Looseloop.Readings"],
        ["Looseloop.Firmware.Core"] = ["Looseloop.Protocol"],
        ["Looseloop.Bench"] = ["Looseloop.Firmware.Core", "Looseloop.Link"],
    };

    /// <summary>Pure layers: no files, no ports, no console, no clock of their own.</summary>
    private static readonly string[] _pure =
        ["Looseloop.Resonance", "Looseloop.Coil", "Looseloop.Drift", "Looseloop.Statistics", "Looseloop.Readings"];

    private static readonly string[] _impureTypes =
    [
        "System.IO.File", "System.IO.FileStream", "System.IO.Directory", "System.Console", "System.Diagnostics.Stopwatch",
        "System.IO.Ports.SerialPort", "System.Net.Sockets.Socket", "System.Threading.Thread",
    ];

    public static TheoryData<string> Layers => [.. _allowed.Keys];

    public static TheoryData<string> PureLayers => [.. _pure];

    [Theory]
    [MemberData(nameof(Layers))]
    public void A_layer_uses_only_what_lies_below_it(string layer)
    {
        using PEReader file = Open(layer);
        MetadataReader metadata = file.GetMetadataReader();
        string[] used =
        [
            .. metadata.AssemblyReferences.Select(handle => metadata.GetString(metadata.GetAssemblyReference(handle).Name))
                .Where(name => name.StartsWith("Looseloop", StringComparison.OrdinalIgnoreCase)),
        ];
        Assert.Empty(used.Except(_allowed[layer]));
    }

    [Fact]
    public void Every_assembly_of_the_product_is_in_the_table()
    {
        string[] built =
        [
            .. Directory.GetFiles(AppContext.BaseDirectory, "*ooseloop*.dll").Select(path => Path.GetFileNameWithoutExtension(path)!)
                .Where(name => !name.EndsWith(".Tests", StringComparison.Ordinal)),
        ];
        Assert.NotEmpty(built);
        Assert.Empty(built.Except(_allowed.Keys));
    }

    [Theory]
    [MemberData(nameof(PureLayers))]
    public void A_pure_layer_touches_no_file_port_console_or_clock(string layer)
    {
        string[] touched = [.. TypesUsedBy(layer).Intersect(_impureTypes)];
        Assert.Empty(touched);
    }

    [Fact]
    public void The_bench_counts_clock_cycles_in_its_own_words()
    {
        Assert.DoesNotContain("Looseloop.Protocol.FrequencyGrid", TypesUsedBy("Looseloop.Bench"));
    }

    [Fact]
    public void The_firmware_core_uses_nothing_but_the_protocol_and_the_base_library()
    {
        using PEReader file = Open("Looseloop.Firmware.Core");
        MetadataReader metadata = file.GetMetadataReader();
        string[] others =
        [
            .. metadata.AssemblyReferences.Select(handle => metadata.GetString(metadata.GetAssemblyReference(handle).Name))
                .Where(name => name is not ("Looseloop.Protocol" or "System.Runtime")),
        ];
        Assert.Empty(others);
    }

    private static HashSet<string> TypesUsedBy(string assembly)
    {
        using PEReader file = Open(assembly);
        MetadataReader metadata = file.GetMetadataReader();
        return
        [
            .. metadata.TypeReferences.Select(metadata.GetTypeReference)
                .Select(type => $"{metadata.GetString(type.Namespace)}.{metadata.GetString(type.Name)}"),
        ];
    }

    private static PEReader Open(string assembly) => new(File.OpenRead(Path.Combine(AppContext.BaseDirectory, assembly + ".dll")));
}
