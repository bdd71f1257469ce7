namespace Looseloop.Firmware.Tests.Gate;

/// <summary>The assemblies that building firmware/Check made, which this project's build does first.</summary>
internal static class CheckBuild
{
    /// <summary>What the firmware may refer to: the packages of firmware/README.md, by the versions of their assemblies.</summary>
    public static IReadOnlyDictionary<string, Version> AllowedReferences { get; } = new Dictionary<string, Version>
    {
        ["mscorlib"] = new(1, 17),
        ["System.Device.Pwm"] = new(1, 1),
        ["System.Device.Adc"] = new(1, 1),
        ["System.IO.Ports"] = new(1, 1),
        ["nanoFramework.Hardware.Esp32"] = new(1, 6),
    };

    /// <summary>The file of one project below firmware/Check.</summary>
    public static string PathOf(string folder, string assembly) =>
        Path.Combine(Repository.Root, "firmware", "Check", folder, "bin", assembly + ".dll");

    public static byte[] Read(string folder, string assembly) => File.ReadAllBytes(PathOf(folder, assembly));
}
