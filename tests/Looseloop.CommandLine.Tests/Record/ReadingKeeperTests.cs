namespace Looseloop.CommandLine.Tests.Record;

public sealed class ReadingKeeperTests : IDisposable
{
    private readonly SampleRecord _record = new();

    public void Dispose() => _record.Dispose();

    [Fact]
    public void A_reading_of_the_bench_is_kept_where_a_record_is_named_and_shown_from_it()
    {
        string own = _record.File("own.db");
        AppRun read = AppRun.Of("read", "--box", "bench", "--note", "first", "--record", own);
        Assert.Contains("Kept as reading 1", read.Error);
        AppRun shown = AppRun.Of("show", "first", "--record", own);
        Assert.Equal(0, shown.ExitCode);
        Assert.Contains("reading 1", shown.Out);
    }
}
