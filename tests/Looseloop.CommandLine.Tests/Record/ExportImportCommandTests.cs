using System.Text.Json;

namespace Looseloop.CommandLine.Tests.Record;

public sealed class ExportImportCommandTests : IDisposable
{
    private readonly SampleRecord _record = new();

    public void Dispose() => _record.Dispose();

    [Fact]
    public void Readings_go_out_as_CSV_with_units_in_the_header()
    {
        AppRun run = _record.Run("export", "1", "2");
        string[] lines = run.Out.TrimEnd().Split("\r\n");
        Assert.Equal(3, lines.Length);
        Assert.Contains("f0_hz", lines[0]);
        Assert.Contains("150000.2", lines[2]);
    }

    [Fact]
    public void Runs_go_out_as_JSON_lines()
    {
        AppRun run = _record.Run("export", "1", "--json");
        string[] documents = [.. run.Out.TrimEnd().Split('\n').Select(line => JsonDocument.Parse(line).RootElement.GetProperty("document").GetString()!)];
        Assert.Equal(["start", "reading", "stop"], documents);
    }

    [Fact]
    public void A_file_that_is_there_is_left_alone()
    {
        string path = _record.File("out.csv");
        Assert.Equal(0, _record.Run("export", "--points", "--to", path).ExitCode);
        long length = new FileInfo(path).Length;
        AppRun again = _record.Run("export", "1", "--to", path);
        Assert.Equal(1, again.ExitCode);
        Assert.Equal(length, new FileInfo(path).Length);
    }

    [Fact]
    public void Another_record_is_merged_once()
    {
        string own = _record.File("own.db");
        AppRun first = AppRun.Of("import", _record.Path, "--record", own, "--json");
        Assert.Equal(183, JsonDocument.Parse(first.Out).RootElement.GetProperty("readings").GetInt32());
        AppRun second = AppRun.Of("import", _record.Path, "--record", own);
        Assert.Contains("183 readings were here already", second.Out);
    }

    [Fact]
    public void What_is_no_record_is_refused_with_a_sentence()
    {
        string text = _record.File("text.txt");
        File.WriteAllText(text, "hello");
        AppRun run = _record.Run("import", text);
        Assert.Equal(1, run.ExitCode);
        Assert.Contains("not a record", run.Error);
    }
}
