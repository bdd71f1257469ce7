using System.Diagnostics;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>The circuit simulator, where it is installed.</summary>
internal static class Ngspice
{
    public static bool IsInstalled { get; } =
        (Environment.GetEnvironmentVariable("PATH") ?? string.Empty)
            .Split(Path.PathSeparator)
            .Any(folder => File.Exists(Path.Combine(folder, "ngspice")));

    /// <summary>Runs every netlist.</summary>
    public static SpiceResults Run()
    {
        using Process process = Process.Start(
            new ProcessStartInfo(NotesFolder.File(Path.Combine("spice", "run.sh")))
            {
                RedirectStandardOutput = true,
                RedirectStandardError = true,
            })!;
        Task<string> errors = process.StandardError.ReadToEndAsync();
        string output = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        Assert.True(process.ExitCode == 0, errors.Result);
        return SpiceResults.Parse(output);
    }
}

/// <summary>A test that runs the circuit simulator.</summary>
public sealed class NgspiceFactAttribute : FactAttribute
{
    public NgspiceFactAttribute()
    {
        Skip = Ngspice.IsInstalled ? null : "ngspice is not installed (Debian package ngspice)";
    }
}
