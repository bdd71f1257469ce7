using System.Reflection.Metadata;
using System.Reflection.PortableExecutable;
using System.Xml.Linq;
using Looseloop.Firmware.Tests.Gate;

namespace Looseloop.Firmware.Tests;

/// <summary>The projects that a user builds for the boards are in step with the check build and with the files on disk.</summary>
public class NanoProjectTests
{
    private static readonly XNamespace _namespace = "http://schemas.microsoft.com/developer/msbuild/2003";

    public static TheoryData<string> Boards => ["Esp32", "Esp32S3"];

    [Theory]
    [MemberData(nameof(Boards))]
    public void Every_source_is_listed_and_nothing_else(string board)
    {
        string folder = Path.Combine(Nano, board);
        var listed = Project(board).Descendants(_namespace + "Compile")
            .Select(item => (Path: Full(folder, item.Attribute("Include")!.Value), Link: item.Element(_namespace + "Link")!.Value))
            .ToList();
        var wanted = CheckSources().ToList();
        Assert.Equal(wanted.Order(StringComparer.Ordinal), listed.Select(item => item.Path).Order(StringComparer.Ordinal));
        Assert.All(listed, item => Assert.Equal(Path.GetFileName(item.Path), item.Link.Split('\\')[^1]));
        Assert.Equal(listed.Count, listed.Select(item => item.Link).Distinct().Count());
    }

    [Theory]
    [MemberData(nameof(Boards))]
    public void Name_start_and_language_are_those_of_the_check_build(string board)
    {
        XElement check = XElement.Load(Path.Combine(Check, board, $"Looseloop.{board}.csproj"));
        XElement settings = XElement.Load(Path.Combine(Check, "Directory.Build.props"));
        foreach (string property in new[] { "AssemblyName", "StartupObject" })
        {
            Assert.Equal(check.Descendants(property).Single().Value, Property(board, property));
        }

        foreach (string property in new[] { "LangVersion", "Nullable", "ImplicitUsings" })
        {
            Assert.Equal(settings.Descendants(property).Single().Value, Property(board, property));
        }
    }

    [Theory]
    [MemberData(nameof(Boards))]
    public void References_are_those_that_the_check_build_was_compiled_against(string board)
    {
        var referenced = Project(board).Descendants(_namespace + "Reference")
            .Select(item => item.Attribute("Include")!.Value.Split(", "))
            .ToDictionary(parts => parts[0], parts => parts);
        foreach ((string name, Version version) in CompiledReferences(board))
        {
            Assert.Equal("Version=" + version, referenced[name][1]);
        }

        Assert.All(referenced.Values, parts => Assert.Equal("PublicKeyToken=c07d481e9758c731", parts[3]));
        Assert.Equal(
            "Version=" + XElement.Load(Path.Combine(Check, "Directory.Build.props")).Descendants("NanoCoreLibraryVersion").Single().Value + ".0",
            referenced["mscorlib"][1]);

        // What the libraries themselves need has to be deployed too.
        Assert.Superset(
            new HashSet<string> { "nanoFramework.Runtime.Events", "nanoFramework.System.Text", "System.IO.Streams" },
            referenced.Keys.ToHashSet());
    }

    [Theory]
    [MemberData(nameof(Boards))]
    public void Every_reference_has_its_package_and_every_package_its_reference(string board)
    {
        var packages = XElement.Load(Path.Combine(Nano, board, "packages.config")).Elements("package").ToList();
        Assert.All(packages, package => Assert.Equal("netnano1.0", package.Attribute("targetFramework")!.Value));
        var expected = packages.Select(package => package.Attribute("id")!.Value + "." + package.Attribute("version")!.Value);
        var hints = Project(board).Descendants(_namespace + "Reference").ToDictionary(
            item => item.Element(_namespace + "HintPath")!.Value.Split('\\')[2], item => item.Attribute("Include")!.Value.Split(", "));
        Assert.Equal(expected.Order(StringComparer.Ordinal), hints.Keys.Order(StringComparer.Ordinal));
        foreach ((string package, string[] reference) in hints)
        {
            // An assembly's version begins with that of its package.
            string[] version = reference[1]["Version=".Length..].Split('.');
            Assert.EndsWith("." + string.Join('.', version[..3]), package);
            Assert.EndsWith(reference[0] == "mscorlib" ? "CoreLibrary" : reference[0], package[..^(string.Join('.', version[..3]).Length + 1)]);
        }
    }

    [Fact]
    public void Both_projects_are_in_the_solution_and_share_no_settings_with_the_host()
    {
        string solution = File.ReadAllText(Path.Combine(Nano, "Looseloop.Firmware.sln"));
        foreach (string board in new[] { "Esp32", "Esp32S3" })
        {
            Assert.Contains($"\"{board}\\Looseloop.{board}.nfproj\", \"{Property(board, "ProjectGuid")}\"", solution);
            Assert.Equal(
                "{11A8DD76-328B-46DF-9F39-F559912D0360};{FAE04EC0-301F-11D3-BF4B-00C04F79EFBC}", Property(board, "ProjectTypeGuids"));
        }

        foreach (string name in new[] { "Directory.Build.props", "Directory.Build.targets", "Directory.Packages.props" })
        {
            Assert.Empty(XElement.Load(Path.Combine(Nano, name)).Elements());
        }
    }

    private static string Nano => Path.Combine(Repository.Root, "firmware", "Nano");

    private static string Check => Path.Combine(Repository.Root, "firmware", "Check");

    private static XElement Project(string board) => XElement.Load(Path.Combine(Nano, board, $"Looseloop.{board}.nfproj"));

    private static string Property(string board, string name) => Project(board).Descendants(_namespace + name).Single().Value;

    private static string Full(string folder, string include) =>
        Path.GetFullPath(Path.Combine(folder, include.Replace('\\', Path.DirectorySeparatorChar)));

    private static IEnumerable<string> CheckSources()
    {
        string below = Path.Combine(Check, "Esp32");
        return XElement.Load(Path.Combine(Check, "Firmware.props")).Descendants("Compile")
            .Select(item => Full(below, item.Attribute("Include")!.Value))
            .SelectMany(pattern => Directory.GetFiles(Path.GetDirectoryName(pattern)!, Path.GetFileName(pattern)));
    }

    private static Dictionary<string, Version> CompiledReferences(string board)
    {
        using var file = new PEReader(new MemoryStream(CheckBuild.Read(board, "Looseloop." + board)));
        MetadataReader reader = file.GetMetadataReader();
        return reader.AssemblyReferences.Select(reader.GetAssemblyReference)
            .ToDictionary(reference => reader.GetString(reference.Name), reference => reference.Version);
    }
}
