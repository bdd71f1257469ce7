namespace Looseloop.Record.Tests;

/// <summary>A folder of a test's own, gone after it.</summary>
public sealed class TemporaryFolder : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("looseloop-record-");

    public string File(string name) => Path.Combine(_folder.FullName, name);

    public void Dispose() => _folder.Delete(recursive: true);
}
