using System.Diagnostics;

namespace Looseloop.Interpreter.Tests.Plant;

/// <summary>A circuit in C for the interpreter, compiled into a temporary folder.</summary>
internal sealed class CompiledPlant : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("looseloop-plant-").FullName;

    public CompiledPlant(string source)
    {
        Path = System.IO.Path.Combine(_folder, "plant.so");
        string file = System.IO.Path.Combine(Repository.Root, "tests", "Looseloop.Interpreter.Tests", "Plant", source);
        using Process compiler = Process.Start("cc", ["-O2", "-shared", "-fPIC", "-o", Path, file, "-lm"]);
        compiler.WaitForExit();
        Assert.Equal(0, compiler.ExitCode);
    }

    /// <summary>True if a C compiler is there.</summary>
    public static bool IsPossible { get; } = (Environment.GetEnvironmentVariable("PATH") ?? "").Split(':')
        .Any(folder => File.Exists(System.IO.Path.Combine(folder, "cc")));

    public string Path { get; }

    public void Dispose() => Directory.Delete(_folder, recursive: true);
}
